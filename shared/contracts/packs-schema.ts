import { z } from 'zod';
import { Day, Id, Version } from './fields-schema.ts';

const PackGrams = z
  .int('Give whole grams.')
  .min(1, 'The weight must be above zero.')
  .max(60_000, 'A pack weighs at most 60 kg.');

export const Pack = z.strictObject({
  id: Id,
  code: z.string(),
  cutId: z.string(),
  cut: z.string(),
  carcaseId: Id,
  earTag: z.string(),
  grams: z.int(),
  packedOn: Day,
  useBy: Day,
  /** The order that it is in, or null while it is in the chiller. */
  orderNo: z.int().nullable(),
  orderName: z.string().nullable(),
  place: z.string(),
});
export type Pack = z.infer<typeof Pack>;

/** One box, loose pack or trade line that the day must fill. */
export const Fill = z.strictObject({
  /** A paid order of a consumer, or what a butcher reserved. */
  kind: z.enum(['order', 'reservation']),
  orderNo: z.int(),
  orderName: z.string(),
  item: z.string(),
  copy: z.int(),
  isFilled: z.boolean(),
  /** Closed to further packs: filled, handed over short, or gone. */
  isPacked: z.boolean(),
  grams: z.int(),
  guaranteedGrams: z.int(),
  packs: z.array(z.strictObject({ code: z.string(), cut: z.string(), grams: z.int() })),
  /** What is missing, by recipe line, when it cannot be filled. */
  missing: z.array(z.strictObject({ line: z.string(), shortGrams: z.int(), shortPacks: z.int() })),
});
export type Fill = z.infer<typeof Fill>;

export const PackingDay = z.strictObject({
  dayId: Id,
  day: Day,
  carcases: z.array(z.strictObject({ id: Id, earTag: z.string(), title: z.string(), state: z.string() })),
  /** What the plan foresees against what lies weighed, by carcase and cut. */
  cuttingList: z.array(
    z.strictObject({
      carcaseId: Id,
      cutId: z.string(),
      cut: z.string(),
      way: z.string(),
      foreseenGrams: z.int(),
      packedGrams: z.int(),
      minPackGrams: z.int(),
      maxPackGrams: z.int(),
    }),
  ),
  packs: z.array(Pack),
  fills: z.array(Fill),
});
export type PackingDay = z.infer<typeof PackingDay>;

const DayId = z.strictObject({ dayId: Id });
export const getPackingDaySchema = { params: DayId, answer: PackingDay };
export const addPacksSchema = {
  params: DayId,
  body: z.strictObject({
    carcaseId: Id,
    cutId: z.string().max(60),
    /** One weight a pack. */
    grams: z.array(PackGrams).min(1, 'Weigh at least one pack.').max(200),
  }),
  answer: PackingDay,
};
export const reweighPackSchema = {
  params: z.strictObject({ packId: Id }),
  body: z.strictObject({ grams: PackGrams }),
  answer: Pack,
};
export const losePackSchema = {
  params: z.strictObject({ packId: Id }),
  body: z.strictObject({ reason: z.enum(['dropped', 'torn', 'weighed twice', 'own use']) }),
  answer: PackingDay,
};
/** Puts real packs into real orders. Whatever is filled already stays as it is. */
export const fillOrdersSchema = { params: DayId, answer: PackingDay };

export const packShortSchema = {
  params: z.strictObject({ dayId: Id, orderNo: z.coerce.number().int().min(1).max(2_000_000_000) }),
  answer: PackingDay,
};

export const MailState = z.enum(['queued', 'sent', 'failed', 'bounced']);
export const CollectionMail = z.strictObject({
  orderId: Id,
  orderNo: z.int(),
  name: z.string(),
  email: z.string(),
  pointName: z.string(),
  startsAt: z.iso.datetime(),
  endsAt: z.iso.datetime(),
  /** Why this mail should wait, such as a box that is not filled; null when it may go. */
  holdBack: z.string().nullable(),
  subject: z.string(),
  text: z.string(),
  html: z.string(),
  mail: z
    .strictObject({
      id: Id,
      state: MailState,
      attempts: z.int(),
      lastError: z.string().nullable(),
      sentAt: z.iso.datetime().nullable(),
    })
    .nullable(),
});
export type CollectionMail = z.infer<typeof CollectionMail>;

export const listCollectionMailsSchema = {
  params: DayId,
  answer: z.strictObject({ day: Day, mails: z.array(CollectionMail) }),
};
export const confirmCollectionMailsSchema = {
  params: DayId,
  body: z.strictObject({ orderIds: z.array(Id).min(1, 'Choose at least one mail.').max(1000) }),
  answer: z.strictObject({ day: Day, mails: z.array(CollectionMail) }),
};

export const Mail = z.strictObject({
  id: Id,
  kind: z.string(),
  to: z.string(),
  subject: z.string(),
  state: MailState,
  attempts: z.int(),
  lastError: z.string().nullable(),
  createdAt: z.iso.datetime(),
  sentAt: z.iso.datetime().nullable(),
});
export type Mail = z.infer<typeof Mail>;
export const listMailsSchema = { answer: z.strictObject({ mails: z.array(Mail) }) };
export const resendMailSchema = { params: z.strictObject({ mailId: Id }), answer: Mail };

export const RunSheetOrder = z.strictObject({
  id: Id,
  orderNo: z.int(),
  name: z.string(),
  items: z.array(z.string()),
  packCount: z.int(),
  /** Where the van brings it; null for what is collected. */
  address: z.string().nullable(),
  state: z.string(),
  version: Version,
});
export const RunSheet = z.strictObject({
  dayId: Id,
  day: Day,
  slots: z.array(
    z.strictObject({
      pointName: z.string(),
      startsAt: z.iso.datetime(),
      endsAt: z.iso.datetime(),
      orders: z.array(RunSheetOrder),
    }),
  ),
});
export type RunSheet = z.infer<typeof RunSheet>;
export const getRunSheetSchema = { params: DayId, answer: RunSheet };
export const markOrderSchema = {
  params: z.strictObject({ orderId: Id }),
  body: z.strictObject({ version: Version, state: z.enum(['ready', 'collected', 'delivered', 'missed']) }),
  answer: RunSheetOrder,
};
