import { z } from 'zod';
import { WAITING_STATES } from '#shared/domain/waiting-state.ts';
import { Day, Email, Id, Instant } from './fields-schema.ts';
import { OrderToken } from './orders-schema.ts';

export const JoinWaitingList = z.strictObject({
  /** Of the box. */
  slug: z.string().max(60),
  /** Left out: any day will do. */
  dayId: Id.optional(),
  email: Email,
});
export type JoinWaitingList = z.infer<typeof JoinWaitingList>;

export const WaitingPlace = z.strictObject({
  state: z.enum(WAITING_STATES),
  slug: z.string(),
  box: z.string(),
  /** The day that was asked for; null when any will do. */
  day: Day.nullable(),
  /** How many wait before. */
  ahead: z.int(),
  /** The box that is kept now, and until when. */
  kept: z.strictObject({ dayId: Id, day: Day, until: Instant }).nullable(),
});
export type WaitingPlace = z.infer<typeof WaitingPlace>;

export const joinWaitingListSchema = { body: JoinWaitingList, answer: z.strictObject({ sentTo: Email }) };
export const getWaitingPlaceSchema = { params: OrderToken, answer: WaitingPlace };
export const confirmWaitingPlaceSchema = { params: OrderToken, answer: WaitingPlace };
export const leaveWaitingPlaceSchema = { params: OrderToken, answer: WaitingPlace };

/** How many wait for each box, for the owner. */
export const listWaitingSchema = {
  answer: z.strictObject({
    boxes: z.array(z.strictObject({ name: z.string(), waiting: z.int(), kept: z.int(), taken: z.int() })),
  }),
};
