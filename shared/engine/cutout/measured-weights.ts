import { formatGrams } from '#shared/domain/words.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import { divideHalfAway } from '#shared/engine/rounding.ts';
import type { CutoutNode } from './cutout-types.ts';
import { share, type TreeNode } from './side-tree.ts';

/** Parts of 1,000 of a weighed parent by which its weighed parts may disagree with it. */
export const WEIGHING_TOLERANCE_PER_MILLE = 5;
/**
 * An estimate gives way to the scales below it, up to a fifth above what was foreseen: more than three standard
 * deviations of the widest spread (5.7 % from live weight). Beyond that a slip at the scales is the likelier cause.
 */
export const ESTIMATE_TOLERANCE_PER_MILLE = 200;

type Measured = Readonly<Record<string, number>>;

/** What the scales say of a node. `firmGrams` is its weight when nothing of it is left to guess. */
type Known = { node: TreeNode; firmGrams: number | null; floorGrams: number; children: Known[] };

/**
 * A node that was weighed is firm; so is one whose parts all are (cutting loss, which no one weighs, follows from the
 * rest). `floorGrams` is what lies in it for certain.
 */
function know(node: TreeNode, measured: Measured): Known {
  const children = node.children.map((child) => know(child, measured));
  const loose = children.filter((child) => child.firmGrams === null);
  const known = sum(children.map((child) => child.firmGrams ?? child.floorGrams));
  const own = measured[node.path];
  if (own !== undefined) return { node, firmGrams: own, floorGrams: own, children };
  const isFirm = children.length > loose.length && loose.every((child) => isGuessed(child));
  if (!isFirm) return { node, firmGrams: null, floorGrams: known, children };
  const lossGrams = sum(loose.map((child) => child.node.estimatedGrams));
  const restGrams = node.estimatedGrams - lossGrams;
  const loss = restGrams > 0 ? divideHalfAway(BigInt(known) * BigInt(lossGrams), BigInt(restGrams)) : 0;
  return { node, firmGrams: known + loss, floorGrams: known + loss, children };
}

/** Cutting loss, and what the specification foresees nothing of: they do not keep a parent from being firm. */
function isGuessed({ node, floorGrams }: Known): boolean {
  return node.kind === 'loss' || (node.estimatedGrams === 0 && floorGrams === 0);
}

/**
 * Gives every node its weight. Measured parts keep theirs; the rest share what remains as the specification has it, none
 * below what is certain in it. Where a parent and its parts are all weighed they may differ by 0.5 % of the parent, which
 * stays with the parent as its weighing difference; beyond that the entry is refused with MEASURED_EXCEEDS_PARENT.
 * In reading order: carcase, side, quarter, primal, lines.
 */
export function weighTree(tree: TreeNode, measured: Measured): CutoutNode[] {
  const root = know(tree, measured);
  const grams = root.firmGrams ?? Math.max(tree.estimatedGrams, root.floorGrams);
  const nodes: CutoutNode[] = [];
  settle(root, grams, { measured, nodes });
  return nodes;
}

type Scales = { measured: Measured; nodes: CutoutNode[] };

function settle(known: Known, grams: number, scales: Scales): void {
  const { node } = known;
  if (scales.measured[node.path] === undefined) refuseSlip(known, grams);
  const parts = divide(known, grams);
  const total = sum([...parts.values()]);
  const isLeaf = node.children.length === 0;
  scales.nodes.push({
    path: node.path,
    parentPath: node.parentPath,
    level: node.level,
    kind: node.kind,
    name: node.name,
    cutId: node.cutId,
    estimatedGrams: node.estimatedGrams,
    grams,
    source: known.firmGrams === null ? 'estimated' : 'weighed',
    weighingDifferenceGrams: isLeaf ? 0 : grams - total,
  });
  for (const child of known.children) settle(child, parts.get(child.node.path) ?? 0, scales);
}

function divide(known: Known, grams: number): Map<string, number> {
  const firm = known.children.filter((child) => child.firmGrams !== null);
  const parts = new Map(firm.map((child) => [child.node.path, child.firmGrams ?? 0]));
  let rest = known.children.filter((child) => child.firmGrams === null);
  let left = grams - sum([...parts.values()]);
  while (rest.length > 0) {
    const shares = share(
      Math.max(0, left),
      rest.map(({ node }) => ({ id: node.path, weight: node.estimatedGrams })),
    );
    const low = rest.filter(({ node, floorGrams }) => (shares.get(node.path) ?? 0) < floorGrams);
    const settled = low.length > 0 ? low : rest;
    for (const child of settled) {
      parts.set(child.node.path, low.length > 0 ? child.floorGrams : (shares.get(child.node.path) ?? 0));
    }
    left -= sum(settled.map((child) => parts.get(child.node.path) ?? 0));
    rest = rest.filter((child) => !settled.includes(child));
  }
  if (known.children.length > 0) refuseDifference(known, grams, left);
  return parts;
}

/** Parts far above an estimate: more likely a slip than a heavy beast. */
function refuseSlip({ node, floorGrams }: Known, grams: number): void {
  const mostGrams = divideHalfAway(BigInt(node.estimatedGrams) * BigInt(1000 + ESTIMATE_TOLERANCE_PER_MILLE), 1000n);
  if (grams === floorGrams && floorGrams > mostGrams) refuse(node, floorGrams, node.estimatedGrams);
}

function refuseDifference({ node }: Known, grams: number, left: number): void {
  if (Math.abs(left) * 1000 > grams * WEIGHING_TOLERANCE_PER_MILLE) refuse(node, grams - left, grams);
}

function refuse(node: TreeNode, partsGrams: number, parentGrams: number): never {
  const difference = formatGrams(Math.abs(partsGrams - parentGrams));
  const message =
    `${node.name}: the parts weigh ${formatGrams(partsGrams)}, the whole ${formatGrams(parentGrams)}. ` +
    `They differ by ${difference}, which is too much. Nothing was changed; weigh again or correct the figure.`;
  throw new EngineError('MEASURED_EXCEEDS_PARENT', message, {
    node: node.path,
    figures: { partsGrams, parentGrams, differenceGrams: partsGrams - parentGrams },
  });
}

function sum(grams: readonly number[]): number {
  return grams.reduce((total, next) => total + next, 0);
}
