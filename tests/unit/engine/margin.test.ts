import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { britishGrid } from '#shared/engine/figures/price-grids.ts';
import { breakEvenBoxPrice, cardFeeOf, deadweightBoxPrice } from '#shared/engine/margin/break-even.ts';
import { deadweightValue } from '#shared/engine/margin/deadweight-value.ts';
import { shareJointCost } from '#shared/engine/margin/joint-cost.ts';
import { marginOf, marginsBy, sumEntries } from '#shared/engine/margin/margin.ts';
import type { DeadweightInput, MarginEntry } from '#shared/engine/margin/margin-types.ts';

const settings = { numRuns: 300, seed: 20261201 };
const steer: DeadweightInput = {
  coldGrams: 338_000,
  conformation: '-U',
  fatClass: '4H',
  bornDay: '2024-05-20',
  killDay: '2026-11-20',
  baseTenthPencePerKg: 6_400,
  grid: britishGrid,
  levyPence: 506,
  haulagePence: 1_800,
  deductionsPence: 950,
};

describe('deadweight value', () => {
  it('is cold weight at base, class, weight and age, less what is deducted', () => {
    expect(deadweightValue(steer)).toEqual({
      tenthPencePerKg: 6_380,
      classAdjustment: -20,
      weightAdjustment: 0,
      ageAdjustment: 0,
      grossPence: 215_644,
      deductedPence: 3_256,
      netPence: 212_388,
    });
  });

  it('at thirty months to the day is not over, the day after is', () => {
    expect(deadweightValue(steer).ageAdjustment).toBe(0);
    expect(deadweightValue({ ...steer, killDay: '2026-11-21' }).ageAdjustment).toBe(-200);
    expect(deadweightValue({ ...steer, bornDay: '2023-11-19' }).ageAdjustment).toBe(-350);
    expect(deadweightValue({ ...steer, bornDay: null }).ageAdjustment).toBe(-350);
  });

  it('does not mind in which order the steps are written', () => {
    const grid = { ...britishGrid, weightSteps: [...britishGrid.weightSteps].reverse() };
    expect(deadweightValue({ ...steer, grid, coldGrams: 435_000 }).weightAdjustment).toBe(-80);
  });

  it('refuses a class that the grid has no price for', () => {
    expect(() => deadweightValue({ ...steer, conformation: 'S' })).toThrow('has no price for S 4H');
  });
});

describe('contribution, deadweight value and gain', () => {
  it('are income less costs, and less what the beef would have brought deadweight', () => {
    const costs = { killPence: 15_000, butcheryPence: 38_000, packingPence: 6_000, cardFeesPence: 4_100 };
    expect(marginOf({ incomePence: 340_000, costs, deadweightPence: 212_388, coldGrams: 338_000 })).toEqual({
      incomePence: 340_000,
      costPence: 63_100,
      contributionPence: 276_900,
      deadweightPence: 212_388,
      gainPence: 64_512,
      contributionPerKg: 8_192,
      deadweightPerKg: 6_284,
      gainPerKg: 1_909,
    });
  });

  const anyEntry: fc.Arbitrary<MarginEntry> = fc.record({
    carcaseId: fc.constantFrom('a', 'b', null),
    dayId: fc.constantFrom('monday', 'friday'),
    channel: fc.constantFrom('box', 'trade', null),
    boxKindId: fc.constantFrom('everyday', null),
    cutId: fc.constantFrom('mince', 'brisket-joint', null),
    incomePence: fc.nat(100_000),
    costs: fc.record({ killPence: fc.nat(5_000), refundsPence: fc.nat(900) }, { requiredKeys: [] }),
    deadweightPence: fc.nat(50_000),
    coldGrams: fc.nat(300_000),
  });

  it('by any dimension add up to the whole, to the penny and the gram, in whatever order the sales come', () => {
    fc.assert(
      fc.property(fc.array(anyEntry, { minLength: 1, maxLength: 20 }), (entries) => {
        const whole = marginOf(sumEntries(entries));
        for (const dimension of ['carcaseId', 'dayId', 'channel', 'boxKindId', 'cutId'] as const) {
          const rows = marginsBy(entries, dimension);
          expect(rows.reduce((sum, { margin }) => sum + margin.gainPence, 0)).toBe(whole.gainPence);
          expect(rows.reduce((sum, { margin }) => sum + margin.contributionPence, 0)).toBe(whole.contributionPence);
          expect(marginsBy([...entries].reverse(), dimension)).toEqual(rows);
        }
      }),
      settings,
    );
  });

  it('per kg of nothing is nothing, not a number that is none', () => {
    expect(marginOf({ incomePence: 100, costs: {}, deadweightPence: 0, coldGrams: 0 }).gainPerKg).toBe(0);
  });
});

