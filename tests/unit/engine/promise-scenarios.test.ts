import { describe, expect, it } from 'vitest';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import { rankOfBound } from '#shared/engine/promise/order-statistic.ts';
import { drawSupply, readUncertainty } from '#shared/engine/promise/scenarios.ts';
import { hashText, normalOf } from '#shared/engine/promise/seeded-normal.ts';
import { DEFAULT_SPREAD_PPHT, defaultSpread, poolSpread } from '#shared/engine/promise/spread.ts';
import { makeAllocationInput } from '#tests/support/make-allocation-input.ts';

const input = makeAllocationInput({}, [{ id: 'one' }]);
/** Every choice its first open way. */
const fates: AllocationPlan['fates'] = input.sides.flatMap((side) =>
  side.choices.map(({ choiceId, ways }) => ({
    sideId: side.id,
    carcaseId: side.carcaseId,
    side: side.side,
    choiceId,
    wayId: ways[0]?.wayId ?? null,
    soldPrimals: [],
  })),
);
const plan = { fates } as unknown as AllocationPlan;
const grams = (supply: Map<string, number>) => [...supply.values()].reduce((sum, each) => sum + each, 0);

function moments(values: number[]) {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1);
  return { mean, deviation: Math.sqrt(variance) };
}

describe('the draws', () => {
  it('are standard normal, and two things drawn have nothing in common', () => {
    const [a, b] = [hashText('one'), hashText('two')];
    const left = Array.from({ length: 20_000 }, (_, at) => normalOf(3, at, a));
    const right = Array.from({ length: 20_000 }, (_, at) => normalOf(3, at, b));
    const { mean, deviation } = moments(left);
    expect(Math.abs(mean)).toBeLessThan(0.03);
    expect(Math.abs(deviation - 1)).toBeLessThan(0.03);
    const product = left.reduce((sum, value, at) => sum + value * (right[at] ?? 0), 0) / left.length;
    expect(Math.abs(product)).toBeLessThan(0.03);
    const beyondTwo = left.filter((value) => Math.abs(value) > 1.96).length / left.length;
    expect(Math.abs(beyondTwo - 0.05)).toBeLessThan(0.01);
  });

  it('of the carcase have mean 1 and the stated spread', () => {
    const spreads = { one: { carcasePpht: DEFAULT_SPREAD_PPHT.fromLiveWeight, primalPpht: 0, linePpht: 0 } };
    const uncertainty = readUncertainty({ input, plan, spreads });
    const foreseen = grams(drawSupply(readUncertainty({ input, plan, spreads: {} }), { seed: 1, scenario: 0 }));
    const totals = Array.from({ length: 4_000 }, (_, scenario) =>
      grams(drawSupply(uncertainty, { seed: 1, scenario })),
    );
    const { mean, deviation } = moments(totals.map((total) => total / foreseen));
    expect(Math.abs(mean - 1)).toBeLessThan(0.004);
    expect(Math.abs(deviation - 0.057)).toBeLessThan(0.003);
  });

  it('of primals and lines leave the side at its weight', () => {
    const spreads = { one: { carcasePpht: 0, primalPpht: 3_000, linePpht: 0 } };
    const foreseen = grams(drawSupply(readUncertainty({ input, plan, spreads: {} }), { seed: 1, scenario: 0 }));
    for (let scenario = 0; scenario < 50; scenario += 1) {
      const drawn = grams(drawSupply(readUncertainty({ input, plan, spreads }), { seed: 1, scenario }));
      // Bone, fat and loss are a part of every primal, so that the products move a little, and much less than 3 %.
      expect(Math.abs(drawn / foreseen - 1)).toBeLessThan(0.01);
    }
  });

  it('do not change when another carcase joins', () => {
    const spreads = { one: defaultSpread('estimated') };
    const more = makeAllocationInput({}, [{ id: 'one' }, { id: 'two' }]);
    const alone = drawSupply(readUncertainty({ input, plan, spreads }), { seed: 5, scenario: 3 });
    const joined = drawSupply(readUncertainty({ input: more, plan, spreads }), { seed: 5, scenario: 3 });
    expect([...joined].sort()).toEqual([...alone].sort());
  });
});

describe('the order statistic', () => {
  it.each([
    [1000, 0.9, 85],
    [59, 0.95, 1],
    [58, 0.95, 0],
    [93, 0.95, 2],
    [29, 0.9, 1],
    [28, 0.9, 0],
  ])('of %i scenarios at %f is rank %i, as tables of one-sided tolerance limits have it', (n, confidence, rank) => {
    // Distribution-free tolerance limits: 59 and 93 draws are the classical least numbers for 95 % / 95 % (Wilks 1941).
    expect(rankOfBound(n, confidence)).toBe(rank);
  });
});

describe("the farm's own spread", () => {
  it('without history is the default, and moves to what was seen as carcases come', () => {
    expect(poolSpread(3_000, [])).toBe(3_000);
    const wide = Array.from({ length: 6 }, () => ({ estimatedGrams: 10_000, weighedGrams: 10_600 }));
    expect(poolSpread(3_000, wide)).toBe(Math.round(Math.sqrt((0.03 ** 2 + 0.06 ** 2) / 2) * 100_000));
    const exact = Array.from({ length: 600 }, () => ({ estimatedGrams: 10_000, weighedGrams: 10_000 }));
    expect(poolSpread(3_000, exact)).toBeLessThan(300);
  });
});
