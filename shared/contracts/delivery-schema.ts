import { z } from 'zod';
import { Id, Instant, Line, Pence, PostcodeText, Time, Version } from './fields-schema.ts';

const PlaceName = z.strictObject({ name: z.string(), addressLines: z.array(z.string()) });

/** Whether the van comes to a postcode with a cutting day's boxes, and where to collect if it does not. */
export const askDeliverySchema = {
  query: z.strictObject({ dayId: Id, postcode: PostcodeText }),
  answer: z.strictObject({
    postcode: z.string(),
    area: z
      .strictObject({
        name: z.string(),
        pricePence: z.int(),
        freeFromPence: z.int().nullable(),
        startsAt: Instant,
        endsAt: Instant,
        free: z.int(),
      })
      .nullable(),
    nearest: PlaceName.nullable(),
  }),
};

const Prefix = z
  .string()
  .transform((text) => text.replace(/\s/g, '').toUpperCase())
  .pipe(z.string().regex(/^[A-Z]{1,2}(\d[A-Z\d]?)?$/, 'Give the letters of a postcode, or a district such as ZZ1.'));

export const DeliveryAreaEdit = z
  .strictObject({
    name: Line,
    prefixes: z.array(Prefix).min(1, 'Give at least one.').max(60, 'At most sixty.'),
    pricePence: Pence,
    freeFromPence: Pence.min(1, 'The amount must be above zero.').nullable(),
    weekday: z.int().min(1).max(7),
    startsAt: Time,
    endsAt: Time,
    capacity: z.int('Give a whole number.').min(1, 'At least one stop.').max(500, 'This is too many.'),
    isActive: z.boolean(),
  })
  .refine((area) => area.startsAt < area.endsAt, { path: ['endsAt'], message: 'The end is before the start.' });
export type DeliveryAreaEdit = z.infer<typeof DeliveryAreaEdit>;

export const DeliveryArea = z.strictObject({ ...DeliveryAreaEdit.shape, id: Id, version: Version });
export type DeliveryArea = z.infer<typeof DeliveryArea>;

export const listDeliveryAreasSchema = { answer: z.strictObject({ areas: z.array(DeliveryArea) }) };
export const addDeliveryAreaSchema = { body: DeliveryAreaEdit, answer: DeliveryArea };
/** Rounds that have stops keep their day and time; later ones follow the edit. */
export const editDeliveryAreaSchema = {
  params: z.strictObject({ areaId: Id }),
  body: z.strictObject({ version: Version, area: DeliveryAreaEdit }),
  answer: DeliveryArea,
};
