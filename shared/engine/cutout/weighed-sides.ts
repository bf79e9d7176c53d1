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

const placeOf = ({ path }: CutoutNode) => {
  const [, , primalId = '', lineId = ''] = path.split('/');
  return { primalId, lineId };
};

/** How a choice was cut on this side: the way that gives exactly the lines that lie there, over all of its primals. */
function wayOf(choice: Choice, nodes: readonly CutoutNode[]): Way | undefined {
  const lines = nodes.filter((node) => node.level === 'line' && choice.primalIds.includes(placeOf(node).primalId));
  const there = new Set(lines.map((line) => `${placeOf(line).primalId}/${placeOf(line).lineId}`));
  return choice.ways.find((way) => {
    const given = way.lines.flatMap((line) => line.takes.map((take) => `${take.primalId}/${line.id}`));
    return given.length === there.size && given.every((line) => there.has(line));
  });
}

/**
 * Estimated against weighed by primal and by line of a way, in the order of the specification. What was weighed is brought
 * to the weight that was foreseen for its side, so that a heavy side teaches nothing about shares. A node that was not
 * weighed itself, and whose parts were not all weighed, is left out. The order of the sides never matters.
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
  for (const { side, nodes } of inOrder(history)) {
    const root = nodes.find(({ path }) => path === side);
    if (!root || root.grams === 0 || root.estimatedGrams === 0) continue;
    const sideRatio = root.estimatedGrams / root.grams;
    const weighed = nodes.filter(({ source }) => source === 'weighed');
    for (const primal of weighed.filter(({ level }) => level === 'primal')) {
      add(placeOf(primal).primalId, primal, sideRatio);
    }
    for (const choice of specification.choices) {
      const lines = weighed.filter(
        (node) => node.level === 'line' && choice.primalIds.includes(placeOf(node).primalId),
      );
      const way = lines.length > 0 ? wayOf(choice, nodes) : undefined;
      if (!way) continue;
      for (const line of lines) add(`${placeOf(line).primalId}/${way.id}/${placeOf(line).lineId}`, line, sideRatio);
    }
  }
  return order(specification, pairs);
}

/** Sums of fractions depend on their order in the last digit. */
function inOrder(history: readonly SideCut[]): SideCut[] {
  const keyOf = ({ carcaseId, side }: SideCut) => `${carcaseId}/${side}`;
  return history.toSorted((a, b) => (keyOf(a) < keyOf(b) ? -1 : keyOf(a) > keyOf(b) ? 1 : 0));
}

function order(specification: Specification, pairs: ReadonlyMap<string, LinePair>): LinePair[] {
  const primals = specification.quarters.flatMap((quarter) => quarter.primals);
  const paths = primals.flatMap(({ id }) => {
    const ways = specification.choices.find(({ primalIds }) => primalIds.includes(id))?.ways ?? [];
    return [id, ...ways.flatMap((way) => way.lines.map((line) => `${id}/${way.id}/${line.id}`))];
  });
  return paths.flatMap((path) => pairs.get(path) ?? []);
}
