import { formatGrams } from '#shared/domain/words.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import { scale } from '#shared/engine/rounding.ts';
import type { AnimalType, CarcaseFacts, Figure } from './cutout-types.ts';
import { hangingLossPpht } from './hanging-loss.ts';

/** Hot weight as parts per 100,000 of live weight; common practice, a farm's own figure takes their place. */
export const KILLING_OUT_PPHT = {
  steer: 54_000,
  heifer: 53_000,
  'young bull': 57_000,
  cow: 47_000,
} as const satisfies Record<AnimalType, number>;

/**
 * Cold weight is hot weight less 2 %: article 7 of Delegated Regulation (EU) 2017/1182 for carcases weighed hot within an
 * hour of sticking. The 2 % itself is from memory.
 */
export const COLD_OF_HOT_PERCENT = 98;

/** Grams that are accepted; what lies outside is taken for a slip of the pen. */
export const ACCEPTED_GRAMS = {
  live: [100_000, 1_500_000],
  cold: [50_000, 700_000],
  hung: [40_000, 700_000],
  side: [20_000, 360_000],
} as const;

/** Refuses with WEIGHT_OUT_OF_RANGE what is no whole number of grams or lies outside. */
export function requireGrams(what: keyof typeof ACCEPTED_GRAMS, grams: number): void {
  const [low, high] = ACCEPTED_GRAMS[what];
  if (Number.isSafeInteger(grams) && grams >= low && grams <= high) return;
  const range = `${low / 1000} to ${high / 1000} kg`;
  const given = Number.isSafeInteger(grams) ? formatGrams(grams) : String(grams);
  throw new EngineError(
    'WEIGHT_OUT_OF_RANGE',
    `The ${what} weight ${given} is not between ${range}. Check the figure.`,
    {
      node: what,
      figures: { grams, lowGrams: low, highGrams: high },
    },
  );
}

export function coldFromHot(hotGrams: number): number {
  return scale(hotGrams, COLD_OF_HOT_PERCENT, 100);
}

export type WeightChain = {
  live: Figure | null;
  hot: Figure | null;
  cold: Figure;
  /** What the cold weight will be after hanging; the scales may say otherwise. */
  hungEstimateGrams: number;
};

/**
 * Live to hung. The most exact weight there is counts: cold as printed, then hot, then live with its killing-out. A cold
 * weight worked out from a weighed hot one counts as weighed, as it does in trade. Refuses with WEIGHT_OUT_OF_RANGE.
 */
export function chainWeights(carcase: CarcaseFacts): WeightChain {
  const live: Figure | null = carcase.liveGrams === null ? null : { grams: carcase.liveGrams, source: 'weighed' };
  if (live) requireGrams('live', live.grams);
  const hot = hotFigure(carcase);
  const coldGrams = carcase.coldGrams ?? (hot && coldFromHot(hot.grams));
  if (coldGrams === null) {
    const message = 'No weight is known of this carcase. Enter a live, hot or cold weight.';
    throw new EngineError('WEIGHT_OUT_OF_RANGE', message, { node: 'carcase' });
  }
  requireGrams('cold', coldGrams);
  const source = carcase.coldGrams !== null || carcase.hotGrams !== null ? 'weighed' : 'estimated';
  const hungEstimateGrams = scale(coldGrams, 100_000 - hangingLossPpht(carcase.hanging), 100_000);
  return { live, hot, cold: { grams: coldGrams, source }, hungEstimateGrams };
}

function hotFigure(carcase: CarcaseFacts): Figure | null {
  if (carcase.hotGrams !== null) return { grams: carcase.hotGrams, source: 'weighed' };
  if (carcase.liveGrams === null) return null;
  const killingOut = carcase.killingOutPpht ?? KILLING_OUT_PPHT[carcase.type];
  return { grams: scale(carcase.liveGrams, killingOut, 100_000), source: 'estimated' };
}
