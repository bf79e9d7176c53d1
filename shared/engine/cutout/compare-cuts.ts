import type { CutoutNode } from './cutout-types.ts';

/** Foreseen and weighed of one cut, trim, bone or fat, over the lines of it that were weighed; grams. */
export type CutPair = {
  /** A cut id; else `bone`, `fat` or `loss`. */
  id: string;
  name: string;
  lines: number;
  estimatedGrams: number;
  weighedGrams: number;
};

/**
 * Estimated against weighed by cut, in the order in which the lines come. Lines that were not weighed are left out on both
 * sides. Give the nodes of one carcase, or those of several for all of them pooled.
 */
export function compareCuts(nodes: readonly CutoutNode[]): CutPair[] {
  const pairs = new Map<string, CutPair>();
  for (const node of nodes) {
    if (node.level !== 'line' || node.source !== 'weighed') continue;
    const id = node.cutId ?? node.kind;
    const before = pairs.get(id) ?? { id, name: node.name, lines: 0, estimatedGrams: 0, weighedGrams: 0 };
    pairs.set(id, {
      ...before,
      lines: before.lines + 1,
      estimatedGrams: before.estimatedGrams + node.estimatedGrams,
      weighedGrams: before.weighedGrams + node.grams,
    });
  }
  return [...pairs.values()];
}
