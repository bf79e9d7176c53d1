import { describe, expect, it } from 'vitest';
import { composition } from '#shared/engine/cutout/composition.ts';
import { britishGrid, irishQualityGrid } from '#shared/engine/figures/price-grids.ts';
import { deadweightValue } from '#shared/engine/margin/deadweight-value.ts';
import { shareJointCost } from '#shared/engine/margin/joint-cost.ts';

describe('the Irish price grid against settlements that were reported', () => {
  // Irish Farmers Journal, September 2022 (article 724440): Hereford cross heifers, base 4.75 with 20 c in-spec and 15 c
  // breed bonus. Weights are rounded to the kilogram there, so that two euro either way is as close as it can come.
  const base = { baseTenthPencePerKg: 4_750 + 200 + 150, levyPence: 0, haulagePence: 0, deductionsPence: 0 };
  it.each([
    { kg: 256, conformation: 'O+', fatClass: '4-', published: 1_274 },
    { kg: 283, conformation: 'O+', fatClass: '3', published: 1_408 },
    { kg: 279.1, conformation: 'O+', fatClass: '4-', published: 1_391 },
  ])('$kg kg at $conformation $fatClass settles near EUR $published', ({ kg, conformation, fatClass, published }) => {
    const value = deadweightValue({
      ...base,
      coldGrams: Math.round(kg * 1000),
      conformation,
      fatClass,
      bornDay: '2021-02-01',
      killDay: '2022-09-01',
      grid: irishQualityGrid,
    });
    expect(value.tenthPencePerKg).toBe(4_980);
    expect(Math.abs(value.grossPence / 100 - published)).toBeLessThanOrEqual(2);
  });

  it('the grid never pays more for a worse conformation, nor for a fatter carcase beyond 4=', () => {
    const { adjustments, conformations } = irishQualityGrid;
    const at = (fatClass: string, conformation: string) => adjustments[fatClass]?.[conformation] ?? NaN;
    for (const fatClass of irishQualityGrid.fatClasses) {
      conformations.slice(1).forEach((worse, before) => {
        expect(at(fatClass, worse)).toBeLessThanOrEqual(at(fatClass, conformations[before] ?? ''));
      });
    }
    for (const conformation of conformations) {
      expect(at('4+', conformation)).toBeLessThanOrEqual(at('4=', conformation));
      expect(at('5', conformation)).toBeLessThanOrEqual(at('4+', conformation));
    }
  });
});

describe('British prices as quoted', () => {
  // AHDB weekly market wrap: R4L steer 675 p/kg cold deadweight in the week ending 15 March 2025.
  it('the headline grade is paid the base price', () => {
    const value = deadweightValue({
      coldGrams: 337_000,
      conformation: 'R',
      fatClass: '4L',
      bornDay: '2023-03-01',
      killDay: '2025-03-12',
      baseTenthPencePerKg: 6_750,
      grid: britishGrid,
      // AHDB levy for cattle in England from 1 April 2024: producer GBP 5.06 a head.
      levyPence: 506,
      haulagePence: 0,
      deductionsPence: 0,
    });
    expect(value.grossPence).toBe(227_475);
    expect(value.netPence).toBe(226_969);
  });

  it('weight steps are those of the scale of 2017: 4, 8 and 12 p from 420, 430 and 440 kg', () => {
    // The Scottish Farmer, 2017, a processor's pricing grid (the scale that stayed for England and Wales).
    const at = (coldGrams: number) =>
      deadweightValue({
        coldGrams,
        conformation: 'R',
        fatClass: '3',
        bornDay: '2024-01-01',
        killDay: '2026-01-01',
        baseTenthPencePerKg: 6_000,
        grid: britishGrid,
        levyPence: 0,
        haulagePence: 0,
        deductionsPence: 0,
      }).weightAdjustment;
    expect([419_999, 420_000, 429_999, 430_000, 440_000, 460_000].map(at)).toEqual([0, -40, -40, -80, -120, -120]);
  });
});

describe('what a better class is worth', () => {
  it('11 % of a 289.2 kg carcase at GBP 3.30 a kg is GBP 104.94, as the cutting project printed', () => {
    // Eblex cutting project, O4H to U2 (Meat Trades Journal archive 13125).
    const kg = Math.round(289.2 * 0.11 * 10) / 10;
    expect(kg).toBe(31.8);
    expect(Math.round(kg * 330)).toBe(10_494);
    const model = (composition('U', '2').tissues.meat - composition('O', '4H').tissues.meat) / 100_000;
    // The model's own 12.05 % would be GBP 115; it is shown beside the project's figure and not bent to it.
    expect(Math.round(289.2 * model * 330)).toBe(11_500);
  });
});

describe('joint cost by net realisable value', () => {
  it('cream and condensed milk share 400,000 as the cost-accounting textbook has it', () => {
    // Horngren, Datar and Rajan, Cost Accounting, chapter on joint products (raw milk split into cream and skim); from
    // memory: buttercream 20,000 gal at $25 less 280,000, condensed milk 50,000 gal at $22 less 520,000.
    const shares = shareJointCost(40_000_000, [
      { id: 'buttercream', salesPence: 50_000_000, furtherCostPence: 28_000_000 },
      { id: 'condensed-milk', salesPence: 110_000_000, furtherCostPence: 52_000_000 },
    ]);
    expect(shares.map(({ sharePence }) => sharePence)).toEqual([11_000_000, 29_000_000]);
    expect(shares.map(({ marginPence }) => marginPence)).toEqual([11_000_000, 29_000_000]);
  });

  it('butter made spreadable, and buttermilk sold at split-off, share 20,000 as 12,000 to 8,000', () => {
    // Exercise 16-30 of the same textbook (statement reprinted by docstoc.com, document 109012537); worked here: 20,000
    // tubs at $2.50 less $0.50 a pound on 10,000 lb, and 20,000 quarts at $1.50.
    const shares = shareJointCost(2_000_000, [
      { id: 'spreadable', salesPence: 20_000 * 250, furtherCostPence: 10_000 * 50 },
      { id: 'buttermilk', salesPence: 20_000 * 150, furtherCostPence: 0 },
    ]);
    expect(shares.map(({ sharePence }) => sharePence)).toEqual([1_200_000, 800_000]);
  });
});
