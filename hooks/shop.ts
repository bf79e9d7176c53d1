import { queryOptions, useQuery } from '@tanstack/react-query';
import {
  getBox,
  getShopHome,
  getTrace,
  listCollections,
  listCuts,
  type Box,
  type ShopHome,
  type Trace,
} from '#shared/contracts/shop.ts';
import type { Answer } from '#shared/contracts/endpoint.ts';
import { call } from './api.ts';
import { useLoaded, type Loaded } from './loaded.ts';
import { STALE } from './query-client.ts';

export type CutList = Answer<NonNullable<(typeof listCuts)['schema']>>;

export function homeQuery() {
  return queryOptions({
    queryKey: ['shop'],
    queryFn: ({ signal }) => call(getShopHome, { signal }),
    staleTime: STALE.stock,
  });
}

export function boxQuery(slug: string) {
  return queryOptions({
    queryKey: ['boxes', slug],
    queryFn: ({ signal }) => call(getBox, { params: { slug }, signal }),
    staleTime: STALE.stock,
  });
}

export function cutsQuery() {
  return queryOptions({
    queryKey: ['cuts'],
    queryFn: ({ signal }) => call(listCuts, { signal }),
    staleTime: STALE.stock,
  });
}

export function collectionsQuery(dayId: string) {
  return queryOptions({
    queryKey: ['collections', dayId],
    queryFn: ({ signal }) => call(listCollections, { params: { dayId }, signal }),
    staleTime: STALE.stock,
  });
}

export function traceQuery(code: string) {
  return queryOptions({
    queryKey: ['trace', code],
    queryFn: ({ signal }) => call(getTrace, { params: { code }, signal }),
    staleTime: STALE.office,
  });
}

export function useShopHome(loaded: Loaded<ShopHome>) {
  return useLoaded(homeQuery(), loaded);
}

export function useBox(slug: string, loaded: Loaded<Box>) {
  return useLoaded(boxQuery(slug), loaded);
}

export function useCuts(loaded: Loaded<CutList>) {
  return useLoaded(cutsQuery(), loaded);
}

export function useTrace(code: string, loaded: Loaded<Trace>) {
  return useLoaded(traceQuery(code), loaded);
}

/** Where and when a day's boxes can be fetched, with the room that is left. */
export function useCollections(dayId: string | undefined) {
  return useQuery({ ...collectionsQuery(dayId ?? ''), enabled: dayId !== undefined });
}
