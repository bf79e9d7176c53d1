import { queryOptions, useQuery } from '@tanstack/react-query';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import type {
  applyForTradeSchema,
  cancelReservationSchema,
  confirmReservationSchema,
  decideTradeAccountSchema,
  dispatchReservationSchema,
  NewReservation,
  refuseReservationSchema,
  setTradePricesSchema,
} from '#shared/contracts/trade-schema.ts';
import {
  applyForTrade,
  cancelReservation,
  confirmReservation,
  decideTradeAccount,
  dispatchReservation,
  getTradeAccount,
  listMyReservations,
  listReservations,
  listTradeAccounts,
  listTradeDays,
  refuseReservation,
  reserve,
  setTradePrices,
} from '#shared/contracts/trade.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function tradeAccountQuery() {
  return queryOptions({
    queryKey: ['trade-account'],
    queryFn: ({ signal }) => call(getTradeAccount, { signal }),
    staleTime: STALE.office,
  });
}

export function tradeDaysQuery() {
  return queryOptions({
    queryKey: ['trade-days'],
    queryFn: ({ signal }) => call(listTradeDays, { signal }),
    staleTime: STALE.stock,
  });
}

export function myReservationsQuery() {
  return queryOptions({
    queryKey: ['my-reservations'],
    queryFn: ({ signal }) => call(listMyReservations, { signal }),
    staleTime: STALE.stock,
  });
}

export function reservationsQuery() {
  return queryOptions({
    queryKey: ['reservations'],
    queryFn: ({ signal }) => call(listReservations, { signal }),
    staleTime: STALE.stock,
  });
}

export function tradeAccountsQuery() {
  return queryOptions({
    queryKey: ['trade-accounts'],
    queryFn: ({ signal }) => call(listTradeAccounts, { signal }),
    staleTime: STALE.office,
  });
}

export function useTradeAccount() {
  return useQuery(tradeAccountQuery());
}

export function useTradeDays() {
  return useQuery(tradeDaysQuery());
}

export function useMyReservations() {
  return useQuery(myReservationsQuery());
}

export function useReservations() {
  return useQuery(reservationsQuery());
}

export function useTradeAccounts() {
  return useQuery(tradeAccountsQuery());
}

export function useApplyForTrade() {
  return useFarmMutation((input: CallInput<typeof applyForTradeSchema>) => call(applyForTrade, input));
}

export function useReserve() {
  return useFarmMutation((body: NewReservation) => call(reserve, { body }));
}

export function useCancelReservation() {
  return useFarmMutation((input: CallInput<typeof cancelReservationSchema>) => call(cancelReservation, input));
}

export function useConfirmReservation() {
  return useFarmMutation((input: CallInput<typeof confirmReservationSchema>) => call(confirmReservation, input));
}

export function useRefuseReservation() {
  return useFarmMutation((input: CallInput<typeof refuseReservationSchema>) => call(refuseReservation, input));
}

export function useDispatchReservation() {
  return useFarmMutation((input: CallInput<typeof dispatchReservationSchema>) => call(dispatchReservation, input));
}

export function useDecideTradeAccount() {
  return useFarmMutation((input: CallInput<typeof decideTradeAccountSchema>) => call(decideTradeAccount, input));
}

export function useSetTradePrices() {
  return useFarmMutation((input: CallInput<typeof setTradePricesSchema>) => call(setTradePrices, input));
}
