import { queryOptions, useQuery } from '@tanstack/react-query';
import { getDayMargin, getPriceGrids, savePriceGrid, type PriceGridEdit } from '#shared/contracts/margin.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function priceGridsQuery() {
  return queryOptions({
    queryKey: ['price-grids'],
    queryFn: ({ signal }) => call(getPriceGrids, { signal }),
    staleTime: STALE.office,
  });
}

export function dayMarginQuery(dayId: string) {
  return queryOptions({
    queryKey: ['day-margin', dayId],
    queryFn: ({ signal }) => call(getDayMargin, { params: { dayId }, signal }),
    staleTime: STALE.stock,
  });
}

export function usePriceGrids() {
  return useQuery(priceGridsQuery());
}

export function useDayMargin(dayId: string) {
  return useQuery(dayMarginQuery(dayId));
}

export function useSavePriceGrid() {
  return useFarmMutation((body: PriceGridEdit) => call(savePriceGrid, { body }));
}
