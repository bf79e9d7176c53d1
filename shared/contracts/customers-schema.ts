import { z } from 'zod';

/** How the farm keeps in touch with its customers. In force from the day on which it is saved. */
export const CustomerSettings = z.strictObject({
  /** Weeks after the last collected order until those who agreed are invited to order again. */
  inviteAfterWeeks: z.int('Give whole weeks.').min(1).max(52, 'A year is the longest.'),
  /** How long a box is kept for the next on the waiting list. */
  waitingHoldHours: z.int('Give whole hours.').min(1).max(72, 'Three days are the longest.'),
});
export type CustomerSettings = z.infer<typeof CustomerSettings>;
export const getCustomerSettingsSchema = { answer: CustomerSettings };
export const editCustomerSettingsSchema = { body: CustomerSettings, answer: CustomerSettings };
