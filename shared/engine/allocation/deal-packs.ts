import type { Cut } from '#shared/engine/figures/specification.ts';
import type { MeatState, RecipeLine } from './allocation-input.ts';
import { packsInBox } from './check-recipe.ts';

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

type Share = { served: number; lineGrams: number; totalGrams: number; index: number };

function isEmptier(a: Share, b: Share): boolean {
  if (Math.abs(a.served - b.served) > 1e-9) return a.served < b.served;
  if (a.lineGrams !== b.lineGrams) return a.lineGrams < b.lineGrams;
  return a.totalGrams !== b.totalGrams ? a.totalGrams < b.totalGrams : a.index < b.index;
}

/**
 * Deals the packs of one line over the boxes. Where three packs of a cut make the line, each serves a third of it; the
 * packs that serve most go first, each to the box that is served least so far.
 */
function dealLine(cells: readonly Cell[], boxes: readonly PlannedContents[]): void {
  const packs = cells
    .flatMap((cell) => {
      const serves = 1 / packsInBox(cell.line, cell.cut).least;
      return cutPacks(cell).map((pack) => ({ pack, serves }));
    })
    .sort((a, b) => b.serves - a.serves || b.pack.grams - a.pack.grams);
  const shares = boxes.map((box, index): Share => ({
    served: 0,
    lineGrams: 0,
    totalGrams: box.reduce((sum, { grams }) => sum + grams, 0),
    index,
  }));
  for (const { pack, serves } of packs) {
    const emptiest = shares.reduce((best, share) => (isEmptier(share, best) ? share : best));
    boxes[emptiest.index]?.push(pack);
    emptiest.served += serves;
    emptiest.lineGrams += pack.grams;
    emptiest.totalGrams += pack.grams;
  }
}

/** Deals every line of a variant over so many boxes. */
export function dealBoxes(lines: readonly RecipeLine[], cells: readonly Cell[], count: number): PlannedContents[] {
  const boxes = Array.from({ length: count }, (): PlannedContents => []);
  for (const line of lines)
    dealLine(
      cells.filter((cell) => cell.line.id === line.id),
      boxes,
    );
  return boxes;
}

/** So many boxes of one pattern; `cells` hold the grams and packs of all of them, odd grams go round in turn. */
export function dealPattern(cells: readonly Cell[], count: number): PlannedContents[] {
  const boxes = Array.from({ length: count }, (): PlannedContents => []);
  let turn = 0;
  for (const cell of cells) {
    const each = Math.floor(cell.grams / count);
    const odd = cell.grams - each * count;
    boxes.forEach((box, index) => {
      const isHeavier = (index - turn + count) % count < odd;
      box.push(...cutPacks({ ...cell, grams: each + (isHeavier ? 1 : 0), packs: cell.packs / count }));
    });
    turn = (turn + odd) % count;
  }
  return boxes;
}
