import { checkBox } from '#shared/engine/box-fill/check-box.ts';
import type { Cut } from '#shared/engine/figures/specification.ts';
import type { BoxVariant, RecipeLine } from './allocation-input.ts';
import type { PlannedBox } from './allocation-plan.ts';
import type { PlannedContents } from './deal-packs.ts';
import type { Heaps } from './heaps.ts';
import { levelBoxes } from './level-boxes.ts';

export type WholeBoxes = { contents: PlannedBox['contents']; failedLine: RecipeLine | null };

function sumContents(boxes: readonly PlannedContents[]): PlannedBox['contents'] {
  const cells = new Map<string, PlannedBox['contents'][number]>();
  for (const pack of boxes.flat()) {
    const key = `${pack.lineId} ${pack.cut.id} ${pack.state}`;
    const cell = cells.get(key) ?? { lineId: pack.lineId, cutId: pack.cut.id, state: pack.state, grams: 0, packs: 0 };
    cells.set(key, { ...cell, grams: cell.grams + pack.grams, packs: cell.packs + 1 });
  }
  return [...cells.keys()].sort().flatMap((key) => cells.get(key) ?? []);
}

function findFailure(variant: BoxVariant, boxes: readonly PlannedContents[]): RecipeLine | null {
  for (const packs of boxes) {
    const placed = packs.map((pack, index) => ({
      id: String(index),
      cutId: pack.cut.id,
      grams: pack.grams,
      state: pack.state,
      lineId: pack.lineId,
    }));
    const check = checkBox(variant, placed);
    if (check.isFilled) continue;
    const lineId = check.missing[0]?.lineId ?? check.excess[0]?.lineId;
    return variant.lines.find(({ id }) => id === lineId) ?? variant.lines[0] ?? null;
  }
  return null;
}

/**
 * Levels the planned packs of one variant, box by box, and looks at each box with the checker of box fill. What is not
 * used goes back to the heaps.
 */
export function finishBoxes(
  variant: BoxVariant,
  boxes: readonly PlannedContents[],
  about: { cuts: ReadonlyMap<string, Cut>; heaps: Heaps },
): WholeBoxes {
  levelBoxes(
    boxes.map((packs) => ({ packs, recipe: variant })),
    about.heaps,
    [...about.cuts.values()],
  );
  return { contents: sumContents(boxes), failedLine: findFailure(variant, boxes) };
}
