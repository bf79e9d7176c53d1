import type { CutoutNode } from './cutout-types.ts';

/** Foreseen and weighed of one cut, trim, bone or fat, or of a primal, over what was weighed of it; grams. */
export type CutPair = {
  /** A cut id; else `bone`, `fat` or `loss`; `primal:brisket` for a primal of which no line was weighed. */
  id: string;
  name: string;
  lines: number;
  estimatedGrams: number;
  weighedGrams: number;
};

/** Which row a node counts for: a line for its cut; a primal for itself where none of its lines was weighed. */
function countsFor(node: CutoutNode, cutPaths: ReadonlySet<string | null>): string | null {
  if (node.source !== 'weighed') return null;
  if (node.level === 'line') return node.cutId ?? node.kind;
  return node.level === 'primal' && !cutPaths.has(node.path) ? `primal:${node.path.split('/')[2]}` : null;
}

function listWeighed(nodes: readonly CutoutNode[]): { node: CutoutNode; id: string }[] {
  const lines = nodes.filter(({ level, source }) => level === 'line' && source === 'weighed');
  const cutPaths = new Set(lines.map(({ parentPath }) => parentPath));
  return nodes.flatMap((node) => {
    const id = countsFor(node, cutPaths);
    return id === null ? [] : [{ node, id }];
  });
}

/**
 * Estimated against weighed by cut, in the order in which the lines come. What was not weighed is left out on both sides.
 * Give the nodes of one carcase, or those of several, each on its own, for all of them pooled.
 */
export function compareCuts(...carcases: (readonly CutoutNode[])[]): CutPair[] {
  const pairs = new Map<string, CutPair>();
  for (const { node, id } of carcases.flatMap(listWeighed)) {
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
