import { queryOptions, useQuery } from '@tanstack/react-query';
import type { publishAllocationSchema } from '#shared/contracts/allocation-schema.ts';
import { getAllocation, publishAllocation } from '#shared/contracts/allocation.ts';
import { getAllocationModel, getAllocationModelMps } from '#shared/contracts/downloads.ts';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function allocationQuery(dayId: string) {
  return queryOptions({
    queryKey: ['allocations', dayId],
    queryFn: ({ signal }) => call(getAllocation, { params: { dayId }, signal }),
    staleTime: STALE.stock,
    // The limits, worths and costs of locks follow the plan a moment later.
    refetchInterval: ({ state }) => (state.data?.latest?.isExplained === false ? 2_000 : false),
  });
}

export function useAllocation(dayId: string) {
  return useQuery(allocationQuery(dayId));
}

export function usePublishAllocation() {
  return useFarmMutation((input: CallInput<typeof publishAllocationSchema>) => call(publishAllocation, input));
}

/** Where the browser fetches the model as a file. */
export function allocationModelHref(allocationId: string, format: 'lp' | 'mps'): string {
  const { path } = format === 'lp' ? getAllocationModel : getAllocationModelMps;
  return path.replace(':allocationId', encodeURIComponent(allocationId));
}
