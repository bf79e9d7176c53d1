import { z } from 'zod';
import { Day, Instant, Note } from './fields-schema.ts';
import { OrderToken } from './orders-schema.ts';

export const FeedbackEdit = z.strictObject({
  stars: z.int('Choose one to five.').min(1, 'Choose one to five.').max(5, 'Choose one to five.'),
  words: Note,
});
export type FeedbackEdit = z.infer<typeof FeedbackEdit>;

/** `canGive`: the order has been handed over. */
export const Feedback = z.strictObject({
  canGive: z.boolean(),
  given: z.strictObject({ stars: z.int(), words: z.string(), changedAt: Instant }).nullable(),
});
export type Feedback = z.infer<typeof Feedback>;

export const getFeedbackSchema = { params: OrderToken, answer: Feedback };
export const giveFeedbackSchema = { params: OrderToken, body: FeedbackEdit, answer: Feedback };

export const GivenFeedback = z.strictObject({
  orderNo: z.int(),
  name: z.string(),
  day: Day,
  lines: z.array(z.string()),
  stars: z.int(),
  words: z.string(),
  changedAt: Instant,
});
export type GivenFeedback = z.infer<typeof GivenFeedback>;

/** For the farm's eyes alone. An order of several kinds of box counts for each of them. */
export const listFeedbackSchema = {
  answer: z.strictObject({
    boxes: z.array(z.strictObject({ name: z.string(), count: z.int(), averageTenths: z.int() })),
    feedback: z.array(GivenFeedback),
  }),
};
