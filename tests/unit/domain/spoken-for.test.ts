import { assert, nat, property, record, tuple } from 'fast-check';
import { describe, expect, test } from 'vitest';
import { boxTakes } from '#shared/domain/box-takes.ts';
import { railOfPrimals } from '#shared/domain/rail-of-primals.ts';
import { railBasis, spokenFor, sumSides, type Counts } from '#shared/domain/spoken-for.ts';
import type { TradeLine } from '#shared/engine/allocation/allocation-input.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { makePlan, type HandPlan } from '#tests/support/make-plan.ts';

const anyFit = {
  ...{ carcaseId: null, side: null, minSideGrams: null, maxSideGrams: null },
  ...{ conformations: null, fatClasses: null, minHangingDays: null },
};
const brisket: TradeLine = {
  ...{ id: 'ten-of-brisket', name: 'Brisket', tenthPencePerKg: 9_000, isConfirmed: true, priority: 1 },
  ...{ kind: 'cut', cutId: 'brisket-joint', grams: 10_000 },
};
const hind: TradeLine = {
  ...{ id: 'a-hind', name: 'Hindquarter', tenthPencePerKg: 7_200, isConfirmed: true, priority: 1 },
  ...{ kind: 'unit', unit: { kind: 'quarter', quarter: 'hind' }, quantity: 1, fit: anyFit, instructions: [] },
};
const HIND = traditionalSide.quarters[1].primals.map((primal) => primal.id);

/** Twenty grill boxes and ten roasting boxes from one beast, and mince from its trim. */
const twoBoxes: HandPlan = {
  carcaseIds: ['beast'],
  boxes: [
    { kindId: 'grill', boxes: 20, contents: { 'rump-steak': 500, 'sirloin-steak': 400, mince: 1_000 } },
    { kindId: 'roast', boxes: 10, contents: { 'topside-joint': 1_500, 'brisket-joint': 1_000 } },
  ],
  loose: { 'fillet-steak': { packs: 8, grams: 3_200 } },
  minced: { trim: 30_000, 'lean-trim': 6_000 },
};

function fillsOf(by: HandPlan, counts: Counts) {
  const { input, plan } = makePlan(by);
  const basis = railBasis(input, plan);
  return { basis, sides: spokenFor(basis, counts), day: sumSides(spokenFor(basis, counts)) };
}

const total = (fills: Iterable<{ grams: number; soldGrams: number; heldGrams: number }>) =>
  [...fills].reduce(
    (sum, fill) => ({
      grams: sum.grams + fill.grams,
      soldGrams: sum.soldGrams + fill.soldGrams,
      heldGrams: sum.heldGrams + fill.heldGrams,
    }),
    { grams: 0, soldGrams: 0, heldGrams: 0 },
  );

const nobody: Counts = { boxes: [], loose: [] };

