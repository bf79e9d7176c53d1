import { z } from 'zod';
import { Day, Id, Line, Pence, Rate } from './fields-schema.ts';

/** Tenths of a penny per kg on or off the base. */
const Adjustment = z
  .int('Give pounds per kilogram, such as -0.10.')
  .min(-50_000, 'This is too much off.')
  .max(50_000, 'This is too much.');
const ClassName = z.string().trim().min(1, 'This is needed.').max(3, 'At most three characters.');

const GridFields = {
  name: Line,
  source: z.string().trim().min(1, 'Say where these prices come from.').max(300, 'At most 300 characters.'),
  /** In force from this day until a later one. */
  validFrom: Day,
  /** Price of the headline class. */
  baseTenthPencePerKg: Rate,
  conformations: z.array(ClassName).min(1).max(15),
  /** One row a fat class, one adjustment a conformation, in their order. */
  rows: z
    .array(z.strictObject({ fatClass: ClassName, adjustments: z.array(Adjustment).min(1).max(15) }))
    .min(1)
    .max(15),
  /** Applies from this cold weight upwards; of several, the heaviest that is reached. */
  weightSteps: z.array(z.strictObject({ fromGrams: z.int().min(50_000).max(700_000), adjustment: Adjustment })).max(10),
  /** Applies beyond this age; of several, the highest that is passed. */
  ageSteps: z.array(z.strictObject({ overMonths: z.int().min(1).max(240), adjustment: Adjustment })).max(10),
  /** Taken off per head. */
  levyPence: Pence,
  haulagePence: Pence,
  deductionsPence: Pence,
};

/** The edition that the editor has read stands in it: a second editor is told. */
export const PriceGridEdit = z
  .strictObject({ edition: z.int().min(0), ...GridFields })
  .superRefine(({ conformations, rows }, context) => {
    rows.forEach(({ adjustments }, at) => {
      if (adjustments.length === conformations.length) return;
      const message = 'Every class of conformation needs its price in this row.';
      context.addIssue({ code: 'custom', path: ['rows', at, 'adjustments'], message });
    });
    const names = rows.map(({ fatClass }) => fatClass);
    if (new Set(names).size < names.length || new Set(conformations).size < conformations.length) {
      context.addIssue({ code: 'custom', path: ['rows'], message: 'Each class may stand in the grid once.' });
    }
  });
export type PriceGridEdit = z.infer<typeof PriceGridEdit>;

/** Edition 0 is what holds until the farm has saved its own. */
export const PriceGrid = z.strictObject({ edition: z.int().min(0), ...GridFields });
export type PriceGrid = z.infer<typeof PriceGrid>;

export const getPriceGridsSchema = {
  answer: z.strictObject({
    /** The edition that an edit has to name. */
    latestEdition: z.int(),
    /** In force today. */
    current: PriceGrid,
    /** All editions, the newest first. */
    editions: z.array(
      z.strictObject({ edition: z.int(), name: z.string(), validFrom: Day, baseTenthPencePerKg: z.int() }),
    ),
  }),
};
/** Refused with STATE_CHANGED when another edition was saved since. */
export const savePriceGridSchema = { body: PriceGridEdit, answer: PriceGrid };

export const Costs = z.strictObject({
  killPence: z.int(),
  inspectionPence: z.int(),
  levyPence: z.int(),
  haulagePence: z.int(),
  butcheryPence: z.int(),
  packingPence: z.int(),
  deliveryPence: z.int(),
  cardFeesPence: z.int(),
  refundsPence: z.int(),
});
export type Costs = z.infer<typeof Costs>;

/** Contribution = income - costs; gain = contribution - deadweight value; each also per kg of cold deadweight. */
export const Margin = z.strictObject({
  incomePence: z.int(),
  costPence: z.int(),
  contributionPence: z.int(),
  deadweightPence: z.int(),
  gainPence: z.int(),
  contributionPerKg: z.int(),
  deadweightPerKg: z.int(),
  gainPerKg: z.int(),
  coldGrams: z.int(),
  costs: Costs,
});
export type Margin = z.infer<typeof Margin>;

/** `id` is null for what belongs to none: sides sold whole are no cut, loose packs no box. */
export const MarginRow = z.strictObject({ id: z.string().nullable(), name: z.string(), margin: Margin });
export type MarginRow = z.infer<typeof MarginRow>;

/** What one carcase would bring deadweight, step by step; rates in tenths of a penny per kg. */
export const Deadweight = z.strictObject({
  coldGrams: z.int(),
  conformation: z.string(),
  fatClass: z.string(),
  /** False while there is no kill sheet: the reference class of the specification stands in. */
  isGraded: z.boolean(),
  baseTenthPencePerKg: z.int(),
  classAdjustment: z.int(),
  weightAdjustment: z.int(),
  ageAdjustment: z.int(),
  tenthPencePerKg: z.int(),
  grossPence: z.int(),
  levyPence: z.int(),
  haulagePence: z.int(),
  deductionsPence: z.int(),
  netPence: z.int(),
});
export type Deadweight = z.infer<typeof Deadweight>;

export const CarcaseMargin = z.strictObject({
  carcaseId: Id,
  earTag: z.string(),
  title: z.string(),
  source: z.enum(['estimated', 'weighed']),
  margin: Margin,
  /** Null where the grid has no price for its class. */
  deadweight: Deadweight.nullable(),
  /** Why there is no deadweight value. */
  problem: z.string().nullable(),
});
export type CarcaseMargin = z.infer<typeof CarcaseMargin>;

/** A joint cost shared by net realisable value; the shares sum to it. */
export const JointShare = z.strictObject({
  id: z.string(),
  name: z.string(),
  netRealisablePence: z.int(),
  sharePence: z.int(),
  marginPence: z.int(),
});
export type JointShare = z.infer<typeof JointShare>;

export const BoxPrices = z.strictObject({
  boxKindId: Id,
  name: z.string(),
  boxes: z.int(),
  pricePence: z.int(),
  /** Of one box: its share of the joint cost, and packaging. */
  jointSharePence: z.int(),
  directPence: z.int(),
  breakEvenPence: z.int(),
  /** Below this, selling the carcases deadweight would have been better. */
  deadweightPricePence: z.int().nullable(),
});
export type BoxPrices = z.infer<typeof BoxPrices>;

/** `planned`: as if all that the plan offers were sold. `sold`: what was paid and refunded so far. */
export const Basis = z.enum(['planned', 'sold']);
export type Basis = z.infer<typeof Basis>;

export const DayMargin = z.strictObject({
  dayId: Id,
  day: Day,
  basis: Basis,
  /** What the ledger rests on, in words. */
  restsOn: z.string(),
  grid: z.strictObject({ edition: z.int(), name: z.string(), source: z.string(), validFrom: Day }),
  cardFee: z.strictObject({ ratePpht: z.int(), fixedPence: z.int() }),
  whole: Margin,
  carcases: z.array(CarcaseMargin),
  byBox: z.array(MarginRow),
  byCut: z.array(MarginRow),
  byChannel: z.array(MarginRow),
  joint: z.strictObject({ totalPence: z.int(), shares: z.array(JointShare) }),
  boxes: z.array(BoxPrices),
});
export type DayMargin = z.infer<typeof DayMargin>;

export const getDayMarginSchema = {
  params: z.strictObject({ dayId: Id }),
  query: z.strictObject({ basis: Basis }),
  /** Null while nothing has been planned. */
  answer: z.strictObject({ margin: DayMargin.nullable() }),
};
