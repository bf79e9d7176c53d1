import { queryOptions, useQuery } from '@tanstack/react-query';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import type { addSwapSchema, editBoxKindSchema, Settings } from '#shared/contracts/office-schema.ts';
import { addSwap, editBoxKind, editSettings, getSettings, getToday, listBoxKinds } from '#shared/contracts/office.ts';
import { call } from './api.ts';
import { loadFarm } from './farm.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function todayQuery() {
  return queryOptions({
    queryKey: ['today'],
    queryFn: ({ signal }) => call(getToday, { signal }),
    staleTime: STALE.stock,
  });
}

export function boxKindsQuery() {
  return queryOptions({
    queryKey: ['box-kinds'],
    queryFn: ({ signal }) => call(listBoxKinds, { signal }),
    staleTime: STALE.office,
  });
}

export function settingsQuery() {
  return queryOptions({
    queryKey: ['settings'],
    queryFn: ({ signal }) => call(getSettings, { signal }),
    staleTime: STALE.office,
  });
}

/** The farm's short name for the head of the page; the app's own until it is known. */
export function useFarmName(): string {
  const farm = useQuery({ queryKey: ['farm'], queryFn: loadFarm, staleTime: Infinity });
  return farm.data?.name ?? 'Wholeside';
}

export function useToday() {
  return useQuery(todayQuery());
}

export function useBoxKinds() {
  return useQuery(boxKindsQuery());
}

export function useSettings() {
  return useQuery(settingsQuery());
}

export function useEditBoxKind() {
  return useFarmMutation((input: CallInput<typeof editBoxKindSchema>) => call(editBoxKind, input));
}

export function useEditSettings() {
  return useFarmMutation((body: Settings) => call(editSettings, { body }));
}

export function useAddSwap() {
  return useFarmMutation((input: CallInput<typeof addSwapSchema>) => call(addSwap, input));
}
