import { scale } from '#shared/engine/rounding.ts';
import { spokenFor, sumSides, type PrimalFill, type RailBasis } from './spoken-for.ts';

/** Round numbers that a person can picture. */
const SCALES = [50, 40, 30, 25, 20, 15, 10, 8, 6, 5, 4, 3, 2, 1];

/**
 * What some boxes of a kind take of one side, drawn as sold. The number of boxes is the largest round one for which no
 * primal of the side runs out, so that the thin primals can still be seen. Null when the plan has none of this kind.
 */
export function boxTakes(basis: RailBasis, kindId: string): { boxes: number; fills: Map<string, PrimalFill> } | null {
  const planned = basis.boxes.get(kindId);
  const sides = basis.sideIds.length;
  if (!planned || planned.boxes === 0 || sides === 0) return null;
  const uncut = { ...basis, trade: new Map<string, number>(), lots: basis.lots.map(asFree) };
  const all = sumSides(spokenFor(uncut, { boxes: [{ kindId, sold: planned.boxes, held: 0 }], loose: [] }));
  // The plan's boxes take `sold` of all sides: n of them fit one side while n x sold / boxes <= grams / sides.
  const most = Math.min(
    ...[...all.values()]
      .filter((fill) => fill.soldGrams > 0)
      .map((fill) => Math.floor((fill.grams * planned.boxes) / (sides * fill.soldGrams))),
  );
  const boxes = SCALES.find((count) => count <= most) ?? 1;
  const fills = new Map<string, PrimalFill>();
  for (const [primalId, fill] of all) {
    const grams = scale(fill.grams, 1, sides);
    const soldGrams = Math.min(grams, scale(fill.soldGrams, boxes, planned.boxes));
    fills.set(primalId, { grams, soldGrams, heldGrams: 0 });
  }
  return { boxes, fills };
}

function asFree(lot: RailBasis['lots'][number]): RailBasis['lots'][number] {
  return { ...lot, isSoldWhole: false };
}
