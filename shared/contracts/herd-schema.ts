import { z } from 'zod';
import { Day, EarTag, Id, Line, Version } from './fields-schema.ts';

export const Sex = z.enum(['steer', 'heifer', 'young bull', 'cow']);
export type Sex = z.infer<typeof Sex>;

const LiveGrams = z
  .int('Give whole grams.')
  .min(100_000, 'A live weight is between 100 kg and 1,500 kg.')
  .max(1_500_000, 'A live weight is between 100 kg and 1,500 kg.');

export const NewAnimal = z.strictObject({
  earTag: EarTag,
  breed: Line,
  sex: Sex,
  born: Day,
  damEarTag: EarTag.nullable(),
  liveGrams: LiveGrams.nullable(),
});
export type NewAnimal = z.infer<typeof NewAnimal>;

export const Animal = z.strictObject({
  id: Id,
  earTag: z.string(),
  breed: z.string(),
  sex: Sex,
  born: Day,
  damEarTag: z.string().nullable(),
  liveGrams: z.int().nullable(),
  ageMonths: z.int(),
  version: Version,
  /** First day on which no medicine's withdrawal period is running; null when none is recorded. */
  withdrawalClearDay: Day.nullable(),
  medicines: z.array(z.strictObject({ id: Id, product: z.string(), givenOn: Day, withdrawalDays: z.int() })),
  carcase: z.strictObject({ id: Id, state: z.string(), killDay: Day, cuttingDayId: Id }).nullable(),
});
export type Animal = z.infer<typeof Animal>;

const AnimalId = z.strictObject({ animalId: Id });
export const listAnimalsSchema = { answer: z.strictObject({ animals: z.array(Animal) }) };
export const addAnimalSchema = { body: NewAnimal, answer: Animal };
export const editAnimalSchema = {
  params: AnimalId,
  body: z.strictObject({ ...NewAnimal.shape, version: Version }),
  answer: Animal,
};
export const recordMedicineSchema = {
  params: AnimalId,
  body: z.strictObject({ product: Line, givenOn: Day, withdrawalDays: z.int().min(0).max(365) }),
  answer: Animal,
};
