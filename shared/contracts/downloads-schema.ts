import { z } from 'zod';
import { Id } from './fields-schema.ts';
import { OrderToken } from './orders-schema.ts';

const File = z.string();
export const getOrderCalendarSchema = {
  params: z.strictObject({ token: z.string().regex(/^[A-Za-z0-9_-]{20,64}$/) }),
  answer: File,
};
export const getReceiptSchema = { params: OrderToken, answer: File };
export const getAllocationModelSchema = { params: z.strictObject({ allocationId: Id }), answer: File };
