import type { CutoutNode } from './cutout-types.ts';
import { share } from './side-tree.ts';

/** Packed grams of one carcase by cut. */
export type PackedCuts = Readonly<Record<string, number>>;

/**
 * The cutout with its packs as scales. Packs do not say which side or primal they came from: what was packed of a cut,
 * less what was weighed as a line already, is shared over the lines that give the cut as these were foreseen, and those
 * lines count as weighed. Nothing else moves, so the nodes are for comparing and no balance. Lines of primals that left
 * whole (`left/fore/brisket`) stay as they are, and so does trim, which goes on into mince.
 */
export function weighByPacks(
  nodes: readonly CutoutNode[],
  packed: PackedCuts,
  leftWhole: ReadonlySet<string>,
): CutoutNode[] {
  const lines = nodes.filter(
    ({ level, kind, parentPath }) => level === 'line' && kind === 'cut' && !leftWhole.has(parentPath ?? ''),
  );
  const grams = new Map<string, number>();
  for (const [cutId, packedGrams] of Object.entries(packed)) {
    const giving = lines.filter((line) => line.cutId === cutId);
    const weighed = giving.filter(({ source }) => source === 'weighed').reduce((sum, line) => sum + line.grams, 0);
    const open = giving.filter(({ source, estimatedGrams }) => source === 'estimated' && estimatedGrams > 0);
    if (packedGrams <= weighed || open.length === 0) continue;
    const weights = open.map(({ path, estimatedGrams }) => ({ id: path, weight: estimatedGrams }));
    for (const [path, part] of share(packedGrams - weighed, weights)) grams.set(path, part);
  }
  return nodes.map((node) => {
    const own = grams.get(node.path);
    return own === undefined ? node : { ...node, grams: own, source: 'weighed' };
  });
}
