import type { CutoutNode } from '#shared/contracts/carcases.ts';
import { formatGrams } from '#shared/domain/words.ts';

/** How a weight compares with what was foreseen: `0.300 kg more (2.4 %)`. Empty while there is nothing to compare. */
export function differenceWords(grams: number | null | undefined, foreseenGrams: number): string {
  if (grams === null || grams === undefined || Number.isNaN(grams)) return '';
  const more = grams - foreseenGrams;
  if (more === 0) return 'as foreseen';
  const share = foreseenGrams > 0 ? ` (${((Math.abs(more) / foreseenGrams) * 100).toFixed(1)} %)` : '';
  return `${formatGrams(Math.abs(more))} ${more > 0 ? 'more' : 'less'}${share}`;
}

/** The hung carcase and the parts of one side that a scale can weigh, each with what it weighed so far. */
export function weighableOf(nodes: readonly CutoutNode[], side: 'left' | 'right'): CutoutNode[] {
  return nodes
    .filter(({ path, level, kind }) => (level === 'carcase' || isWithin(path, side)) && kind !== 'loss')
    .map((node) => (node.level === 'carcase' ? { ...node, path: 'hung', name: 'Whole carcase, hung' } : node));
}

function isWithin(path: string, side: string): boolean {
  return path === side || path.startsWith(`${side}/`);
}

type Weighed = { path: string; grams: number | null };

/** What has to be sent: new and altered weights, and null for those that were taken back. */
export function changedWeights(before: readonly Weighed[], now: readonly Weighed[]): Weighed[] {
  const known = new Map(before.map(({ path, grams }) => [path, grams]));
  return now.filter(({ path, grams }) => known.get(path) !== grams).map(({ path, grams }) => ({ path, grams }));
}
