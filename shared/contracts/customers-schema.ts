import { z } from 'zod';

/** How the farm keeps in touch with its customers. In force from the day on which it is saved. */
export const CustomerSettings = z.strictObject({
  /** Weeks after the last collected order until those who agreed are invited to order again. */
  inviteAfterWeeks: z.int('Give whole weeks.').min(1).max(52, 'A year is the longest.'),
  /** How long a box is kept for the next on the waiting list. */
  waitingHoldHours: z.int('Give whole hours.').min(1).max(72, 'Three days are the longest.'),
  /** Days before the charge of a standing order's box: two reminders, each with the way to skip it. */
  standingFirstReminderDays: z.int('Give whole days.').min(3).max(28),
  standingSecondReminderDays: z.int('Give whole days.').min(1).max(14),
  /** Hours before orders close at which the card is charged. */
  standingChargeHours: z.int('Give whole hours.').min(2).max(96),
  /** What customers agree to, with the way out of it. */
  standingTerms: z.string().trim().min(40, 'Say what is agreed, and how it ends.').max(2000),
});
export type CustomerSettings = z.infer<typeof CustomerSettings>;
export const getCustomerSettingsSchema = { answer: CustomerSettings };
export const editCustomerSettingsSchema = { body: CustomerSettings, answer: CustomerSettings };
