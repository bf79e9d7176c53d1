import { queryOptions, useQuery } from '@tanstack/react-query';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import { addAnimal, editAnimal, listAnimals, recordMedicine } from '#shared/contracts/herd.ts';
import type { editAnimalSchema, recordMedicineSchema } from '#shared/contracts/herd-schema.ts';
import type { NewAnimal } from '#shared/contracts/herd.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

export function animalsQuery() {
  return queryOptions({
    queryKey: ['animals'],
    queryFn: ({ signal }) => call(listAnimals, { signal }),
    staleTime: STALE.office,
  });
}

export function useAnimals() {
  return useQuery(animalsQuery());
}

export function useAddAnimal() {
  return useFarmMutation((body: NewAnimal) => call(addAnimal, { body }));
}

export function useEditAnimal() {
  return useFarmMutation((input: CallInput<typeof editAnimalSchema>) => call(editAnimal, input));
}

export function useRecordMedicine() {
  return useFarmMutation((input: CallInput<typeof recordMedicineSchema>) => call(recordMedicine, input));
}
