import type { Cut } from '#shared/engine/figures/specification.ts';
import type { MeatState, RecipeLine } from './allocation-input.ts';

/** Packs and grams of one cut that the plan gives to one line over all boxes of a variant. */
export type Cell = { line: RecipeLine; cut: Cut; state: MeatState; grams: number; packs: number };
/** A pack that is to be cut: its weight may still move between its cut's limits. */
export type PlannedPack = { lineId: string; cut: Cut; state: MeatState; grams: number };
export type PlannedContents = PlannedPack[];

/** Packs as equal as whole grams allow. */
function cutPacks({ line, cut, state, grams, packs }: Cell): PlannedPack[] {
  if (packs <= 0) return [];
  const each = Math.floor(grams / packs);
  const heavier = grams - each * packs;
  return Array.from({ length: packs }, (_, index) => ({
    lineId: line.id,
    cut,
    state,
    grams: each + (index < heavier ? 1 : 0),
  }));
}

type Share = { lineGrams: number; totalGrams: number; index: number };

function isEmptier(a: Share, b: Share): boolean {
  if (a.lineGrams !== b.lineGrams) return a.lineGrams < b.lineGrams;
  return a.totalGrams !== b.totalGrams ? a.totalGrams < b.totalGrams : a.index < b.index;
}

/**
 * Deals the packs of one line over the boxes, heaviest first, each to the box that has least of the line so far: like
 * packs come out even, and a box without the big joint gets more of the small ones.
 */
export function dealLine(cells: readonly Cell[], boxes: readonly PlannedContents[]): void {
  const packs = cells.flatMap(cutPacks).sort((a, b) => b.grams - a.grams);
  const shares = boxes.map((box, index): Share => ({
    lineGrams: 0,
    totalGrams: box.reduce((sum, { grams }) => sum + grams, 0),
    index,
  }));
  for (const pack of packs) {
    const emptiest = shares.reduce((best, share) => (isEmptier(share, best) ? share : best));
    boxes[emptiest.index]?.push(pack);
    emptiest.lineGrams += pack.grams;
    emptiest.totalGrams += pack.grams;
  }
}
