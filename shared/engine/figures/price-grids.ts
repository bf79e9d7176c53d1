import type { PriceGrid } from '#shared/engine/margin/margin-types.ts';

type Row = readonly [fatClass: string, ...adjustments: number[]];

function toAdjustments(conformations: readonly string[], rows: readonly Row[]): PriceGrid['adjustments'] {
  return Object.fromEntries(
    rows.map(([fatClass, ...values]) => [
      fatClass,
      Object.fromEntries(conformations.map((conformation, at) => [conformation, (values[at] ?? 0) * 10])),
    ]),
  );
}

const IRISH_CONFORMATIONS = ['U+', 'U=', 'U-', 'R+', 'R=', 'R-', 'O+', 'O=', 'O-', 'P+'] as const;

/**
 * Ireland's quality payment system for steers and heifers, cent a kg on the base, as the Irish Farmers' Association
 * published it (ifa.ie, Quality Payment System). Complete and unadjusted; bonuses for age and specification stand apart.
 */
// prettier-ignore
export const irishQualityGrid: PriceGrid = {
  name: 'Irish quality payment system',
  source: "Irish Farmers' Association, Quality Payment System page; cent a kg.",
  conformations: IRISH_CONFORMATIONS,
  fatClasses: ['2+', '3', '4-', '4=', '4+', '5'],
  adjustments: toAdjustments(IRISH_CONFORMATIONS, [
    ['2+', 24, 18, 12, 6, 0, 0, -18, -24, -30, -36],
    ['3', 24, 18, 12, 6, 0, 0, -12, -18, -24, -30],
    ['4-', 24, 18, 12, 6, 0, 0, -12, -18, -24, -30],
    ['4=', 24, 18, 12, 6, 0, 0, -12, -24, -30, -36],
    ['4+', 18, 12, 6, 0, -6, -6, -18, -24, -30, -36],
    ['5', 0, -6, -12, -18, -24, -24, -36, -42, -48, -54],
  ]),
  weightSteps: [],
  ageSteps: [],
};

const BRITISH_CONFORMATIONS = ['E', 'U+', '-U', 'R', 'O+', '-O', 'P+', '-P'] as const;

/**
 * A British processor's grid, pence a kg, for a farm to overwrite with its own buyer's. Conformation and fat are common
 * practice (the middle of the usual ranges); weights are one processor's scale of 2017 as the trade press printed it;
 * age is common practice.
 */
// prettier-ignore
export const britishGrid: PriceGrid = {
  name: 'British grid',
  source: 'Common practice; weight steps from a processor\'s 2017 scale. Replace by your buyer\'s grid.',
  conformations: BRITISH_CONFORMATIONS,
  fatClasses: ['1', '2', '3', '4L', '4H', '5L', '5H'],
  adjustments: toAdjustments(BRITISH_CONFORMATIONS, [
    ['1', -10, -10, -17, -25, -35, -47, -75, -90],
    ['2', 5, 5, -2, -10, -20, -32, -60, -75],
    ['3', 15, 15, 8, 0, -10, -22, -50, -65],
    ['4L', 15, 15, 8, 0, -10, -22, -50, -65],
    ['4H', 5, 5, -2, -10, -20, -32, -60, -75],
    ['5L', -12, -12, -19, -27, -37, -49, -77, -92],
    ['5H', -30, -30, -37, -45, -55, -67, -95, -110],
  ]),
  weightSteps: [
    { fromGrams: 420_000, adjustment: -40 },
    { fromGrams: 430_000, adjustment: -80 },
    { fromGrams: 440_000, adjustment: -120 },
  ],
  ageSteps: [
    { overMonths: 30, adjustment: -200 },
    { overMonths: 36, adjustment: -350 },
  ],
};
