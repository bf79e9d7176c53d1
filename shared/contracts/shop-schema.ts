import { z } from 'zod';
import { Day, Id, Instant, Rail } from './fields-schema.ts';

export const CuttingDaySummary = z.strictObject({
  id: Id,
  day: Day,
  cutOffAt: Instant,
  /** False once the cut-off has passed: nothing of this day can be ordered any more. */
  isInTime: z.boolean(),
  carcaseCount: z.int(),
  hungDays: z.int(),
  collectionDays: z.array(Day),
  productGrams: z.int(),
  soldGrams: z.int(),
  rail: Rail,
});
export type CuttingDaySummary = z.infer<typeof CuttingDaySummary>;

/** One product of one cutting day. `free` is what can be bought now. */
export const DayOffer = z.strictObject({
  offerId: Id,
  dayId: Id,
  day: Day,
  free: z.int(),
  held: z.int(),
});
export type DayOffer = z.infer<typeof DayOffer>;

export const BoxCard = z.strictObject({
  slug: z.string(),
  name: z.string(),
  summary: z.string(),
  guaranteedGrams: z.int(),
  pricePence: z.int(),
  tenthPencePerKg: z.int(),
  offers: z.array(DayOffer),
  /** The same box at the same price with another recipe. */
  swaps: z.array(
    z.strictObject({ slug: z.string(), name: z.string(), summary: z.string(), offers: z.array(DayOffer) }),
  ),
});
export type BoxCard = z.infer<typeof BoxCard>;

export const ShopHome = z.strictObject({
  farm: z.strictObject({
    name: z.string(),
    businessName: z.string(),
    addressLines: z.array(z.string()),
    email: z.string(),
    phone: z.string(),
    story: z.string(),
  }),
  days: z.array(CuttingDaySummary),
  boxes: z.array(BoxCard),
  butchers: z.array(z.strictObject({ businessName: z.string(), town: z.string() })),
});
export type ShopHome = z.infer<typeof ShopHome>;

export const Box = z.strictObject({
  ...BoxCard.shape,
  lines: z.array(
    z.strictObject({
      name: z.string(),
      minGrams: z.int(),
      maxGrams: z.int(),
      cuts: z.array(z.string()),
      cooking: z.string(),
    }),
  ),
  servings: z.int(),
  freezerLitres: z.int(),
  /** How much of one side this many boxes take: the box's own scale. */
  rail: z.strictObject({ boxes: z.int(), rail: Rail }),
  days: z.array(CuttingDaySummary),
});
export type Box = z.infer<typeof Box>;

export const Cooking = z.enum(['grill', 'roast', 'pot-roast', 'braise', 'mince']);
export type Cooking = z.infer<typeof Cooking>;

export const LooseCut = z.strictObject({
  id: z.string(),
  name: z.string(),
  description: z.string(),
  cooking: Cooking,
  tenthPencePerKg: z.int(),
  /** The pack weighs at most this; the difference is refunded after weighing. */
  upperGrams: z.int(),
  pricePence: z.int(),
  offers: z.array(DayOffer),
});
export type LooseCut = z.infer<typeof LooseCut>;

export const CollectionSlot = z.strictObject({ id: Id, startsAt: Instant, endsAt: Instant, free: z.int() });
export const CollectionPoint = z.strictObject({
  id: Id,
  name: z.string(),
  addressLines: z.array(z.string()),
  directions: z.string(),
  slots: z.array(CollectionSlot),
});
export type CollectionPoint = z.infer<typeof CollectionPoint>;

export const getShopHomeSchema = { answer: ShopHome };
export const getBoxSchema = { params: z.strictObject({ slug: z.string().max(60) }), answer: Box };
export const listCutsSchema = { answer: z.strictObject({ days: z.array(CuttingDaySummary), cuts: z.array(LooseCut) }) };
export const listCollectionsSchema = {
  params: z.strictObject({ dayId: Id }),
  /** `hasVan`: somewhere the farm delivers; where, its postcode says. */
  answer: z.strictObject({ points: z.array(CollectionPoint), hasVan: z.boolean() }),
};

/** From a pack's code to the beast it came from. Nothing private. */
export const Trace = z.strictObject({
  code: z.string(),
  cut: z.string(),
  grams: z.int(),
  packedOn: Day,
  useBy: Day,
  earTag: z.string(),
  breed: z.string(),
  ageMonths: z.int(),
  killDay: Day,
  hungDays: z.int(),
  bornIn: z.string(),
  rearedIn: z.string(),
  slaughteredIn: z.string(),
  cutIn: z.string(),
});
export type Trace = z.infer<typeof Trace>;
export const getTraceSchema = { params: z.strictObject({ code: z.string().min(4).max(40) }), answer: Trace };
