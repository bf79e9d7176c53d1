import { z } from 'zod';
import { isDay } from '#shared/domain/day.ts';
import { formatPostcode, readPostcode } from '#shared/domain/delivery.ts';
import { hasValidCheckDigit, normaliseEarTag } from '#shared/domain/ear-tag.ts';
import { normaliseCode } from '#shared/domain/promo.ts';
import { issueWords } from './issue-words.ts';

// Every contract builds on this module, so that forms and server word a refusal alike.
z.config({ customError: issueWords });

/** The pieces that several contracts share, each with the sentence that a person will read beside the field. */

export const Id = z.uuid('This is not one of our numbers.');
export const Grams = z
  .int('Give whole grams.')
  .min(1, 'The weight must be above zero.')
  .max(2_000_000, 'This weight is too large.');
export const Pence = z.int('Give whole pence.').min(0).max(100_000_000, 'This amount is too large.');
export const Rate = z.int().min(1, 'The rate must be above zero.').max(10_000_000, 'This rate is too large.');
export const Count = z
  .int('Give a whole number.')
  .min(1, 'Take at least one.')
  .max(99, 'Ninety-nine is the most at once.');
export const Version = z.int().min(1);
export const Instant = z.iso.datetime();
export const Day = z.string().refine(isDay, 'Give a date that exists, as 2026-12-31.');
export const Time = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'Give a time as 14:30.');

// No control characters: a line break in a name or an address would end up in the headers of a mail.
const noControls = /^[^\p{Cc}]*$/u;
export const Line = z
  .string()
  .trim()
  .min(1, 'This is needed.')
  .max(120, 'At most 120 characters.')
  .regex(noControls, 'Use one line, without line breaks.');
export const Note = z.string().trim().max(500, 'At most 500 characters.');
export const Email = z
  .string()
  .trim()
  .max(254, 'This address is too long.')
  .regex(noControls, 'An e-mail address has no line breaks.')
  .pipe(z.email('Give an e-mail address such as name@example.com.'));
export const Phone = z
  .string()
  .trim()
  .max(30, 'This number is too long.')
  .regex(/^\+?[\d ()-]{7,30}$/, 'Give a telephone number, digits only.');

/** A code as people type it; kept in capitals. */
export const PromoText = z
  .string()
  .max(40, 'A code is shorter than this.')
  .transform(normaliseCode)
  .pipe(z.string().regex(/^[A-Z0-9]{3,20}$/, 'A code has three to twenty letters and figures.'));

/** With or without its space, in any letters; kept as `ZZ1 1AA`. */
export const PostcodeText = z
  .string()
  .max(20, 'A postcode is shorter than this.')
  .transform((text, context) => {
    const postcode = readPostcode(text);
    if (postcode) return formatPostcode(postcode);
    context.addIssue({ code: 'custom', message: 'Give a postcode such as ZZ1 1AA.' });
    return z.NEVER;
  });

/** Where the van brings an order. */
export const DeliveryAddress = z.strictObject({
  addressLines: z.array(Line).min(1, 'Give the house and the street.').max(4, 'At most four lines.'),
  postcode: PostcodeText,
});

export const EarTag = z.string().transform((text, context) => {
  const tag = normaliseEarTag(text);
  if (!tag) {
    context.addIssue({ code: 'custom', message: 'An ear tag is UK, six digits of the herd, then six of the animal.' });
    return z.NEVER;
  }
  if (!hasValidCheckDigit(tag)) {
    context.addIssue({ code: 'custom', message: 'The check digit of this ear tag does not fit. Read the tag again.' });
    return z.NEVER;
  }
  return tag;
});

export const RailPrimal = z.strictObject({
  id: z.string(),
  name: z.string(),
  shortName: z.string(),
  grams: z.int().min(0),
  soldGrams: z.int().min(0),
  heldGrams: z.int().min(0),
});
export type RailPrimal = z.infer<typeof RailPrimal>;

/** Primals in carcase order, and the same merged to eight or nine for a narrow screen. */
export const Rail = z.strictObject({ primals: z.array(RailPrimal), narrowPrimals: z.array(RailPrimal) });
export type Rail = z.infer<typeof Rail>;

export const Side = z.enum(['left', 'right']);
export type Side = z.infer<typeof Side>;
