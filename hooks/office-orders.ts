import { queryOptions, useQuery } from '@tanstack/react-query';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import type { cancelOrderByOwnerSchema } from '#shared/contracts/orders-schema.ts';
import { cancelOrderByOwner, listOrders } from '#shared/contracts/orders.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

/** All orders of one cutting day, or of all days. The states are told apart on the screen. */
export function officeOrdersQuery(dayId: string | undefined) {
  return queryOptions({
    queryKey: ['office-orders', dayId ?? 'all'],
    queryFn: ({ signal }) => call(listOrders, { query: { dayId }, signal }),
    staleTime: STALE.stock,
  });
}

export function useOfficeOrders(dayId: string | undefined) {
  return useQuery(officeOrdersQuery(dayId));
}

export function useCancelOrderByOwner() {
  return useFarmMutation((input: CallInput<typeof cancelOrderByOwnerSchema>) => call(cancelOrderByOwner, input));
}
