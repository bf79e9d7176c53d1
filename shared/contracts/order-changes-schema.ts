import { z } from 'zod';
import { Count, Id, Version } from './fields-schema.ts';
import { BasketLines, Order, OrderToken } from './orders-schema.ts';

/** Another place or time of the same cutting day. The same one again changes nothing. */
export const changeSlotSchema = {
  params: OrderToken,
  body: z.strictObject({ slotId: Id }),
  answer: Order,
};

/** So many boxes of a line for another variant of the same box. */
export const swapBoxSchema = {
  params: OrderToken,
  body: z.strictObject({ lineId: Id, offerId: Id, quantity: Count }),
  answer: Order,
};

/** Answers with the page on which the difference is paid. `version` is the order's, as the customer saw it. */
export const addToOrderSchema = {
  params: OrderToken,
  body: z.strictObject({ version: Version, lines: BasketLines }),
  answer: Order,
};

/** Gives up an addition that is not paid. */
export const leaveAdditionSchema = { params: OrderToken, answer: Order };

/** The rest of a packed deposit order that its card could not be charged with, and how the browser can pay it. */
export const getBalanceSchema = {
  params: OrderToken,
  answer: z.strictObject({
    orderNo: z.int(),
    amountPence: z.int(),
    hasCard: z.boolean(),
    publishableKey: z.string(),
    scriptUrl: z.string(),
  }),
};
export const startBalanceSchema = {
  params: OrderToken,
  answer: z.strictObject({ clientSecret: z.string(), methodId: z.string() }),
};
export const openBalancePageSchema = { params: OrderToken, answer: z.strictObject({ paymentUrl: z.string() }) };
