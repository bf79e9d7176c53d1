import { queryOptions, useQuery } from '@tanstack/react-query';
import type {
  bookCarcasesSchema,
  chooseSpecificationSchema,
  closeCuttingDaySchema,
  enterKillSheetSchema,
  enterWeightsSchema,
  NewCuttingDay,
} from '#shared/contracts/carcases-schema.ts';
import {
  addCuttingDay,
  bookCarcases,
  chooseSpecification,
  closeCuttingDay,
  enterKillSheet,
  enterWeights,
  getCarcase,
  getCuttingDay,
  listCollectionPoints,
  listCuttingDays,
} from '#shared/contracts/carcases.ts';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function cuttingDaysQuery() {
  return queryOptions({
    queryKey: ['cutting-days'],
    queryFn: ({ signal }) => call(listCuttingDays, { signal }),
    staleTime: STALE.office,
  });
}

export function cuttingDayQuery(dayId: string) {
  return queryOptions({
    queryKey: ['cutting-days', dayId],
    queryFn: ({ signal }) => call(getCuttingDay, { params: { dayId }, signal }),
    staleTime: STALE.office,
  });
}

export function carcaseQuery(carcaseId: string) {
  return queryOptions({
    queryKey: ['carcases', carcaseId],
    queryFn: ({ signal }) => call(getCarcase, { params: { carcaseId }, signal }),
    staleTime: STALE.office,
  });
}

export function collectionPointsQuery() {
  return queryOptions({
    queryKey: ['collection-points'],
    queryFn: ({ signal }) => call(listCollectionPoints, { signal }),
    staleTime: STALE.office,
  });
}

export function useCuttingDays() {
  return useQuery(cuttingDaysQuery());
}

export function useCuttingDay(dayId: string) {
  return useQuery(cuttingDayQuery(dayId));
}

export function useCarcase(carcaseId: string) {
  return useQuery(carcaseQuery(carcaseId));
}

export function useCollectionPoints() {
  return useQuery(collectionPointsQuery());
}

export function useAddCuttingDay() {
  return useFarmMutation((body: NewCuttingDay) => call(addCuttingDay, { body }));
}

export function useChooseSpecification() {
  return useFarmMutation((input: CallInput<typeof chooseSpecificationSchema>) => call(chooseSpecification, input));
}

export function useCloseCuttingDay() {
  return useFarmMutation((input: CallInput<typeof closeCuttingDaySchema>) => call(closeCuttingDay, input));
}

export function useBookCarcases() {
  return useFarmMutation((input: CallInput<typeof bookCarcasesSchema>) => call(bookCarcases, input));
}

export function useEnterKillSheet() {
  return useFarmMutation((input: CallInput<typeof enterKillSheetSchema>) => call(enterKillSheet, input));
}

export function useEnterWeights() {
  return useFarmMutation((input: CallInput<typeof enterWeightsSchema>) => call(enterWeights, input));
}
