import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import { marginOf, marginsBy, sumEntries } from '#shared/engine/margin/margin.ts';
import { butcheryByCarcase, planSales } from '#shared/engine/margin/plan-sales.ts';
import { shareCarcases, type CarcaseAccount, type Sale } from '#shared/engine/margin/share-carcases.ts';
import { splitSale } from '#shared/engine/margin/split-sale.ts';
import { makeAllocationInput } from '#tests/support/make-allocation-input.ts';

const NO_FEE = { ratePpht: 0, fixedPence: 0 };
const COLD_GRAMS = 320_001;
const solver = createSolver({ size: 1 });
let input: AllocationInput;
let plan: AllocationPlan;

beforeAll(async () => {
  input = makeAllocationInput();
  plan = await allocate(input, solver, { gap: 0.01 });
}, 60_000);
afterAll(() => solver.stop());

function accounts(): CarcaseAccount[] {
  const butchery = butcheryByCarcase(input, plan);
  return ['one', 'two'].map((carcaseId) => ({
    carcaseId,
    coldGrams: COLD_GRAMS,
    deadweightPence: 171_113,
    costs: { killPence: 16_501, levyPence: 677, butcheryPence: butchery.get(carcaseId) ?? 0 },
  }));
}

describe('the ledger of a plan', () => {
  it('before carcases are paid for, brings the contribution of the plan to the penny', () => {
    const sales = planSales(input, plan, NO_FEE);
    const butchery = [...butcheryByCarcase(input, plan).values()].reduce((sum, pence) => sum + pence, 0);
    const income = sales.reduce((sum, sale) => sum + sale.incomePence, 0);
    const packing = sales.reduce((sum, sale) => sum + (sale.costs.packingPence ?? 0), 0);
    expect(income - packing - butchery).toBe(plan.contributionPence);
  });

  it('accounts for the grams of everything that the plan makes and sells', () => {
    const sales = planSales(input, plan, NO_FEE);
    const sold = plan.cuts.reduce(
      (sum, cut) => sum + cut.boxGrams + cut.looseGrams + cut.tradeGrams + cut.leftGrams,
      0,
    );
    expect(sales.reduce((sum, sale) => sum + sale.grams, 0)).toBe(sold);
  });

  it('by carcase, channel, box and cut, adds up to the day to the penny and the gram', () => {
    const entries = shareCarcases('day', planSales(input, plan, { ratePpht: 1_500, fixedPence: 20 }), accounts());
    const whole = marginOf(sumEntries(entries));
    expect(whole.deadweightPence).toBe(2 * 171_113);
    expect(sumEntries(entries).coldGrams).toBe(2 * COLD_GRAMS);
    expect(sumEntries(entries).costs).toMatchObject({ killPence: 33_002, levyPence: 1_354 });
    for (const dimension of ['carcaseId', 'channel', 'boxKindId', 'cutId'] as const) {
      const rows = marginsBy(entries, dimension);
      expect(rows.length).toBeGreaterThan(1);
      expect(rows.reduce((sum, { margin }) => sum + margin.gainPence, 0)).toBe(whole.gainPence);
    }
  });

  it('with a card fee, charges each box its own and nothing to what is left over', () => {
    const sales = planSales(input, plan, { ratePpht: 0, fixedPence: 20 });
    const boxes = plan.boxes.reduce((sum, box) => sum + box.boxes, 0);
    expect(sales.reduce((sum, sale) => sum + (sale.costs.cardFeesPence ?? 0), 0)).toBe(20 * boxes);
  });
});

describe('sharing a carcase among what it sold as', () => {
  const sale = (more: Partial<Sale>): Sale => ({
    ...{ carcaseId: 'one', channel: 'boxes', boxKindId: null, cutId: 'mince', grams: 1_000, incomePence: 1_000 },
    costs: {},
    ...more,
  });

  it('leaves a carcase that sold nothing alone in the ledger with its costs and its worth', () => {
    const entries = shareCarcases('day', [sale({})], accounts());
    const two = entries.filter(({ carcaseId }) => carcaseId === 'two');
    expect(two).toMatchObject([{ incomePence: 0, deadweightPence: 171_113, coldGrams: COLD_GRAMS, channel: null }]);
  });

  it('lets frozen stock of another day carry nothing of it', () => {
    const entries = shareCarcases('day', [sale({ carcaseId: null }), sale({})], accounts());
    expect(entries.find(({ carcaseId }) => carcaseId === null)).toMatchObject({ deadweightPence: 0, coldGrams: 0 });
  });

  it('gives a product that loses money after the split nothing to carry', () => {
    const poor = sale({ cutId: 'shin', incomePence: 100, costs: { packingPence: 300 } });
    const entries = shareCarcases('day', [poor, sale({})], accounts());
    expect(entries.find(({ cutId }) => cutId === 'shin')).toMatchObject({ deadweightPence: 0 });
    expect(entries.find(({ cutId }) => cutId === 'mince')).toMatchObject({ deadweightPence: 171_113 });
  });

  it('splits a sale over its parts to the penny, and keeps it whole when nothing is known of them', () => {
    const parts = ['one', 'two', 'one'].map((carcaseId, at) => ({
      carcaseId,
      cutId: `cut-${at}`,
      weight: 1,
      grams: 5,
    }));
    const split = splitSale(sale({ incomePence: 100, costs: { packingPence: 10 } }), parts);
    expect(split.map(({ incomePence }) => incomePence)).toEqual([34, 33, 33]);
    expect(split.reduce((sum, { costs }) => sum + (costs.packingPence ?? 0), 0)).toBe(10);
    expect(splitSale(sale({}), [])).toEqual([sale({})]);
  });
});
