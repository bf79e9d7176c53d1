import { keepPreviousData, queryOptions, useQuery } from '@tanstack/react-query';
import {
  getDayMargin,
  getPriceGrids,
  savePriceGrid,
  type Basis,
  type PriceGridEdit,
} from '#shared/contracts/margin.ts';
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

export function dayMarginQuery(dayId: string, basis: Basis) {
  return queryOptions({
    queryKey: ['day-margin', dayId, basis],
    queryFn: ({ signal }) => call(getDayMargin, { params: { dayId }, query: { basis }, signal }),
    staleTime: STALE.stock,
  });
}

export function usePriceGrids() {
  return useQuery(priceGridsQuery());
}

export function useDayMargin(dayId: string, basis: Basis) {
  // The other basis comes a moment later: until then the page stays as it is.
  return useQuery({ ...dayMarginQuery(dayId, basis), placeholderData: keepPreviousData });
}

export function useSavePriceGrid() {
  return useFarmMutation((body: PriceGridEdit) => call(savePriceGrid, { body }));
}
