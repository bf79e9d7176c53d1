import type { Choice, Specification, Way } from '#shared/engine/figures/specification.ts';
import { SIDES, type Cutout, type CutoutNode, type SideName } from './cutout-types.ts';

/** One side of one carcase as it was cut: the nodes of its cutout. */
export type SideCut = { carcaseId: string; side: SideName; nodes: readonly CutoutNode[] };

/** Foreseen and weighed of one primal or line, summed over the sides on which it was weighed. */
export type LinePair = { path: string; name: string; sides: number; estimatedGrams: number; weighedGrams: number };

/** Both sides of a carcase, for `compareSides` and the proposal that rests on it. */
export function sidesOfCutout(carcaseId: string, cutout: Pick<Cutout, 'nodes'>): SideCut[] {
  return SIDES.map((side) => ({
    carcaseId,
    side,
    nodes: cutout.nodes.filter(({ path }) => path === side || path.startsWith(`${side}/`)),
  }));
}

/** The way that gives exactly these lines of the primal. */
function wayOf(choice: Choice, primalId: string, lines: ReadonlySet<string>): Way | undefined {
  return choice.ways.find((way) => {
    const given = way.lines.filter(({ takes }) => takes.some((take) => take.primalId === primalId));
    return given.length === lines.size && given.every(({ id }) => lines.has(id));
  });
}

/**
 * Estimated against weighed by primal and by line of a way, in the order of the specification. What was weighed is brought
 * to the weight that was foreseen for its side, so that a heavy side teaches nothing about shares. A node that was not
 * weighed itself, and whose parts were not all weighed, is left out.
 */
export function compareSides(specification: Specification, history: readonly SideCut[]): LinePair[] {
  const pairs = new Map<string, LinePair>();
  const add = (path: string, node: CutoutNode, sideRatio: number) => {
    const before = pairs.get(path) ?? { path, name: node.name, sides: 0, estimatedGrams: 0, weighedGrams: 0 };
    pairs.set(path, {
      ...before,
      sides: before.sides + 1,
      estimatedGrams: before.estimatedGrams + node.estimatedGrams,
      weighedGrams: before.weighedGrams + node.grams * sideRatio,
    });
  };
  for (const { side, nodes } of history) {
    const root = nodes.find(({ path }) => path === side);
    if (!root || root.grams === 0 || root.estimatedGrams === 0) continue;
    const sideRatio = root.estimatedGrams / root.grams;
    for (const primal of nodes.filter(({ level }) => level === 'primal')) {
      const primalId = primal.path.split('/')[2] ?? '';
      if (primal.source === 'weighed') add(primalId, primal, sideRatio);
      const lines = nodes.filter(({ parentPath }) => parentPath === primal.path);
      const lineId = ({ path }: CutoutNode) => path.split('/')[3] ?? '';
      const choice = specification.choices.find(({ primalIds }) => primalIds.includes(primalId));
      const way = choice && wayOf(choice, primalId, new Set(lines.map(lineId)));
      if (!way) continue;
      for (const line of lines.filter(({ source }) => source === 'weighed')) {
        add(`${primalId}/${way.id}/${lineId(line)}`, line, sideRatio);
      }
    }
  }
  return order(specification, pairs);
}

function order(specification: Specification, pairs: ReadonlyMap<string, LinePair>): LinePair[] {
  const primals = specification.quarters.flatMap((quarter) => quarter.primals);
  const paths = primals.flatMap(({ id }) => {
    const ways = specification.choices.find(({ primalIds }) => primalIds.includes(id))?.ways ?? [];
    return [id, ...ways.flatMap((way) => way.lines.map((line) => `${id}/${way.id}/${line.id}`))];
  });
  return paths.flatMap((path) => pairs.get(path) ?? []);
}
