import type { Spread } from './promise-types.ts';

/**
 * Relative error of an estimate, one standard deviation, parts per 100,000, while a farm has no history. From live weight:
 * killing-out of 18,479 Irish cattle had a standard deviation of 3.21 points on a mean of 55.86 % (PMC6447276), which is
 * 5.7 %. Kill sheet, primal and line: common practice.
 */
export const DEFAULT_SPREAD_PPHT = {
  fromLiveWeight: 5_700,
  fromKillSheet: 300,
  primal: 3_000,
  line: 6_000,
} as const;

/** A default counts as much as this many carcases of the farm's own. */
const PRIOR_CARCASES = 6;
const WHOLE = 100_000;

/** Nothing is left to guess once the cuts are weighed. */
export const WEIGHED_SPREAD: Spread = { carcasePpht: 0, primalPpht: 0, linePpht: 0 };

export function defaultSpread(coldSource: 'estimated' | 'weighed'): Spread {
  const { fromLiveWeight, fromKillSheet, primal, line } = DEFAULT_SPREAD_PPHT;
  return {
    carcasePpht: coldSource === 'estimated' ? fromLiveWeight : fromKillSheet,
    primalPpht: primal,
    linePpht: line,
  };
}

/**
 * The farm's own spread: the variance of weighed against estimated, pooled with a default that counts as six carcases.
 * One pair a carcase; pairs without an estimate are left out.
 */
export function poolSpread(
  defaultPpht: number,
  history: readonly { estimatedGrams: number; weighedGrams: number }[],
): number {
  const errors = history
    .filter(({ estimatedGrams, weighedGrams }) => estimatedGrams > 0 && weighedGrams > 0)
    .map(({ estimatedGrams, weighedGrams }) => weighedGrams / estimatedGrams - 1);
  const squares = errors.reduce((sum, error) => sum + error * error, 0);
  const prior = (defaultPpht / WHOLE) ** 2;
  return Math.round(Math.sqrt((PRIOR_CARCASES * prior + squares) / (PRIOR_CARCASES + errors.length)) * WHOLE);
}
