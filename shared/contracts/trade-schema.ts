import { z } from 'zod';
import { CarcaseSummary } from './carcases-schema.ts';
import { Day, Grams, Id, Instant, Line, Note, Phone, Rail, Rate, Side, Version } from './fields-schema.ts';

export const AccountState = z.enum(['applied', 'approved', 'refused']);
export const ReservationState = z.enum(['asked', 'confirmed', 'refused', 'cancelled', 'dispatched']);
/** `side`, `fore`, `hind` or `primal:<id>`. */
export const UnitKind = z.string().regex(/^(side|fore|hind|primal:[a-z0-9-]{1,40})$/);

export const TradePrice = z.strictObject({
  product: z.string(),
  name: z.string(),
  tenthPencePerKg: Rate,
  basis: z.enum(['scale weight', 'cold weight']),
});
export type TradePrice = z.infer<typeof TradePrice>;

export const TradeAccount = z.strictObject({
  id: Id,
  businessName: z.string(),
  addressLines: z.array(z.string()),
  phone: z.string(),
  email: z.string(),
  state: AccountState,
  prices: z.array(TradePrice),
  version: Version,
});
export type TradeAccount = z.infer<typeof TradeAccount>;

/** What a butcher sees of a coming carcase. */
export const TradeCarcase = z.strictObject({
  ...CarcaseSummary.shape,
  sides: z.array(
    z.strictObject({
      side: Side,
      sideGrams: z.int(),
      rail: Rail,
      /** Units of which nothing is sold or reserved by a butcher yet. */
      units: z.array(
        z.strictObject({
          unitKind: UnitKind,
          name: z.string(),
          grams: z.int(),
          isTaken: z.boolean(),
          closedReason: z.string().nullable(),
          tenthPencePerKg: Rate.nullable(),
        }),
      ),
    }),
  ),
});
export type TradeCarcase = z.infer<typeof TradeCarcase>;

export const TradeDay = z.strictObject({
  id: Id,
  day: Day,
  cutOffAt: Instant,
  isInTime: z.boolean(),
  carcases: z.array(TradeCarcase),
  cuts: z.array(z.strictObject({ cutId: z.string(), name: z.string(), tenthPencePerKg: Rate, madeGrams: z.int() })),
});
export type TradeDay = z.infer<typeof TradeDay>;

export const ReservationLineRequest = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('unit'), unitKind: UnitKind, carcaseId: Id.nullable(), side: Side.nullable() }),
  z.strictObject({ kind: z.literal('cut'), cutId: z.string().max(60), grams: Grams }),
]);
export type ReservationLineRequest = z.infer<typeof ReservationLineRequest>;

export const NewReservation = z.strictObject({
  requestKey: Id,
  dayId: Id,
  lines: z.array(ReservationLineRequest).min(1, 'Choose at least one line.').max(30),
  cuttingNote: Note,
});
export type NewReservation = z.infer<typeof NewReservation>;

export const Reservation = z.strictObject({
  id: Id,
  reservationNo: z.int(),
  businessName: z.string(),
  dayId: Id,
  day: Day,
  state: ReservationState,
  cuttingNote: z.string(),
  /** What the farm or the plan answered, in plain words. */
  answer: z.string(),
  createdAt: Instant,
  version: Version,
  lines: z.array(
    z.strictObject({
      id: Id,
      kind: z.enum(['unit', 'cut']),
      name: z.string(),
      earTag: z.string().nullable(),
      side: Side.nullable(),
      /** Estimated until the beast is weighed. */
      grams: z.int(),
      /** On the scale as it left, or null while it is here. */
      dispatchedGrams: z.int().nullable(),
      tenthPencePerKg: Rate,
      basis: z.enum(['scale weight', 'cold weight']),
      /** What the price is for: cold weight where the price list says so, else the scale's, else the estimate. */
      chargedGrams: z.int(),
      linePence: z.int(),
    }),
  ),
  totalPence: z.int(),
});
export type Reservation = z.infer<typeof Reservation>;

const ReservationId = z.strictObject({ reservationId: Id });
const AccountId = z.strictObject({ accountId: Id });

export const getTradeAccountSchema = { answer: z.strictObject({ account: TradeAccount.nullable() }) };
export const applyForTradeSchema = {
  body: z.strictObject({ businessName: Line, addressLines: z.array(Line).min(1).max(6), phone: Phone }),
  answer: TradeAccount,
};
export const listTradeDaysSchema = { answer: z.strictObject({ days: z.array(TradeDay) }) };
export const reserveSchema = { body: NewReservation, answer: Reservation };
export const listMyReservationsSchema = { answer: z.strictObject({ reservations: z.array(Reservation) }) };
export const cancelReservationSchema = {
  params: ReservationId,
  body: z.strictObject({ version: Version }),
  answer: Reservation,
};

export const listReservationsSchema = { answer: z.strictObject({ reservations: z.array(Reservation) }) };
export const confirmReservationSchema = {
  params: ReservationId,
  body: z.strictObject({ version: Version }),
  answer: Reservation,
};
export const refuseReservationSchema = {
  params: ReservationId,
  body: z.strictObject({ version: Version, answer: Line }),
  answer: Reservation,
};
export const dispatchReservationSchema = {
  params: ReservationId,
  body: z.strictObject({
    version: Version,
    /** One scale weight for each line that leaves whole; cuts leave in the packs that were filled for them. */
    weights: z.array(z.strictObject({ lineId: Id, grams: Grams })).max(30),
    /** Lets cuts leave although fewer packs are there than were reserved. */
    isShortAccepted: z.boolean(),
  }),
  answer: Reservation,
};
export const listTradeAccountsSchema = { answer: z.strictObject({ accounts: z.array(TradeAccount) }) };
export const decideTradeAccountSchema = {
  params: AccountId,
  body: z.strictObject({ version: Version, state: z.enum(['approved', 'refused']) }),
  answer: TradeAccount,
};
export const setTradePricesSchema = {
  params: AccountId,
  body: z.strictObject({
    version: Version,
    prices: z
      .array(
        z.strictObject({
          product: z.string().max(60),
          tenthPencePerKg: Rate,
          basis: z.enum(['scale weight', 'cold weight']),
        }),
      )
      .max(100),
  }),
  answer: TradeAccount,
};
