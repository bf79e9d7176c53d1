import { z } from 'zod';
import { Count, Id } from './fields-schema.ts';
import { Order, OrderToken } from './orders-schema.ts';

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
