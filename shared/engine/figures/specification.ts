import { z } from 'zod';

/** Parts per 100,000. */
const Ppht = z.int().min(0).max(100_000);
const Id = z
  .string()
  .regex(/^[a-z0-9-]+$/)
  .max(40);
const Name = z.string().trim().min(1).max(80);

/** Of the side, for a carcase of the reference class. */
export const Tissues = z.strictObject({ meat: Ppht, fat: Ppht, bone: Ppht, loss: Ppht });
export type Tissues = z.infer<typeof Tissues>;
export type Tissue = keyof Tissues;

export const Primal = z.strictObject({
  id: Id,
  name: Name,
  shortName: z.string().trim().min(1).max(16),
  tissues: Tissues,
  hasVertebrae: z.boolean(),
});
export type Primal = z.infer<typeof Primal>;

/** `sharePpht` is of the side and equals the sum of its primals' tissues. */
export const Quarter = z.strictObject({
  id: z.enum(['fore', 'hind']),
  name: Name,
  sharePpht: Ppht,
  primals: z.array(Primal).min(1).max(20),
});
export type Quarter = z.infer<typeof Quarter>;
export type QuarterId = Quarter['id'];

/** What one line takes of one primal: parts per 100,000 of each of its tissues. */
export const Take = z.strictObject({ primalId: Id, ...Tissues.shape });
export type Take = z.infer<typeof Take>;

export const WayLine = z.strictObject({
  /** For a cut or trim its cut id; else `bone`, `fat` or `loss`. */
  id: Id,
  kind: z.enum(['cut', 'trim', 'bone', 'fat', 'loss']),
  takes: z.array(Take).min(1).max(20),
});
export type WayLine = z.infer<typeof WayLine>;

export const Way = z.strictObject({
  id: Id,
  name: Name,
  /** True when vertebral column stays in a product: closed for a carcase over thirty months. */
  keepsVertebrae: z.boolean(),
  /** What this way costs at the block beyond plain boning, in tenths of a penny per kg of the primals. */
  extraTenthPencePerKg: z.int().min(0).max(100_000),
  lines: z.array(WayLine).min(1).max(20),
});
export type Way = z.infer<typeof Way>;

/** An either/or: exactly one way for all the primals that it covers. */
export const Choice = z.strictObject({
  id: Id,
  name: Name,
  primalIds: z.array(Id).min(1).max(5),
  /** The first open way is the default. */
  ways: z.array(Way).min(1).max(12),
});
export type Choice = z.infer<typeof Choice>;

export const COOKING = ['grill', 'roast', 'pot-roast', 'braise', 'mince'] as const;
export const Cut = z.strictObject({
  id: Id,
  name: Name,
  description: z.string().trim().max(200),
  kind: z.enum(['cut', 'trim', 'mince']),
  /** The primal that it is best known from; null for trim and mince. */
  primalId: Id.nullable(),
  cooking: z.enum(COOKING),
  minPackGrams: z.int().min(50).max(20_000),
  maxPackGrams: z.int().min(50).max(20_000),
  /** What a loose pack is paid for before it is weighed. */
  upperLooseGrams: z.int().min(50).max(20_000),
  tenthPencePerKg: z.int().min(0).max(1_000_000),
  clearanceTenthPencePerKg: z.int().min(0).max(1_000_000),
  /** Visual lean. */
  leanPpht: Ppht,
  isSoldLoose: z.boolean(),
  mayBeMinced: z.boolean(),
  useByDays: z.int().min(1).max(60),
});
export type Cut = z.infer<typeof Cut>;

/** Neighbouring primals drawn as one segment on a narrow screen. */
export const NarrowPrimal = z.strictObject({
  id: Id,
  name: Name,
  shortName: z.string().trim().min(1).max(16),
  primalIds: z.array(Id).min(1).max(6),
});
export type NarrowPrimal = z.infer<typeof NarrowPrimal>;

export const Specification = z.strictObject({
  id: Id,
  name: Name,
  source: z.string().max(400),
  reference: z.strictObject({ conformation: z.string().max(3), fatClass: z.string().max(3) }),
  /** In carcase order, fore first: the one order in which primals are drawn and read. */
  quarters: z.tuple([Quarter, Quarter]),
  narrowPrimals: z.array(NarrowPrimal).min(1).max(9),
  choices: z.array(Choice).min(1).max(30),
  cuts: z.array(Cut).min(1).max(100),
});
export type Specification = z.infer<typeof Specification>;