describe('what is spoken for', () => {
  test('with nothing sold, is nothing, and all product hangs free', () => {
    const { day, basis } = fillsOf(twoBoxes, nobody);
    const all = total(day.values());
    expect(all).toMatchObject({ soldGrams: 0, heldGrams: 0 });
    expect(all.grams).toBe(basis.lots.reduce((sum, lot) => sum + lot.grams, 0));
  });

  test('by sold boxes, is the weight of their contents, on the primals that they come from', () => {
    const { day } = fillsOf(twoBoxes, { boxes: [{ kindId: 'roast', sold: 4, held: 2 }], loose: [] });
    expect(day.get('topside')).toMatchObject({ soldGrams: 6_000, heldGrams: 3_000 });
    expect(day.get('brisket')).toMatchObject({ soldGrams: 4_000, heldGrams: 2_000 });
    expect(total(day.values())).toMatchObject({ soldGrams: 10_000, heldGrams: 5_000 });
  });

  test('by mince, falls on the primals whose trim was minced', () => {
    const { day } = fillsOf(twoBoxes, { boxes: [{ kindId: 'grill', sold: 10, held: 0 }], loose: [] });
    expect(total(day.values()).soldGrams).toBe(10 * 1_900);
    const chuck = day.get('chuck');
    expect(chuck?.soldGrams).toBeGreaterThan(0);
    expect(day.get('fore-rib')?.soldGrams).toBeLessThan(chuck?.soldGrams ?? 0);
  });

  test('by loose packs, counts them at the weight that the plan gives them', () => {
    const { day } = fillsOf(twoBoxes, { boxes: [], loose: [{ cutId: 'fillet-steak', sold: 2, held: 1 }] });
    expect(total(day.values())).toMatchObject({ soldGrams: 800, heldGrams: 400 });
  });

  test('by a hindquarter that leaves whole, is all of that quarter and none of the other side', () => {
    const by = { ...twoBoxes, boxes: [], trade: [{ line: hind, sideId: 'beast/left', primalIds: HIND }] };
    const { sides } = fillsOf(by, nobody);
    for (const primalId of HIND) {
      const left = sides.get('beast/left')?.get(primalId);
      expect(left?.soldGrams, primalId).toBe(left?.grams);
      expect(sides.get('beast/right')?.get(primalId)?.soldGrams, primalId).toBe(0);
    }
    expect(sides.get('beast/left')?.get('chuck')?.soldGrams).toBe(0);
  });

  test('a quarter that leaves whole keeps the width that it had', () => {
    const cut = fillsOf({ ...twoBoxes, boxes: [] }, nobody).sides.get('beast/left');
    const by = { ...twoBoxes, boxes: [], trade: [{ line: hind, sideId: 'beast/left', primalIds: HIND }] };
    const whole = fillsOf(by, nobody).sides.get('beast/left');
    for (const [primalId, fill] of cut ?? []) expect(whole?.get(primalId)?.grams, primalId).toBe(fill.grams);
  });

  test('by a cut that a butcher has confirmed, is those grams; by one that is only asked for, nothing', () => {
    const by = { ...twoBoxes, trade: [{ line: brisket, cutGrams: 10_000 }] };
    expect(fillsOf(by, nobody).day.get('brisket')).toMatchObject({ soldGrams: 10_000 });
    const asked = { ...twoBoxes, trade: [{ line: { ...brisket, isConfirmed: false }, cutGrams: 10_000 }] };
    expect(fillsOf(asked, nobody).day.get('brisket')).toMatchObject({ soldGrams: 0 });
  });

  test('never passes what hangs, and sums to the gram over sides, for any counts', () => {
    const counts = record({
      boxes: tuple(nat(60), nat(60), nat(40), nat(40)).map(([a, b, c, d]) => [
        { kindId: 'grill', sold: a, held: b },
        { kindId: 'roast', sold: c, held: d },
        { kindId: 'unknown', sold: 5, held: 5 },
      ]),
      loose: tuple(nat(20), nat(20)).map(([sold, held]) => [{ cutId: 'fillet-steak', sold, held }]),
    });
    assert(
      property(counts, (any) => {
        const { sides, day, basis } = fillsOf({ ...twoBoxes, carcaseIds: ['beast', 'other'] }, any);
        for (const fill of [...sides.values()].flatMap((side) => [...side.values()])) {
          expect(fill.soldGrams + fill.heldGrams).toBeLessThanOrEqual(fill.grams);
          expect(Math.min(fill.soldGrams, fill.heldGrams)).toBeGreaterThanOrEqual(0);
        }
        const bySides = total([...sides.values()].flatMap((side) => [...side.values()]));
        expect(total(day.values())).toEqual(bySides);
        expect(bySides.grams).toBe(basis.lots.reduce((sum, lot) => sum + lot.grams, 0));
      }),
      { numRuns: 60, seed: 20_261_201 },
    );
  });
});

describe('the rail of primals', () => {
  test('keeps the order of the specification and the same kilograms when merged', () => {
    const { day } = fillsOf(twoBoxes, { boxes: [{ kindId: 'grill', sold: 7, held: 3 }], loose: [] });
    const rail = railOfPrimals(traditionalSide, day);
    const ids = traditionalSide.quarters.flatMap((quarter) => quarter.primals.map((primal) => primal.id));
    expect(rail.primals.map((primal) => primal.id)).toEqual(ids);
    expect(rail.narrowPrimals.length).toBeLessThanOrEqual(9);
    expect(total(rail.narrowPrimals)).toEqual(total(rail.primals));
    expect(total(rail.primals)).toEqual(total(day.values()));
  });

  test('leaves out a primal of no weight', () => {
    const rail = railOfPrimals(traditionalSide, new Map([['chuck', { grams: 5, soldGrams: 1, heldGrams: 0 }]]));
    expect(rail.primals).toMatchObject([{ id: 'chuck', grams: 5, soldGrams: 1 }]);
    expect(rail.narrowPrimals).toHaveLength(1);
  });
});

describe('what a box takes of one side', () => {
  test('is drawn for the largest round number of boxes that one side can give', () => {
    const { input, plan } = makePlan(twoBoxes);
    const takes = boxTakes(railBasis(input, plan), 'roast');
    // A side gives 7.0 kg of brisket joint from a brisket of 7.0 kg product: seven boxes of 1 kg, so six.
    expect(takes?.boxes).toBe(6);
    expect(takes?.fills.get('topside')?.soldGrams).toBe(6 * 1_500);
    expect(total(takes?.fills.values() ?? []).heldGrams).toBe(0);
  });

  test('is the same whether or not a butcher has taken the other quarter', () => {
    const by = { ...twoBoxes, trade: [{ line: hind, sideId: 'beast/left', primalIds: HIND }] };
    const { input, plan } = makePlan(by);
    expect(boxTakes(railBasis(input, plan), 'roast')?.boxes).toBeGreaterThan(0);
  });

  test('is null for a kind that the plan does not make', () => {
    const { input, plan } = makePlan(twoBoxes);
    expect(boxTakes(railBasis(input, plan), 'unknown')).toBeNull();
    const none = makePlan({ ...twoBoxes, boxes: [{ kindId: 'grill', boxes: 0, contents: { mince: 1 } }] });
    expect(boxTakes(railBasis(none.input, none.plan), 'grill')).toBeNull();
  });
});
