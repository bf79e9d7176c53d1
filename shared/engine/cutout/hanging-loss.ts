import { divideHalfAway } from '#shared/engine/rounding.ts';
import type { CarcaseFacts } from './cutout-types.ts';

/** A day, and parts per 100,000 lost by then. */
export type LossPoint = readonly [day: number, ppht: number];

/**
 * Weight lost from cold to hung, parts per 100,000. Common practice, and screens say so. The whole side loses nothing up
 * to day 2 (it is in the 2 % between hot and cold), then 0.10 % a day to day 14 and 0.07 % a day after. The bag's figures
 * are the purge and shrink of vacuum-packed primals; published ones for rib-eye and strip loin lie at 0.2 to 1.2 %.
 */
const HANGING: Readonly<Record<CarcaseFacts['hanging']['method'], readonly LossPoint[]>> = {
  'whole side': [
    [2, 0],
    [14, 1_200],
    [21, 1_690],
    [28, 2_180],
  ],
  'in the bag': [
    [0, 0],
    [14, 800],
    [21, 1_000],
    [35, 1_200],
  ],
};

/** Dry surface that is cut off a hung side and thrown away; common practice. Beyond day 35 it is taken as at day 35. */
const SURFACE_TRIM: readonly LossPoint[] = [
  [14, 0],
  [21, 500],
  [28, 1_500],
  [35, 3_000],
  [36, 3_000],
];

/** Piecewise linear; level before the first point, and on at the last slope after the last. */
export function lossAt(points: readonly LossPoint[], day: number): number {
  const [first] = points;
  if (!first || day <= first[0]) return first?.[1] ?? 0;
  let from = first;
  let to = first;
  for (const point of points.slice(1)) {
    from = to;
    to = point;
    if (day <= point[0]) break;
  }
  const run = BigInt(to[0] - from[0]);
  return from[1] + divideHalfAway(BigInt(to[1] - from[1]) * BigInt(day - from[0]), run);
}

/** Parts per 100,000 of cold weight lost after so many whole days; at most half. */
export function hangingLossPpht(hanging: CarcaseFacts['hanging']): number {
  return Math.min(50_000, lossAt(HANGING[hanging.method], hanging.days));
}

/** Parts per 100,000 of the hung side that go from meat to loss as dried surface. None in the bag. */
export function surfaceTrimPpht(hanging: CarcaseFacts['hanging']): number {
  return hanging.method === 'whole side' ? lossAt(SURFACE_TRIM, hanging.days) : 0;
}
