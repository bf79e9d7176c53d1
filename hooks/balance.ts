import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { Answer } from '#shared/contracts/endpoint.ts';
import type { getBalanceSchema } from '#shared/contracts/order-changes-schema.ts';
import { getBalance, openBalancePage, startBalance } from '#shared/contracts/order-changes.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { confirmWithCard } from './stripe-js.ts';

export type Balance = Answer<typeof getBalanceSchema>;

export function balanceQuery(token: string) {
  return queryOptions({
    queryKey: ['orders', token, 'balance'],
    queryFn: ({ signal }) => call(getBalance, { params: { token }, signal }),
    staleTime: STALE.stock,
  });
}

/** The rest of an order that is still to be paid; an error where nothing is open. */
export function useBalance(token: string) {
  return useQuery(balanceQuery(token));
}

/** Pays with the card that was kept: its owner is here to answer the bank. */
export function usePayBalance(token: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: async (balance: Balance) => {
      const payment = await call(startBalance, { params: { token } });
      await confirmWithCard(balance, payment);
    },
    onSuccess: () => client.invalidateQueries({ queryKey: ['orders', token], exact: true }),
  });
}

/** To the payment company's page, for another card. */
export function useOtherCard(token: string) {
  return useMutation({ mutationFn: () => call(openBalancePage, { params: { token } }) });
}
