import { z } from 'zod';
import { Count, Day, Id, Version } from './fields-schema.ts';

/** Another box of the same family that the plan has to spare. */
export const SpareBox = z.strictObject({ offerId: Id, name: z.string(), free: z.int() });

/** An order that would be hit, the last to have come first, and how it may be settled. */
export const HitOrder = z.strictObject({
  orderId: Id,
  orderNo: z.int(),
  name: z.string(),
  version: Version,
  lineId: Id,
  /** How many of its line would have to be settled. */
  quantity: z.int(),
  /** What giving that part back would come to; the whole order's payments when nothing else is in it. */
  refundPence: z.int(),
  isWholeOrder: z.boolean(),
  /** Boxes that could go in instead, at the same price. */
  swaps: z.array(SpareBox),
  /** Why this order cannot be settled from here; null when it can. */
  blocked: z.string().nullable(),
});
export type HitOrder = z.infer<typeof HitOrder>;

export const ShortProduct = z.strictObject({
  dayId: Id,
  day: Day,
  name: z.string(),
  unit: z.enum(['boxes', 'packs']),
  taken: z.int(),
  /** What the newest plan makes. */
  made: z.int(),
  held: z.int(),
  orders: z.array(HitOrder),
});
export type ShortProduct = z.infer<typeof ShortProduct>;

export const listShortfallsSchema = { answer: z.strictObject({ products: z.array(ShortProduct) }) };

const HitLine = { orderId: Id, version: Version, lineId: Id, quantity: Count };
/** Gives the money of this part of an order back and takes it out of what is sold. */
export const refundShortfallSchema = { body: z.strictObject(HitLine), ...listShortfallsSchema };
export const swapShortfallSchema = { body: z.strictObject({ ...HitLine, offerId: Id }), ...listShortfallsSchema };
