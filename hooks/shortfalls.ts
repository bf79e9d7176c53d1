import { queryOptions, useQuery } from '@tanstack/react-query';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import type { refundShortfallSchema, swapShortfallSchema } from '#shared/contracts/shortfalls-schema.ts';
import { listShortfalls, refundShortfall, swapShortfall } from '#shared/contracts/shortfalls.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function shortfallsQuery() {
  return queryOptions({
    queryKey: ['shortfalls'],
    queryFn: ({ signal }) => call(listShortfalls, { signal }),
    staleTime: STALE.stock,
  });
}

export function useShortfalls() {
  return useQuery(shortfallsQuery());
}

export function useRefundShortfall() {
  return useFarmMutation((body: CallInput<typeof refundShortfallSchema>['body']) => call(refundShortfall, { body }));
}

export function useSwapShortfall() {
  return useFarmMutation((body: CallInput<typeof swapShortfallSchema>['body']) => call(swapShortfall, { body }));
}
