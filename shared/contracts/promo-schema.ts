import { z } from 'zod';
import { Day, Email, Id, Instant, Pence, PromoText } from './fields-schema.ts';
import { BasketLines } from './orders-schema.ts';

/** What a code would take off this basket. It is taken for good with the order. */
export const checkPromoSchema = {
  body: z.strictObject({ code: PromoText, dayId: Id, lines: BasketLines, email: Email.optional() }),
  answer: z.strictObject({ code: z.string(), discountPence: z.int() }),
};

export const PromoCode = z.strictObject({
  id: Id,
  code: z.string(),
  percent: z.int().nullable(),
  amountPence: z.int().nullable(),
  minimumPence: z.int(),
  lastDay: Day.nullable(),
  usageLimit: z.int().nullable(),
  isOncePerCustomer: z.boolean(),
  uses: z.int(),
  closedAt: Instant.nullable(),
});
export type PromoCode = z.infer<typeof PromoCode>;

export const NewPromoCode = z.strictObject({
  code: PromoText,
  percent: z.int('Give whole per cent.').min(1, 'At least 1 %.').max(90, 'At most 90 %.').nullable(),
  amountPence: Pence.min(1, 'The amount must be above zero.').nullable(),
  minimumPence: Pence,
  lastDay: Day.nullable(),
  usageLimit: z.int('Give a whole number.').min(1, 'At least one.').max(100_000, 'This is too many.').nullable(),
  isOncePerCustomer: z.boolean(),
});
export type NewPromoCode = z.infer<typeof NewPromoCode>;

export const listPromoCodesSchema = { answer: z.strictObject({ codes: z.array(PromoCode) }) };
export const makePromoCodeSchema = { body: NewPromoCode, answer: PromoCode };
/** Orders that have it keep it; nobody else gets it any more. */
export const closePromoCodeSchema = { params: z.strictObject({ promoId: Id }), answer: PromoCode };
