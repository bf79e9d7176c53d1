import type { Allocation, PlannedSide } from '#shared/contracts/allocation.ts';

export const CARCASE = '7d7f8c1e-1111-4111-8111-111111111111';

export function makeSide(more: Partial<PlannedSide> = {}): PlannedSide {
  const primals = [
    { id: 'fore-rib', name: 'Fore rib', shortName: 'Rib', grams: 12_000, soldGrams: 8_000, heldGrams: 1_000 },
    { id: 'brisket', name: 'Brisket', shortName: 'Brisket', grams: 9_000, soldGrams: 0, heldGrams: 0 },
  ];
  return {
    carcaseId: CARCASE,
    side: 'left',
    earTag: 'UK123450600214',
    title: 'Angus steer',
    sideGrams: 160_000,
    source: 'estimated',
    rail: {
      primals,
      narrowPrimals: [{ ...primals[0], id: 'rib-and-brisket', name: 'Rib, brisket', grams: 21_000 } as never],
    },
    choices: [
      {
        choiceId: 'fore-rib',
        name: 'Fore rib',
        primalIds: ['fore-rib'],
        wayId: 'bone-in',
        soldTo: null,
        isLocked: true,
        cuts: [{ cutId: 'rib-on-the-bone', name: 'Rib on the bone', grams: 8_400 }],
        lockCostPence: 1_860,
        ways: [
          { wayId: 'bone-in', name: 'On the bone', closedReason: null },
          { wayId: 'rib-eye', name: 'Rib-eye steaks', closedReason: null },
          { wayId: 't-bone', name: 'Cutlets', closedReason: 'Over thirty months: vertebral column has to come out.' },
        ],
      },
      {
        choiceId: 'brisket',
        name: 'Brisket',
        primalIds: ['brisket'],
        wayId: null,
        soldTo: 'Pellow & Dray',
        isLocked: false,
        cuts: [],
        lockCostPence: null,
        ways: [{ wayId: 'rolled', name: 'Rolled', closedReason: null }],
      },
    ],
    ...more,
  };
}

export function makeAllocation(more: Partial<Allocation> = {}): Allocation {
  return {
    id: '0c1f8c1e-2222-4222-8222-222222222222',
    dayId: '1c1f8c1e-3333-4333-8333-333333333333',
    day: '2026-12-10',
    state: 'draft',
    createdAt: '2026-12-01T09:00:00.000Z',
    figuresVersion: 4,
    isOutOfDate: false,
    isProven: true,
    isExplained: true,
    promise: null,
    gapBasisPoints: 1,
    solveMs: 900,
    contributionPence: 273_100,
    deadweightPence: 182_000,
    gainPence: 91_100,
    cautions: [],
    unpriced: [],
    coldGrams: 640_000,
    productGrams: 448_000,
    locks: [{ carcaseId: CARCASE, side: 'left', choiceId: 'fore-rib', wayId: 'bone-in' }],
    sides: [makeSide()],
    boxes: [
      {
        boxKindId: 'a',
        name: 'Hearth',
        count: 38,
        promised: 35,
        sold: 4,
        held: 1,
        limitedBy: ['Steaks: 300 g short for one more'],
      },
      { boxKindId: 'b', name: 'Table', count: 14, promised: null, sold: 0, held: 0, limitedBy: [] },
    ],
    loose: [{ cutId: 'mince', name: 'Mince', packs: 20, promised: 18, grams: 10_000, sold: 3, held: 0 }],
    trade: [],
    cuts: [
      {
        cutId: 'mince',
        name: 'Mince',
        stockGrams: 0,
        stockUsedGrams: 0,
        madeGrams: 60_000,
        boxGrams: 40_000,
        looseGrams: 10_000,
        tradeGrams: 0,
        mincedGrams: 0,
        leftGrams: 10_000,
        worthPencePerKg: 420,
      },
    ],
    shortfalls: [],
    ...more,
  };
}