describe('joint cost', () => {
  const products = fc
    .array(fc.record({ salesPence: fc.nat(1_000_000), furtherCostPence: fc.nat(300_000) }), {
      minLength: 1,
      maxLength: 12,
    })
    .map((list) => list.map((product, at) => ({ ...product, id: `p${String(at).padStart(2, '0')}` })));

  it('is shared to the penny, and never makes one product gain what another loses by order', () => {
    fc.assert(
      fc.property(fc.integer({ min: -5_000_000, max: 50_000_000 }), products, (jointPence, list) => {
        const shares = shareJointCost(jointPence, list);
        expect(shares.reduce((sum, { sharePence }) => sum + sharePence, 0)).toBe(jointPence);
        const turned = shareJointCost(jointPence, [...list].reverse()).reverse();
        expect(turned).toEqual(shares);
        for (const share of shares) expect(share.marginPence).toBe(share.netRealisablePence - share.sharePence);
      }),
      settings,
    );
  });

  it('falls on no product that loses money after split-off while another earns', () => {
    const shares = shareJointCost(1_000, [
      { id: 'bone', salesPence: 100, furtherCostPence: 400 },
      { id: 'steak', salesPence: 5_000, furtherCostPence: 500 },
    ]);
    expect(shares.map(({ sharePence }) => sharePence)).toEqual([0, 1_000]);
  });

  it('with nothing of any value, goes by sales, then evenly', () => {
    const none = { salesPence: 0, furtherCostPence: 10 };
    const ids = ['a', 'b', 'c'];
    expect(
      shareJointCost(
        100,
        ids.map((id) => ({ id, ...none })),
      ).map(({ sharePence }) => sharePence),
    ).toEqual([34, 33, 33]);
    expect(shareJointCost(100, [])).toEqual([]);
  });
});

describe('break-even prices', () => {
  const fee = { ratePpht: 1_500, fixedPence: 20 };

  it('of a box is the lowest price that pays for all of it after the card fee', () => {
    fc.assert(
      fc.property(
        fc.nat(40_000),
        fc.nat(3_000),
        fc.record({ ratePpht: fc.nat(5_000), fixedPence: fc.nat(50) }),
        (jointSharePence, directPence, anyFee) => {
          const price = breakEvenBoxPrice({ jointSharePence, directPence, fee: anyFee });
          const left = (at: number) => at - cardFeeOf(at, anyFee) - jointSharePence - directPence;
          expect(left(price)).toBeGreaterThanOrEqual(0);
          if (price > 0) expect(left(price - 1)).toBeLessThan(0);
        },
      ),
      settings,
    );
  });

  it('against deadweight is the price at which the gain is nought', () => {
    const kind = { pricePence: 14_500, boxes: 40, gainPence: 64_512, fee };
    const price = deadweightBoxPrice(kind);
    expect(price).toBe(12_863);
    const gainAt = (pence: number) => {
      const net = (one: number) => one - cardFeeOf(one, fee);
      return kind.gainPence - kind.boxes * (net(kind.pricePence) - net(pence));
    };
    expect(gainAt(12_863)).toBeGreaterThanOrEqual(0);
    expect(gainAt(12_862)).toBeLessThan(0);
    expect(deadweightBoxPrice({ ...kind, boxes: 0 })).toBeNull();
  });
});
