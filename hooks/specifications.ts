import { queryOptions, useQuery } from '@tanstack/react-query';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import type {
  decideCorrectionSchema,
  restoreSpecificationSchema,
  retireSpecificationSchema,
} from '#shared/contracts/specifications-schema.ts';
import {
  compareDay,
  copySpecification,
  decideCorrection,
  getCorrection,
  getSpecification,
  listSpecifications,
  restoreSpecification,
  retireSpecification,
  saveSpecification,
  type SpecificationCopy,
  type SpecificationDraft,
} from '#shared/contracts/specifications.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function specificationsQuery() {
  return queryOptions({
    queryKey: ['specifications'],
    queryFn: ({ signal }) => call(listSpecifications, { signal }),
    staleTime: STALE.office,
  });
}

export function specificationQuery(specificationId: string) {
  return queryOptions({
    queryKey: ['specifications', specificationId],
    queryFn: ({ signal }) => call(getSpecification, { params: { specificationId }, signal }),
    staleTime: STALE.office,
  });
}

export function dayComparisonQuery(dayId: string) {
  return queryOptions({
    queryKey: ['day-comparison', dayId],
    queryFn: ({ signal }) => call(compareDay, { params: { dayId }, signal }),
    staleTime: STALE.office,
  });
}

export function correctionQuery(specificationId: string) {
  return queryOptions({
    queryKey: ['corrections', specificationId],
    queryFn: ({ signal }) => call(getCorrection, { params: { specificationId }, signal }),
    staleTime: STALE.office,
  });
}

export function useSpecifications() {
  return useQuery(specificationsQuery());
}

/** Waits until the edition is known. */
export function useSpecification(specificationId: string | undefined) {
  return useQuery({ ...specificationQuery(specificationId ?? ''), enabled: specificationId !== undefined });
}

export function useDayComparison(dayId: string) {
  return useQuery(dayComparisonQuery(dayId));
}

export function useCorrection(specificationId: string) {
  return useQuery(correctionQuery(specificationId));
}

export function useSaveSpecification() {
  return useFarmMutation((body: SpecificationDraft) => call(saveSpecification, { body }));
}

export function useCopySpecification() {
  return useFarmMutation((body: SpecificationCopy) => call(copySpecification, { body }));
}

export function useRestoreSpecification() {
  return useFarmMutation((input: CallInput<typeof restoreSpecificationSchema>) => call(restoreSpecification, input));
}

export function useRetireSpecification() {
  return useFarmMutation((input: CallInput<typeof retireSpecificationSchema>) => call(retireSpecification, input));
}

export function useDecideCorrection() {
  return useFarmMutation((input: CallInput<typeof decideCorrectionSchema>) => call(decideCorrection, input));
}
