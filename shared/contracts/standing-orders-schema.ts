import { z } from 'zod';
import { STANDING_STATES, STANDING_WEEKS, TURN_STATES } from '#shared/domain/standing-order.ts';
import { Day, Id, Instant, Line, Phone } from './fields-schema.ts';
import { OrderToken } from './orders-schema.ts';

const Weeks = z.literal(STANDING_WEEKS, 'Choose every 4, 6, 8 or 12 weeks.');

/** Begins with a first order, paid on the payment company's page; the card is kept for the next ones. */
export const StartStanding = z.strictObject({
  basketKey: Id,
  slug: z.string().max(60),
  quantity: z.int().min(1).max(9, 'Nine boxes are the most.'),
  everyWeeks: Weeks,
  dayId: Id,
  slotId: Id,
  name: Line,
  phone: Phone,
  isAgreed: z.literal(true, 'Agree to the terms, or order without a standing order.'),
});
export type StartStanding = z.infer<typeof StartStanding>;

/** One box that is kept; until `chargeAt` it can be skipped. */
export const StandingTurn = z.strictObject({
  token: z.string(),
  orderToken: z.string(),
  state: z.enum(TURN_STATES),
  box: z.string(),
  quantity: z.int(),
  day: Day,
  totalPence: z.int(),
  chargeAt: Instant,
  /** The last moment for paying by hand, where the card was refused. */
  cutOffAt: Instant,
  canSkip: z.boolean(),
});
export type StandingTurn = z.infer<typeof StandingTurn>;

export const StandingOrder = z.strictObject({
  id: Id,
  box: z.string(),
  quantity: z.int(),
  everyWeeks: z.int(),
  pointName: z.string(),
  time: z.string(),
  state: z.enum(STANDING_STATES),
  nextFrom: Day,
  turn: StandingTurn.nullable(),
});
export type StandingOrder = z.infer<typeof StandingOrder>;

export const MyStanding = z.strictObject({
  terms: z.string(),
  reminderDays: z.strictObject({ first: z.int(), second: z.int() }),
  standing: z.array(StandingOrder),
});
export type MyStanding = z.infer<typeof MyStanding>;

export const listMyStandingSchema = { answer: MyStanding };
export const startStandingSchema = {
  body: StartStanding,
  answer: z.strictObject({ token: z.string(), paymentUrl: z.string().nullable() }),
};
export const setStandingStateSchema = {
  params: z.strictObject({ standingId: Id }),
  body: z.strictObject({ state: z.enum(['active', 'paused', 'ended']) }),
  answer: MyStanding,
};
export const getTurnSchema = { params: OrderToken, answer: StandingTurn };
export const skipTurnSchema = { params: OrderToken, answer: StandingTurn };
export const payTurnSchema = { params: OrderToken, answer: z.strictObject({ paymentUrl: z.string().nullable() }) };
