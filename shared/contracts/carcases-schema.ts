import { z } from 'zod';
import { Day, Grams, Id, Instant, Rail, Side, Time, Version } from './fields-schema.ts';

export const CarcaseState = z.enum(['booked', 'killed', 'hanging', 'cut', 'sold through']);
export const CONFORMATIONS = ['E', 'U+', '-U', 'R', 'O+', '-O', 'P+', '-P'] as const;
export const FAT_CLASSES = ['1', '2', '3', '4L', '4H', '5L', '5H'] as const;
export const Conformation = z.enum(CONFORMATIONS, 'There is no such conformation class.');
export const FatClass = z.enum(FAT_CLASSES, 'There is no such fat class.');

export const CarcaseSummary = z.strictObject({
  id: Id,
  animalId: Id,
  earTag: z.string(),
  sex: z.string(),
  breed: z.string(),
  state: CarcaseState,
  killDay: Day,
  cuttingDayId: Id,
  day: Day,
  ageMonths: z.int(),
  isOverThirtyMonths: z.boolean(),
  hungDays: z.int(),
  conformation: z.string().nullable(),
  fatClass: z.string().nullable(),
  coldGrams: z.int(),
  /** Where the cold weight comes from: an estimate from live weight, or the kill sheet. */
  coldSource: z.enum(['estimated', 'weighed']),
  version: Version,
});
export type CarcaseSummary = z.infer<typeof CarcaseSummary>;

/** One node of the cutout, in the order in which it is read aloud: carcase, side, quarter, primal, lines. */
export const CutoutNode = z.strictObject({
  path: z.string(),
  parentPath: z.string().nullable(),
  level: z.enum(['carcase', 'side', 'quarter', 'primal', 'line']),
  kind: z.enum(['whole', 'cut', 'trim', 'bone', 'fat', 'loss']),
  name: z.string(),
  grams: z.int(),
  source: z.enum(['estimated', 'weighed']),
  /** What the specification had foreseen, shown beside a weighed figure. */
  estimatedGrams: z.int(),
  /** Node less the sum of its parts: what the scales disagree by. */
  weighingDifferenceGrams: z.int(),
});
export type CutoutNode = z.infer<typeof CutoutNode>;

export const Carcase = z.strictObject({
  ...CarcaseSummary.shape,
  liveGrams: z.int(),
  hotGrams: z.int().nullable(),
  /** Each side as the kill sheet has it, hot or cold as the whole; null where it does not say. */
  leftGrams: z.int().nullable(),
  rightGrams: z.int().nullable(),
  hungGrams: z.int(),
  hungSource: z.enum(['estimated', 'weighed']),
  /** False without both classes: the reference class of the specification stands in. */
  isGraded: z.boolean(),
  dressingSpec: z.string().nullable(),
  nodes: z.array(CutoutNode),
  /** Ways that this carcase may not be cut, each with its reason. */
  closedWays: z.array(z.strictObject({ choice: z.string(), way: z.string(), reason: z.string() })),
  /** Where the class lay outside the range of the published equations and was clamped. */
  clamps: z.array(z.string()),
  rails: z.array(z.strictObject({ side: Side, sideGrams: z.int(), rail: Rail, boneFatLossGrams: z.int() })),
});
export type Carcase = z.infer<typeof Carcase>;

export const CuttingDay = z.strictObject({
  id: Id,
  day: Day,
  cutOffAt: Instant,
  state: z.enum(['planned', 'open', 'closed']),
  specificationId: Id,
  specificationName: z.string(),
  figuresVersion: z.int(),
  version: Version,
  carcases: z.array(CarcaseSummary),
  coldGrams: z.int(),
  orders: z.int(),
});
export type CuttingDay = z.infer<typeof CuttingDay>;

export const NewCuttingDay = z.strictObject({
  day: Day,
  cutOffDay: Day,
  cutOffTime: Time,
  specificationId: Id,
  collections: z
    .array(
      z.strictObject({
        pointId: Id,
        day: Day,
        from: Time,
        to: Time,
        slotMinutes: z.int().min(10).max(480),
        capacity: z.int('Give a whole number.').min(1, 'At least one order a slot.').max(500),
      }),
    )
    .max(20),
});
export type NewCuttingDay = z.infer<typeof NewCuttingDay>;

const DayId = z.strictObject({ dayId: Id });
const CarcaseId = z.strictObject({ carcaseId: Id });

export const listCuttingDaysSchema = { answer: z.strictObject({ days: z.array(CuttingDay) }) };
export const getCuttingDaySchema = { params: DayId, answer: CuttingDay };
export const addCuttingDaySchema = { body: NewCuttingDay, answer: CuttingDay };
export const closeCuttingDaySchema = { params: DayId, body: z.strictObject({ version: Version }), answer: CuttingDay };
export const listCollectionPointsSchema = {
  answer: z.strictObject({ points: z.array(z.strictObject({ id: Id, name: z.string() })) }),
};
export const bookCarcasesSchema = {
  body: z.strictObject({
    animalIds: z.array(Id).min(1, 'Choose at least one animal.').max(40),
    killDay: Day,
    cuttingDayId: Id,
  }),
  answer: z.strictObject({ carcases: z.array(CarcaseSummary) }),
};
export const getCarcaseSchema = { params: CarcaseId, answer: Carcase };

/** An abattoir that kills few cattle need not classify: both classes may be left out. */
export const KillSheet = z.strictObject({
  version: Version,
  killDay: Day,
  weighedAs: z.enum(['hot', 'cold']),
  grams: Grams,
  /** Each side, weighed as the whole was; both or neither. */
  leftGrams: Grams.nullish(),
  rightGrams: Grams.nullish(),
  conformation: Conformation.nullable(),
  fatClass: FatClass.nullable(),
  dressingSpec: z.string().trim().max(80).nullable(),
});
export type KillSheet = z.infer<typeof KillSheet>;
export const enterKillSheetSchema = { params: CarcaseId, body: KillSheet, answer: Carcase };

export const enterWeightsSchema = {
  params: CarcaseId,
  body: z.strictObject({
    version: Version,
    /** `live`, `hung` or a path of the cutout; `null` takes a measured weight back. */
    weights: z
      .array(
        z.strictObject({
          path: z.string().max(120),
          grams: z.int().min(0).max(1_500_000, 'This weight is too large.').nullable(),
        }),
      )
      .min(1)
      .max(400),
  }),
  answer: Carcase,
};

export const chooseSpecificationSchema = {
  params: DayId,
  body: z.strictObject({ version: Version, specificationId: Id }),
  answer: CuttingDay,
};
