import { z } from 'zod';
import { Day, Email, Id, Instant, Line, Phone } from './fields-schema.ts';

/** What is remembered for the next checkout; no telephone number is needed to have an account. */
export const MyDetailsEdit = z.strictObject({ name: Line, phone: Phone.or(z.literal('')) });
export type MyDetailsEdit = z.infer<typeof MyDetailsEdit>;

export const MyDetails = z.strictObject({
  name: z.string(),
  email: z.string(),
  phone: z.string(),
  /** Marketing mail alone. `since`: when the last word on it was said; null when it was never asked. */
  news: z.strictObject({ isGiven: z.boolean(), since: Instant.nullable() }),
});
export type MyDetails = z.infer<typeof MyDetails>;

export const getMyDetailsSchema = { answer: MyDetails };
export const editMyDetailsSchema = { body: MyDetailsEdit, answer: MyDetails };
export const setMyNewsSchema = { body: z.strictObject({ isGiven: z.boolean() }), answer: MyDetails };

const Token = z.strictObject({ token: z.string().regex(/^[A-Za-z0-9_-]{20,64}$/) });

/** `email` with its middle left out: the mail may have been passed on. */
export const Subscription = z.strictObject({ email: z.string(), isSubscribed: z.boolean() });
export type Subscription = z.infer<typeof Subscription>;
export const getSubscriptionSchema = { params: Token, answer: Subscription };
export const unsubscribeSchema = { params: Token, answer: Subscription };

/** The lines of an order as they can be had now, for the first day that has the most of them. */
export const OrderAgain = z.strictObject({
  dayId: Id.nullable(),
  day: Day.nullable(),
  items: z.array(
    z.strictObject({
      kind: z.enum(['box', 'loose']),
      /** The slug of a box, the id of a cut. */
      productId: z.string(),
      name: z.string(),
      quantity: z.int().min(1),
    }),
  ),
  /** Names of what cannot be had on that day, or not so many of it. */
  gone: z.array(z.string()),
  fewer: z.array(z.strictObject({ name: z.string(), asked: z.int(), left: z.int() })),
});
export type OrderAgain = z.infer<typeof OrderAgain>;
export const getOrderAgainSchema = { params: Token, answer: OrderAgain };

export const getMyDataSchema = { answer: z.string() };
export const askClosingSchema = { answer: z.strictObject({ sentTo: Email }) };
export const closeAccountSchema = {
  body: Token,
  answer: z.strictObject({ isClosed: z.literal(true) }),
};
