import { z } from 'zod';
import { Specification } from '#shared/engine/figures/specification.ts';
import { Day, Id, Instant, Line, Side } from './fields-schema.ts';

const DayState = z.enum(['planned', 'open', 'closed']);

/** One edition of a cutting specification, and the cutting days that keep it. */
export const SpecificationEdition = z.strictObject({
  id: Id,
  name: z.string(),
  edition: z.int(),
  /** How it came about: written in the editor, copied, brought back to the shipped figures, or learned from weights. */
  origin: z.enum(['written', 'copied', 'restored', 'learned']),
  /** The shipped specification that it descends from; null when it descends from none. */
  shippedId: z.string().nullable(),
  /** No longer offered for new cutting days; those that have it keep it. */
  isRetired: z.boolean(),
  createdAt: Instant,
  days: z.array(z.strictObject({ id: Id, day: Day, state: DayState })),
});
export type SpecificationEdition = z.infer<typeof SpecificationEdition>;

const SpecificationId = z.strictObject({ specificationId: Id });

/** By name, the newest edition of each first. */
export const listSpecificationsSchema = {
  answer: z.strictObject({
    specifications: z.array(SpecificationEdition),
    shipped: z.array(z.strictObject({ id: z.string(), name: z.string(), source: z.string() })),
  }),
};
export const getSpecificationSchema = {
  params: SpecificationId,
  answer: z.strictObject({
    ...SpecificationEdition.shape,
    latestEdition: z.int(),
    latestId: Id,
    body: Specification,
  }),
};

export const SpecificationDraft = z.strictObject({ name: Line, basedOnEdition: z.int().min(1), body: Specification });
export type SpecificationDraft = z.infer<typeof SpecificationDraft>;
/** Saves a new edition; the engine refuses what does not add up to 100 %. */
export const saveSpecificationSchema = { body: SpecificationDraft, answer: SpecificationEdition };

export const SpecificationCopy = z.strictObject({
  name: Line,
  /** The id of an edition, or of a shipped specification. */
  fromId: z.string().min(1).max(60),
});
export type SpecificationCopy = z.infer<typeof SpecificationCopy>;
export const copySpecificationSchema = { body: SpecificationCopy, answer: SpecificationEdition };

export const restoreSpecificationSchema = {
  params: SpecificationId,
  body: z.strictObject({ basedOnEdition: z.int().min(1) }),
  answer: SpecificationEdition,
};
export const retireSpecificationSchema = {
  params: SpecificationId,
  body: z.strictObject({ isRetired: z.boolean() }),
  answer: SpecificationEdition,
};

/** Foreseen and weighed of one cut, trim, bone or fat, in grams, over what was weighed of it. */
export const CutPair = z.strictObject({
  id: z.string(),
  name: z.string(),
  lines: z.int(),
  estimatedGrams: z.int(),
  weighedGrams: z.int(),
});
export type CutPair = z.infer<typeof CutPair>;

export const DayComparison = z.strictObject({
  dayId: Id,
  day: Day,
  state: DayState,
  specificationId: Id,
  specificationName: z.string(),
  carcases: z.array(z.strictObject({ id: Id, earTag: z.string(), title: z.string(), cuts: z.array(CutPair) })),
  pooled: z.array(CutPair),
});
export type DayComparison = z.infer<typeof DayComparison>;
export const compareDaySchema = { params: z.strictObject({ dayId: Id }), answer: DayComparison };

/** As the engine's row of a correction: shares are parts per 100,000 of what was foreseen. */
export const CorrectionRow = z.strictObject({
  path: z.string(),
  name: z.string(),
  sides: z.int(),
  priorSides: z.int(),
  estimatedGrams: z.int(),
  weighedGrams: z.int(),
  seenPpht: z.int(),
  proposedPpht: z.int(),
  isFromFewSides: z.boolean(),
});
export type CorrectionRow = z.infer<typeof CorrectionRow>;

export const CorrectionDecision = z.enum(['accepted', 'rejected']);

export const CorrectionProposal = z.strictObject({
  /** The newest edition, from which it is worked out. */
  specificationId: Id,
  name: z.string(),
  edition: z.int(),
  /** Names exactly this proposal; null while there is nothing to decide. */
  key: z.string().nullable(),
  /** Sides of closed cutting days that nothing was decided on yet. */
  sides: z.array(z.strictObject({ carcaseId: Id, side: Side, earTag: z.string(), day: Day })),
  /** Carcases that can teach nothing, each with the reason. */
  skipped: z.array(z.strictObject({ earTag: z.string(), day: Day, reason: z.string() })),
  /** What each cut foresaw and weighed over those sides. */
  cuts: z.array(CutPair),
  caution: z.string().nullable(),
  rows: z.array(CorrectionRow),
  changes: z.array(
    z.strictObject({
      node: z.string(),
      name: z.string(),
      fromPpht: z.int().nullable(),
      toPpht: z.int().nullable(),
    }),
  ),
  decided: z.array(
    z.strictObject({
      id: Id,
      decision: CorrectionDecision,
      decidedAt: Instant,
      by: z.string(),
      sides: z.int(),
      basedOnEdition: z.int(),
      resultEdition: z.int().nullable(),
    }),
  ),
});
export type CorrectionProposal = z.infer<typeof CorrectionProposal>;
export const getCorrectionSchema = { params: SpecificationId, answer: CorrectionProposal };
export const decideCorrectionSchema = {
  params: SpecificationId,
  body: z.strictObject({ key: z.string().max(100), decision: CorrectionDecision }),
  answer: z.strictObject({ decision: CorrectionDecision, resultId: Id.nullable(), resultEdition: z.int().nullable() }),
};
