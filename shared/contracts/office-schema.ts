import { z } from 'zod';
import { MINCE_EFFECTS } from '#shared/domain/mince-age.ts';
import { ROLES } from '#shared/domain/roles.ts';
import { Day, Grams, Id, Line, Pence, Rate, Version } from './fields-schema.ts';

export const getMeSchema = {
  answer: z.strictObject({
    user: z.strictObject({ id: Id, name: z.string(), email: z.string(), role: z.enum(ROLES) }).nullable(),
  }),
};

/** One thing that needs doing, and where to do it. */
export const TodayItem = z.strictObject({
  kind: z.enum([
    'kill sheet',
    'allocate',
    'publish',
    'out of date',
    'reservation',
    'trade account',
    'fill',
    'collection mails',
    'mail failed',
    'refund failed',
    'balance failed',
    'shortfall',
  ]),
  title: z.string(),
  detail: z.string(),
  href: z.string(),
});
export type TodayItem = z.infer<typeof TodayItem>;
export const getTodaySchema = {
  answer: z.strictObject({
    today: Day,
    items: z.array(TodayItem),
    days: z.array(
      z.strictObject({ id: Id, day: Day, state: z.string(), carcases: z.int(), orders: z.int(), soldPence: z.int() }),
    ),
  }),
};

export const BoxKindLine = z.strictObject({
  name: Line,
  minGrams: z.int().min(0).max(100_000),
  maxGrams: Grams,
  minPacks: z.int().min(0).max(40),
  maxPacks: z.int().min(1).max(40).nullable(),
  cutIds: z.array(z.string().max(60)).min(1, 'Choose at least one cut.').max(40),
});
export const BoxKindEdit = z.strictObject({
  version: Version,
  name: Line,
  summary: Line,
  guaranteedGrams: Grams,
  pricePence: Pence.min(1, 'The price must be above zero.'),
  packagingPence: Pence,
  demandBoxes: z.int().min(0).max(2000),
  isActive: z.boolean(),
  lines: z.array(BoxKindLine).min(1, 'A box needs at least one line.').max(20),
});
export type BoxKindEdit = z.infer<typeof BoxKindEdit>;
export const BoxKind = z.strictObject({
  ...BoxKindEdit.shape,
  id: Id,
  slug: z.string(),
  /** The box that this is a swap of: it has that one's price and guarantee. */
  swapOfId: Id.nullable(),
});
export type BoxKind = z.infer<typeof BoxKind>;

export const Cut = z.strictObject({
  id: z.string(),
  name: z.string(),
  cooking: z.string(),
  tenthPencePerKg: Rate,
  clearanceTenthPencePerKg: z.int(),
  minPackGrams: z.int(),
  maxPackGrams: z.int(),
  looseDemandPacks: z.int(),
  isSoldLoose: z.boolean(),
  version: Version,
});
export type Cut = z.infer<typeof Cut>;

export const listBoxKindsSchema = { answer: z.strictObject({ boxKinds: z.array(BoxKind), cuts: z.array(Cut) }) };
/** A copy of the box's recipe under a name of its own, off sale until it is edited and offered. */
export const addSwapSchema = {
  params: z.strictObject({ boxKindId: Id }),
  body: z.strictObject({ name: Line }),
  answer: BoxKind,
};
/** Refused with RECIPE_INFEASIBLE when no packs could ever meet the recipe. */
export const editBoxKindSchema = { params: z.strictObject({ boxKindId: Id }), body: BoxKindEdit, answer: BoxKind };

export const Settings = z.strictObject({
  /** A butcher's reservation may be worked in without the owner looking first. */
  isReallocationAutomatic: z.boolean(),
  vertebralColumnMonths: z.int().min(1).max(120),
  isVertebralColumnRuleActive: z.boolean(),
  /** The premises that cut are authorised to take vertebral column out: their ways that keep it are open again. */
  isVertebralColumnPremisesAuthorised: z.boolean(),
  /** What is done with meat that is older than the days below when it is to be minced. */
  minceAgeEffect: z.enum(MINCE_EFFECTS),
  /** Days from kill. */
  minceWithinDays: z.int('Give whole days.').min(1).max(60),
  /** The same for beef that was boned and hung in the bag. */
  minceBaggedWithinDays: z.int('Give whole days.').min(1).max(60),
  killPence: Pence,
  inspectionPence: Pence,
  levyPence: Pence,
  haulagePence: Pence,
  butcheryTenthPencePerKg: Rate,
  /** What the card company keeps: parts per 100,000 of the price, and a fixed sum. */
  cardRatePpht: z.int().min(0).max(20_000, 'This is more than a fifth.'),
  cardFixedPence: z.int().min(0).max(1_000),
});
export type Settings = z.infer<typeof Settings>;
export const getSettingsSchema = { answer: Settings };
/** In force from today on; earlier days keep what they had. */
export const editSettingsSchema = { body: Settings, answer: Settings };

export const getHealthSchema = { answer: z.strictObject({ ok: z.literal(true) }) };
