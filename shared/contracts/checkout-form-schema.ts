import { z } from 'zod';
import { Email, Line, Note, Phone, PostcodeText } from './fields-schema.ts';

/** What a person types at the checkout, by the rules of the contract; the screen makes an order's body of it. */
const person = {
  name: Line,
  email: Email,
  phone: Phone,
  note: Note,
  wantsNews: z.boolean(),
  pay: z.enum(['in full', 'deposit']),
};

/** Fields of the other way may hold anything: they are not sent. */
const CollectForm = z.object({
  way: z.literal('collect'),
  slotId: z.string().min(1, 'Choose a place and a time.'),
  ...{ street: z.string(), town: z.string(), postcode: z.string() },
  ...person,
});

const DeliverForm = z.object({
  way: z.literal('deliver'),
  slotId: z.string(),
  street: Line,
  town: z.string().trim().max(120, 'At most 120 characters.'),
  postcode: PostcodeText,
  ...person,
});

export const CheckoutForm = z.discriminatedUnion('way', [CollectForm, DeliverForm]);
export type CheckoutForm = Omit<z.infer<typeof DeliverForm>, 'way'> & { way: 'collect' | 'deliver' };
