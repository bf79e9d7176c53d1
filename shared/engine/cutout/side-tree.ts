import { apportion } from '#shared/engine/apportion.ts';
import { totalTissues } from '#shared/engine/figures/reference-tissues.ts';
import type { Primal, Quarter, Specification, Way } from '#shared/engine/figures/specification.ts';
import { TISSUES } from '#shared/engine/figures/tissues.ts';
import { SIDES, type CutoutNode, type SideName } from './cutout-types.ts';

/** A node before the scales have spoken: what the specification foresees. */
export type TreeNode = Pick<CutoutNode, 'path' | 'parentPath' | 'level' | 'kind' | 'name' | 'cutId'> & {
  estimatedGrams: number;
  children: TreeNode[];
};

/** Which way each choice of a side is cut. */
export type WayOfChoice = ReadonlyMap<string, Way>;

const LINE_NAMES = { bone: 'Bone', fat: 'Fat', loss: 'Cutting loss' } as const;

/** As `apportion`, but nothing goes anywhere when no weight is above zero. */
export function share(total: number, weights: readonly { id: string; weight: number }[]): Map<string, number> {
  if (weights.every(({ weight }) => weight === 0)) return new Map(weights.map(({ id }) => [id, 0]));
  return apportion(total, weights);
}

/** What a line gets of one primal, as a weight for `share`. */
export function lineWeights(primal: Primal, way: Way): { id: string; weight: number }[] {
  return way.lines.flatMap((line) => {
    const take = line.takes.find(({ primalId }) => primalId === primal.id);
    if (!take) return [];
    const weight = TISSUES.reduce((sum, tissue) => sum + primal.tissues[tissue] * take[tissue], 0);
    return [{ id: line.id, weight }];
  });
}

type Tree = {
  specification: Specification;
  quarters: readonly [Quarter, Quarter];
  ways: Readonly<Record<SideName, WayOfChoice>>;
  /** What each side counts for in the hung weight; null for two alike. */
  sideGrams: Readonly<Record<SideName, number>> | null;
};

/** The whole carcase as the specification has it, each side by what it counts for; `grams` is the hung weight. */
export function buildTree(grams: number, tree: Tree): TreeNode {
  const bySide = apportion(
    grams,
    SIDES.map((id) => ({ id, weight: tree.sideGrams?.[id] ?? 1 })),
  );
  const children = SIDES.map((side) => buildSide(side, bySide.get(side) ?? 0, tree));
  return { ...whole('carcase', null, 'Carcase'), level: 'carcase', estimatedGrams: grams, children };
}

function whole(path: string, parentPath: string | null, name: string) {
  return { path, parentPath, name, kind: 'whole', cutId: null } as const;
}

function buildSide(side: SideName, grams: number, tree: Tree): TreeNode {
  const parts = share(
    grams,
    tree.quarters.map(({ id, sharePpht }) => ({ id, weight: sharePpht })),
  );
  const children = tree.quarters.map((quarter): TreeNode => {
    const quarterGrams = parts.get(quarter.id) ?? 0;
    const path = `${side}/${quarter.id}`;
    const primals = share(
      quarterGrams,
      quarter.primals.map(({ id, tissues }) => ({ id, weight: totalTissues(tissues) })),
    );
    return {
      ...whole(path, side, quarter.name),
      level: 'quarter',
      estimatedGrams: quarterGrams,
      children: quarter.primals.map((primal) =>
        buildPrimal({ path, primal, grams: primals.get(primal.id) ?? 0, side }, tree),
      ),
    };
  });
  const name = side === 'left' ? 'Left side' : 'Right side';
  return { ...whole(side, 'carcase', name), level: 'side', estimatedGrams: grams, children };
}

type PrimalPlace = { path: string; primal: Primal; grams: number; side: SideName };

function buildPrimal({ path: parentPath, primal, grams, side }: PrimalPlace, tree: Tree): TreeNode {
  const path = `${parentPath}/${primal.id}`;
  const choice = tree.specification.choices.find(({ primalIds }) => primalIds.includes(primal.id));
  const way = choice && tree.ways[side].get(choice.id);
  const weights = way ? lineWeights(primal, way) : [];
  const parts = share(grams, weights);
  const kinds = new Map(way?.lines.map(({ id, kind }) => [id, kind]));
  const children = weights.map(({ id }): TreeNode => {
    const kind = kinds.get(id) ?? 'loss';
    const isProduct = kind === 'cut' || kind === 'trim';
    const cutName = tree.specification.cuts.find((cut) => cut.id === id)?.name ?? id;
    return {
      path: `${path}/${id}`,
      parentPath: path,
      level: 'line',
      kind,
      name: isProduct ? cutName : LINE_NAMES[kind],
      cutId: isProduct ? id : null,
      estimatedGrams: parts.get(id) ?? 0,
      children: [],
    };
  });
  return { ...whole(path, parentPath, primal.name), level: 'primal', estimatedGrams: grams, children };
}
