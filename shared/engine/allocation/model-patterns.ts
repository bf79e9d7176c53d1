import type { Term } from '#shared/engine/linear/lp-model.ts';
import type { BoxVariant, RecipeLine } from './allocation-input.ts';
import {
  addTerm,
  getCut,
  heapKey,
  type AllocationModel,
  type Pattern,
  type PatternColumns,
} from './allocation-model.ts';

/** Grams above the guarantee in a pattern's average box, so that whole grams never fall below it. */
const ROUNDING_GRAMS = 2;

type Draft = { variant: BoxVariant; name: string; boxes: string; patterns: readonly Pattern[] };

function addLineRows(
  model: AllocationModel,
  line: RecipeLine,
  about: { name: string; boxes: string; grams: readonly Term[] },
): void {
  if (about.grams.length === 0) return;
  model.lp.addRow(`least_${about.name}`, [...about.grams, [-line.minGrams / 1000, about.boxes]], ['>=', 0]);
  model.lp.addRow(`most_${about.name}`, [...about.grams, [-line.maxGrams / 1000, about.boxes]], ['<=', 0]);
}

function addPattern(model: AllocationModel, draft: Draft, index: number): PatternColumns {
  const { lp } = model;
  const pattern = draft.patterns[index] ?? [];
  const name = `${draft.name}_p${index + 1}`;
  const boxes = lp.addColumn(`boxes_${name}`, { kind: 'integer' });
  const grams = pattern.map(({ cutId, state, packs }, cell) => {
    const cut = getCut(model, cutId);
    const column = lp.addColumn(`in_${name}_${cell + 1}`);
    addTerm(model.uses, heapKey(cutId, state), [1, column]);
    lp.addRow(
      `heavy_${name}_${cell + 1}`,
      [
        [1, column],
        [(-packs * cut.minPackGrams) / 1000, boxes],
      ],
      ['>=', 0],
    );
    lp.addRow(
      `light_${name}_${cell + 1}`,
      [
        [1, column],
        [(-packs * cut.maxPackGrams) / 1000, boxes],
      ],
      ['<=', 0],
    );
    return column;
  });
  const terms = grams.map((column): Term => [1, column]);
  for (const [place, line] of draft.variant.lines.entries()) {
    const own = terms.filter((_, cell) => pattern[cell]?.line.id === line.id);
    addLineRows(model, line, { name: `${name}_l${place + 1}`, boxes, grams: own });
  }
  const guarantee: Term = [-(draft.variant.guaranteedGrams + ROUNDING_GRAMS) / 1000, boxes];
  lp.addRow(`guarantee_${name}`, [...terms, guarantee], ['>=', 0]);
  return { pattern, boxes, grams };
}

/**
 * Every box of the variant follows a pattern, and all boxes of one pattern can weigh the same: what this model answers
 * is fillable box by box.
 */
export function addPatterns(model: AllocationModel, draft: Draft): PatternColumns[] {
  const columns = draft.patterns.map((_, index) => addPattern(model, draft, index));
  const parts = columns.map(({ boxes }): Term => [-1, boxes]);
  model.lp.addRow(`patterns_${draft.name}`, [[1, draft.boxes], ...parts], ['=', 0]);
  return columns;
}
