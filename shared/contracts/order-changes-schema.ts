import { z } from 'zod';
import { Id } from './fields-schema.ts';
import { Order, OrderToken } from './orders-schema.ts';

/** Another place or time of the same cutting day. The same one again changes nothing. */
export const changeSlotSchema = {
  params: OrderToken,
  body: z.strictObject({ slotId: Id }),
  answer: Order,
};
