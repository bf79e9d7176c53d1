import { z } from 'zod';
import { Allocation, Lock } from './allocation-schema.ts';
import { Id, Pence } from './fields-schema.ts';

const Rate = z.int().min(0).max(10_000_000);
const Boxes = z.int('Give a whole number.').min(0).max(2_000);
/** How long a question may take; what is best by then is the answer, shown with its gap. */
const TimeLimit = z
  .int('Give whole seconds.')
  .min(1, 'Give it a second at least.')
  .max(300, 'Five minutes is the most.');

/** What is different in a supposed day; what is not named stays as it is. */
export const WhatIf = z.strictObject({
  boxes: z
    .array(
      z.strictObject({ boxKindId: Id, pricePence: Pence.min(1, 'The price must be above zero.'), demandBoxes: Boxes }),
    )
    .max(100),
  cuts: z.array(z.strictObject({ cutId: z.string().max(60), tenthPencePerKg: Rate, looseDemandPacks: Boxes })).max(200),
  /** Days between kill and cutting for every carcase; null leaves each at its own. */
  hangingDays: z.int('Give whole days.').min(0).max(60, 'Sixty days is the most.').nullable(),
  /** Carcases more (like those of the day, in turn) or fewer (the last ones go). */
  moreCarcases: z.int('Give a whole number.').min(-100).max(100, 'A hundred is the most.'),
});
export type WhatIf = z.infer<typeof WhatIf>;

/** One of the two answers of a what-if. */
export const Outcome = z.strictObject({
  carcases: z.int(),
  coldGrams: z.int(),
  hungGrams: z.int(),
  contributionPence: z.int(),
  deadweightPence: z.int(),
  gainPence: z.int(),
  isProven: z.boolean(),
  gapBasisPoints: z.int(),
  boxes: z.array(z.strictObject({ id: Id, name: z.string(), count: z.int() })),
  cuts: z.array(
    z.strictObject({
      id: z.string(),
      name: z.string(),
      madeGrams: z.int(),
      loosePacks: z.int(),
      mincedGrams: z.int(),
      leftGrams: z.int(),
    }),
  ),
  shortfalls: z.array(z.string()),
  /** How each choice is cut, by carcase and side; a carcase that is only supposed has no tag. */
  ways: z.array(z.strictObject({ id: z.string(), place: z.string(), way: z.string() })),
});
export type Outcome = z.infer<typeof Outcome>;

export const PlanJob = z.strictObject({
  id: Id,
  state: z.enum(['working', 'done', 'cancelled', 'failed']),
  /** Which of its answers is being worked out, in words; null for a plan. */
  step: z.string().nullable(),
  progress: z
    .strictObject({
      phase: z.enum(['shortfall', 'contribution', 'packs']),
      /** Solver time since the question was asked. */
      milliseconds: z.int(),
      bestPence: z.int().nullable(),
      gapBasisPoints: z.int().nullable(),
    })
    .nullable(),
  /** What was kept as a draft. */
  allocation: Allocation.nullable(),
  /** Both answers of a what-if. */
  outcomes: z.strictObject({ before: Outcome, after: Outcome }).nullable(),
  /** Why it failed. */
  problem: z.string().nullable(),
});
export type PlanJob = z.infer<typeof PlanJob>;

const DayId = z.strictObject({ dayId: Id });
const Started = z.strictObject({ jobId: Id });
const Locks = z.array(Lock).max(400);
export const startPlanSchema = {
  params: DayId,
  body: z.strictObject({ locks: Locks, timeLimitSeconds: TimeLimit }),
  answer: Started,
};
export const startWhatIfSchema = {
  params: DayId,
  body: z.strictObject({ locks: Locks, timeLimitSeconds: TimeLimit, whatIf: WhatIf }),
  answer: Started,
};
const JobId = z.strictObject({ jobId: Id });
/** Answers when the job ends, and after a moment at the latest. */
export const getPlanJobSchema = { params: JobId, answer: PlanJob };
export const cancelPlanJobSchema = { params: JobId, answer: PlanJob };
