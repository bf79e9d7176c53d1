import type { SpecificationEdition } from '#shared/contracts/specifications.ts';
import { formatPercent } from '#shared/domain/words.ts';

const ORIGINS = {
  written: 'written here',
  copied: 'a copy',
  restored: 'back to the shipped figures',
  learned: 'learned from weights',
} as const satisfies Record<SpecificationEdition['origin'], string>;

/** A first edition that nobody copied came with the farm's first setting up. */
export function originWords({ origin, edition }: Pick<SpecificationEdition, 'origin' | 'edition'>): string {
  return origin === 'written' && edition === 1 ? 'as it came' : ORIGINS[origin];
}

/** How far a weight was from what was foreseen: `+ 2.4 %`, `− 0.8 %`; `as foreseen` when there is no difference. */
export function differencePercent(weighedGrams: number, estimatedGrams: number): string {
  if (weighedGrams === estimatedGrams) return 'as foreseen';
  if (estimatedGrams === 0) return 'not foreseen';
  const tenths = Math.round((Math.abs(weighedGrams - estimatedGrams) * 1000) / estimatedGrams);
  return `${weighedGrams > estimatedGrams ? '+' : '−'} ${formatPercent(tenths * 100)}`;
}
