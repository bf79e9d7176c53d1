import type {
  AllocationInput,
  BoxVariant,
  Fit,
  LooseDemand,
  Priority,
  RecipeLine,
  TradeLine,
} from '#shared/engine/allocation/allocation-input.ts';
import { cutout } from '#shared/engine/cutout/cutout.ts';
import type { CarcaseFacts, SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';

/** Uniform numbers in [0, 1) from a seed: a 32-bit mix, the same on every machine. */
export function seededNumbers(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

const CLASSES = ['-U', 'R', 'R', 'R', 'O+', 'O+', '-O'] as const;
const FATS = ['3', '4L', '4L', '4H'] as const;

function makeSides(count: number, next: () => number): SideSupply[] {
  return Array.from({ length: count }, (_, index) => {
    const carcase: CarcaseFacts = {
      id: `carcase-${String(index + 1).padStart(3, '0')}`,
      type: next() < 0.6 ? 'steer' : 'heifer',
      bornDay: next() < 0.1 ? '2023-01-10' : '2024-06-10',
      killDay: '2026-03-02',
      liveGrams: null,
      hotGrams: null,
      coldGrams: 270_000 + Math.round(next() * 110_000),
      killingOutPpht: null,
      conformation: CLASSES[Math.floor(next() * CLASSES.length)] ?? 'R',
      fatClass: FATS[Math.floor(next() * FATS.length)] ?? '4L',
      hanging: { method: 'whole side', days: 14 + Math.floor(next() * 15) },
      measured: {},
    };
    const rule = { isActive: true, months: 30, isPremisesAuthorised: false };
    return cutout({ carcase, specification: traditionalSide, rule, ways: { left: {}, right: {} } }).sides;
  }).flat();
}

type LineRow = readonly [id: string, cuts: readonly string[], min: number, max: number, minPacks: number];

function toLine([id, cutIds, minGrams, maxGrams, minPacks]: LineRow): RecipeLine {
  return { id, name: id, cutIds, minGrams, maxGrams, minPacks, maxPacks: null, state: 'fresh' };
}

const MINCE = ['mince'];
const DICE = ['diced-beef', 'shin-slices'];
const BRAISE = ['braising-steak', 'braising-slices', 'feather-steak', 'shin-slices'];
const ROASTS = ['topside-joint', 'top-rump-joint', 'silverside-joint', 'salmon-cut-joint'];
const SLOW = ['brisket-joint', 'leg-of-mutton-joint', 'blade-joint', 'silverside-joint'];
const STEAKS = ['sirloin-steak', 'rump-steak', 'rib-eye-steak', 'rump-heart-steak'];
const QUICK = ['minute-steak', 'stir-fry-strips', 'bavette', 'flat-iron-steak', 'denver-steak', 'bistro-rump'];
const FEAST = ['fore-rib', 'fore-rib-chined', 'rib-rolled', 'sirloin-on-the-bone', 'sirloin-joint'];

type Kind = { id: string; grams: number; pounds: number; weight: number; lines: readonly LineRow[] };

// prettier-ignore
const KINDS: readonly Kind[] = [
  { id: 'everyday-10', grams: 10_000, pounds: 128, weight: 7, lines: [['mince', MINCE, 2_800, 4_400, 6], ['dice', DICE, 1_600, 2_600, 3], ['braise', BRAISE, 1_200, 2_100, 3], ['roast', ROASTS, 1_800, 3_600, 1], ['quick', QUICK, 300, 900, 1]] },
  { id: 'everyday-5', grams: 5_000, pounds: 68, weight: 9, lines: [['mince', MINCE, 1_400, 2_200, 3], ['dice', DICE, 800, 1_600, 2], ['braise', BRAISE, 400, 1_000, 1], ['roast', [...ROASTS, ...SLOW], 900, 2_000, 1]] },
  { id: 'roasts-6', grams: 6_000, pounds: 96, weight: 4, lines: [['feast', FEAST, 1_300, 2_900, 1], ['roast', ROASTS, 1_800, 3_800, 2], ['slow', SLOW, 1_000, 2_000, 1]] },
  { id: 'grill-4', grams: 4_000, pounds: 104, weight: 4, lines: [['steaks', STEAKS, 1_600, 2_600, 4], ['quick', QUICK, 900, 1_700, 3], ['mince', MINCE, 400, 1_100, 1]] },
  { id: 'slow-5', grams: 5_000, pounds: 62, weight: 5, lines: [['slow', SLOW, 1_000, 2_200, 1], ['braise', BRAISE, 1_200, 2_200, 3], ['dice', DICE, 800, 1_700, 2], ['shin', ['shin-slices', 'shin-on-the-bone'], 400, 1_000, 1]] },
  { id: 'mince-5', grams: 5_000, pounds: 52, weight: 4, lines: [['mince', MINCE, 4_000, 5_500, 8], ['dice', DICE, 0, 1_100, 0]] },
  { id: 'family-8', grams: 8_000, pounds: 116, weight: 3, lines: [['mince', MINCE, 1_600, 2_800, 4], ['dice', DICE, 800, 1_700, 2], ['roast', ROASTS, 1_000, 2_200, 1], ['steaks', [...STEAKS, ...QUICK], 800, 1_700, 2], ['slow', SLOW, 1_000, 2_000, 1]] },
  { id: 'steaks-2', grams: 2_000, pounds: 66, weight: 2, lines: [['steaks', STEAKS, 800, 1_700, 2], ['fillet', ['fillet-steak', 't-bone-steak'], 300, 900, 1]] },
];

function makeBox(kind: Kind, carcases: number, next: () => number): BoxVariant {
  const expected = Math.max(1, Math.round(kind.weight * carcases * (0.8 + 0.4 * next())));
  const pricePence = kind.pounds * 100;
  const floor = Math.floor(expected * 0.3 * next());
  const part = Math.max(1, Math.round((expected - floor) / 3));
  return {
    id: kind.id,
    kindId: kind.id,
    name: kind.id,
    guaranteedGrams: kind.grams,
    lines: kind.lines.map(toLine),
    pricePence,
    packagingPence: 350,
    floor,
    priority: 1,
    steps: [
      { boxes: part, valuePence: pricePence },
      { boxes: part, valuePence: Math.round(pricePence * 0.95) },
      { boxes: part, valuePence: Math.round(pricePence * 0.88) },
    ],
  };
}

function makeLoose(carcases: number, next: () => number): LooseDemand[] {
  const wanted = [
    'fillet-steak',
    'sirloin-steak',
    'rib-eye-steak',
    'rump-steak',
    'fore-rib',
    'topside-joint',
    'brisket-joint',
    'mince',
    'diced-beef',
    'braising-steak',
    'flat-iron-steak',
    'shin-on-the-bone',
  ];
  return wanted.map((cutId): LooseDemand => {
    const rate = traditionalSide.cuts.find(({ id }) => id === cutId)?.tenthPencePerKg ?? 0;
    const packs = Math.max(1, Math.round((2 + 5 * next()) * carcases));
    return {
      cutId,
      floor: Math.floor(packs * 0.3 * next()),
      priority: 2,
      steps: [1, 0.9, 0.75].map((share) => ({ packs, tenthPencePerKg: Math.round(rate * share) })),
    };
  });
}

const ANY: Fit = {
  carcaseId: null,
  side: null,
  minSideGrams: null,
  maxSideGrams: null,
  conformations: null,
  fatClasses: null,
  minHangingDays: null,
};
const CUT_LINES = [
  'fillet-steak',
  'sirloin-steak',
  'rump-steak',
  'mince',
  'diced-beef',
  'brisket-joint',
  'topside-joint',
  'silverside-joint',
  'shin-slices',
  'lean-trim',
  'trim',
  'braising-steak',
  'rib-eye-steak',
  'feather-steak',
  'bavette',
];
const UNITS = [
  { unit: { kind: 'side' }, rate: 5_400 },
  { unit: { kind: 'quarter', quarter: 'fore' }, rate: 4_500 },
  { unit: { kind: 'quarter', quarter: 'hind' }, rate: 6_500 },
  { unit: { kind: 'quarter', quarter: 'hind' }, rate: 6_700 },
  { unit: { kind: 'primal', primalId: 'fore-rib' }, rate: 10_500 },
  { unit: { kind: 'primal', primalId: 'brisket' }, rate: 5_200 },
  { unit: { kind: 'primal', primalId: 'rump' }, rate: 9_800 },
  { unit: { kind: 'primal', primalId: 'topside' }, rate: 8_800 },
  { unit: { kind: 'primal', primalId: 'chuck' }, rate: 7_000 },
  { unit: { kind: 'quarter', quarter: 'fore' }, rate: 4_700 },
] as const;

/** Twenty-five lines: ten of whole units, fifteen of cuts; about a third is confirmed. */
function makeTrade(carcases: number, next: () => number): TradeLine[] {
  const units = UNITS.map(({ unit, rate }, index): TradeLine => {
    const isSmall = carcases < 4 && unit.kind !== 'primal';
    const quantity = isSmall
      ? Number(index === 2)
      : Math.max(1, Math.round(carcases * (unit.kind === 'primal' ? 0.3 : 0.12)));
    return {
      id: `unit-${String(index + 1).padStart(2, '0')}`,
      name: `unit line ${index + 1}`,
      kind: 'unit',
      unit,
      quantity,
      fit: index % 3 === 1 ? { ...ANY, minSideGrams: 140_000, conformations: ['-U', 'R', 'O+'] } : ANY,
      instructions: [],
      tenthPencePerKg: rate,
      isConfirmed: carcases >= 4 && index % 3 === 0,
      priority: (1 + (index % 2)) as Priority,
    };
  });
  const cuts = CUT_LINES.map((cutId, index): TradeLine => {
    const rate = traditionalSide.cuts.find(({ id }) => id === cutId)?.tenthPencePerKg ?? 0;
    return {
      id: `cut-${String(index + 1).padStart(2, '0')}`,
      name: `${cutId} for the trade`,
      kind: 'cut',
      cutId,
      grams: Math.round((1_000 + 4_000 * next()) * carcases * 0.6),
      tenthPencePerKg: Math.round(rate * 0.72),
      isConfirmed: index % 4 === 0,
      priority: 2,
    };
  });
  return [...units, ...cuts];
}

type InstanceSize = { carcases: number; seed: number; boxes?: number; loose?: number; trade?: number };

/** A made cutting day: sides of the traditional specification, 8 boxes, 12 loose cuts and 25 trade lines, or fewer. */
export function makeAllocationInstance(size: InstanceSize): AllocationInput {
  const { carcases, seed } = size;
  const next = seededNumbers(seed);
  const sides = makeSides(carcases, next);
  const cuts = traditionalSide.cuts;
  return {
    sides,
    cuts,
    stock: [
      { cutId: 'mince', state: 'fresh', grams: 2_000 },
      { cutId: 'diced-beef', state: 'frozen', grams: 1_500 },
    ],
    boxes: KINDS.map((kind) => makeBox(kind, carcases, next)).slice(0, size.boxes),
    loose: makeLoose(carcases, next).slice(0, size.loose),
    trade: makeTrade(carcases, next).slice(-(size.trade ?? 25)),
    mince: {
      closedReason: null,
      productCutId: 'mince',
      minLeanPpht: 85_000,
      costTenthPencePerKg: 600,
      allowedCutIds: cuts.filter(({ mayBeMinced }) => mayBeMinced).map(({ id }) => id),
    },
    locks: [],
    packingTenthPencePerKg: 450,
  };
}
