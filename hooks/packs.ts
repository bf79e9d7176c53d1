import { queryOptions, useQuery } from '@tanstack/react-query';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import type {
  addPacksSchema,
  losePackSchema,
  packShortSchema,
  reweighPackSchema,
} from '#shared/contracts/packs-schema.ts';
import { addPacks, fillOrders, getPackingDay, losePack, packShort, reweighPack } from '#shared/contracts/packs.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function packingDayQuery(dayId: string) {
  return queryOptions({
    queryKey: ['packing-days', dayId],
    queryFn: ({ signal }) => call(getPackingDay, { params: { dayId }, signal }),
    staleTime: STALE.stock,
  });
}

export function usePackingDay(dayId: string) {
  return useQuery(packingDayQuery(dayId));
}

export function useAddPacks() {
  return useFarmMutation((input: CallInput<typeof addPacksSchema>) => call(addPacks, input));
}

export function useReweighPack() {
  return useFarmMutation((input: CallInput<typeof reweighPackSchema>) => call(reweighPack, input));
}

export function useLosePack() {
  return useFarmMutation((input: CallInput<typeof losePackSchema>) => call(losePack, input));
}

export function useFillOrders() {
  return useFarmMutation((dayId: string) => call(fillOrders, { params: { dayId } }));
}

export function usePackShort() {
  return useFarmMutation((input: CallInput<typeof packShortSchema>) => call(packShort, input));
}
