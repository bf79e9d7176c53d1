import type {
  AllocationInput,
  BoxVariant,
  Fit,
  RecipeLine,
  TradeLine,
} from '#shared/engine/allocation/allocation-input.ts';
import type { ChoiceSupply, SideName, SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import type { Cut } from '#shared/engine/figures/specification.ts';

export function makeCut(id: string, cut: Partial<Cut> = {}): Cut {
  return {
    id,
    name: id,
    description: '',
    kind: 'cut',
    primalId: null,
    cooking: 'roast',
    minPackGrams: 100,
    maxPackGrams: 1_000,
    upperLooseGrams: 1_000,
    tenthPencePerKg: 12_000,
    clearanceTenthPencePerKg: 4_000,
    leanPpht: 90_000,
    isSoldLoose: true,
    mayBeMinced: false,
    useByDays: 10,
    ...cut,
  };
}

/** A choice of one primal with the same id; `ways`: grams by cut, by way. */
export function makeChoice(
  choiceId: string,
  ways: Record<string, Record<string, number>>,
  choice: Partial<ChoiceSupply> & { closed?: Record<string, string>; costs?: Record<string, number> } = {},
): ChoiceSupply {
  const { closed = {}, costs = {}, ...rest } = choice;
  return {
    choiceId,
    name: choiceId,
    quarter: 'fore',
    primals: [{ primalId: choiceId, name: choiceId, grams: 20_000, hasVertebrae: false }],
    ways: Object.entries(ways).map(([wayId, yields]) => ({
      wayId,
      name: wayId,
      closedReason: closed[wayId] ?? null,
      costPence: costs[wayId] ?? 0,
      yields: Object.entries(yields).map(([cutId, grams]) => ({ primalId: choiceId, cutId, grams })),
    })),
    ...rest,
  };
}

export function makeSide(
  carcaseId: string,
  side: SideName,
  choices: ChoiceSupply[],
  more: Partial<SideSupply> = {},
): SideSupply {
  return {
    id: `${carcaseId}/${side}`,
    carcaseId,
    side,
    grams: 150_000,
    quarterGrams: { fore: 77_000, hind: 73_000 },
    coldCarcaseGrams: 300_000,
    conformation: 'R',
    fatClass: '4L',
    hangingDays: 21,
    closedUnitReason: null,
    choices,
    ...more,
  };
}

export function makeLine(id: string, cutIds: string[], line: Partial<RecipeLine> = {}): RecipeLine {
  return {
    id,
    name: id,
    cutIds,
    minGrams: 1_000,
    maxGrams: 2_000,
    minPacks: 0,
    maxPacks: null,
    state: 'fresh',
    ...line,
  };
}

export function makeBoxVariant(id: string, lines: RecipeLine[], box: Partial<BoxVariant> = {}): BoxVariant {
  return {
    id,
    kindId: id,
    name: id,
    guaranteedGrams: 3_000,
    lines,
    pricePence: 4_500,
    packagingPence: 300,
    floor: 0,
    priority: 1,
    steps: [{ boxes: 100, valuePence: 4_500 }],
    ...box,
  };
}

export const ANY_SIDE: Fit = {
  carcaseId: null,
  side: null,
  minSideGrams: null,
  maxSideGrams: null,
  conformations: null,
  fatClasses: null,
  minHangingDays: null,
};

type UnitLine = Extract<TradeLine, { kind: 'unit' }>;

export function makeUnitLine(id: string, unit: UnitLine['unit'], line: Partial<UnitLine> = {}): TradeLine {
  return {
    id,
    name: id,
    tenthPencePerKg: 5_000,
    isConfirmed: true,
    priority: 1,
    kind: 'unit',
    unit,
    quantity: 1,
    fit: ANY_SIDE,
    instructions: [],
    ...line,
  };
}

/** One carcase of two like sides with two choices, one box and nothing else. */
export function makeAllocationInput(input: Partial<AllocationInput> = {}): AllocationInput {
  const rib = () => makeChoice('rib', { 'on-the-bone': { roast: 9_000 }, boned: { steak: 5_000, trim: 2_000 } });
  const chuck = () => makeChoice('chuck', { diced: { dice: 12_000, trim: 1_000 }, minced: { trim: 13_000 } });
  return {
    sides: (['left', 'right'] as const).map((side) => makeSide('carcase-1', side, [rib(), chuck()])),
    cuts: [
      makeCut('roast', { tenthPencePerKg: 20_000, clearanceTenthPencePerKg: 8_000 }),
      makeCut('steak', { tenthPencePerKg: 32_000, clearanceTenthPencePerKg: 12_000 }),
      makeCut('dice', { clearanceTenthPencePerKg: 6_000 }),
      makeCut('trim', { kind: 'trim', clearanceTenthPencePerKg: 4_000, mayBeMinced: true, leanPpht: 86_000 }),
      makeCut('mince', { kind: 'mince', clearanceTenthPencePerKg: 5_000, leanPpht: 85_000 }),
    ],
    stock: [],
    boxes: [makeBoxVariant('box', [makeLine('stew', ['dice']), makeLine('roast', ['roast', 'steak'])])],
    loose: [],
    trade: [],
    mince: {
      closedReason: null,
      productCutId: 'mince',
      minLeanPpht: 85_000,
      costTenthPencePerKg: 500,
      allowedCutIds: ['trim'],
    },
    locks: [],
    packingTenthPencePerKg: 400,
    ...input,
  };
}
