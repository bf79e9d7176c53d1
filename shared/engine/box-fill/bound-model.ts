import type { RecipeLine } from '#shared/engine/allocation/allocation-input.ts';
import { LpModel, type Term } from '#shared/engine/linear/lp-model.ts';
import type { Solver } from '#shared/engine/linear/solve.ts';
import type { BoxToFill, WeighedPack } from './box-fill-types.ts';
import { isAllowed } from './check-box.ts';
import { groupLikeBoxes, lowerBound } from './fill-bound.ts';

type Heap = { name: string; packs: WeighedPack[]; grams: Term[]; counts: Term[] };

/** Packs of one cut and state, light to heavy. */
function heapPacks(packs: readonly WeighedPack[]): Heap[] {
  const heaps = new Map<string, WeighedPack[]>();
  for (const pack of packs) {
    const key = `${pack.cutId} ${pack.state}`;
    heaps.set(key, [...(heaps.get(key) ?? []), pack]);
  }
  return [...heaps.keys()].sort().map((key, index) => ({
    name: `h${index + 1}`,
    packs: (heaps.get(key) ?? []).sort((a, b) => a.grams - b.grams || (a.id < b.id ? -1 : 1)),
    grams: [],
    counts: [],
  }));
}

type LineOf = { line: RecipeLine; boxes: number; name: string };

/** Grams of the line over all like boxes; packs and grams may be broken. */
function addLine(model: LpModel, { line, boxes, name }: LineOf, heaps: readonly Heap[]): Term[] {
  const allowed = heaps.filter(({ packs: [first] }) => first && isAllowed(line, first));
  const cells = allowed.map((heap) => {
    const grams = model.addColumn(`grams_${name}_${heap.name}`, { cost: 1 });
    const count = model.addColumn(`count_${name}_${heap.name}`);
    heap.grams.push([1, grams]);
    heap.counts.push([1, count]);
    return { grams: [1, grams] as Term, count: [1, count] as Term };
  });
  const grams = cells.map((cell) => cell.grams);
  const counts = cells.map((cell) => cell.count);
  model.addRow(`least_${name}`, grams, ['>=', line.minGrams * boxes]);
  model.addRow(`most_${name}`, grams, ['<=', line.maxGrams * boxes]);
  model.addRow(`packs_least_${name}`, counts, ['>=', line.minPacks * boxes]);
  if (line.maxPacks !== null) model.addRow(`packs_most_${name}`, counts, ['<=', line.maxPacks * boxes]);
  return grams;
}

/** So many packs weigh at least what the lightest so many do, and at most what the heaviest do: straight lines under and over. */
function addHeap(model: LpModel, heap: Heap): void {
  model.addRow(`there_${heap.name}`, heap.counts, ['<=', heap.packs.length]);
  let light = 0;
  let heavy = 0;
  for (const [index, pack] of heap.packs.entries()) {
    const opposite = heap.packs.at(-1 - index)?.grams ?? 0;
    const turn = (slope: number) => heap.counts.map(([, column]): Term => [-slope, column]);
    model.addRow(
      `under_${heap.name}_${index}`,
      [...heap.grams, ...turn(pack.grams)],
      ['>=', light - index * pack.grams],
    );
    model.addRow(`over_${heap.name}_${index}`, [...heap.grams, ...turn(opposite)], ['<=', heavy - index * opposite]);
    light += pack.grams;
    heavy += opposite;
  }
}

/**
 * The greater of two bounds on what these boxes must give away: by lightest whole packs line by line, and by the linear
 * program over like boxes together, in which all recipes share the packs that there are.
 */
export async function boundFill(
  boxes: readonly BoxToFill[],
  packs: readonly WeighedPack[],
  solver: Solver,
): Promise<number> {
  const model = new LpModel();
  const heaps = heapPacks(packs);
  let guaranteed = 0;
  for (const [index, { box, count }] of groupLikeBoxes(boxes).entries()) {
    const lines = box.recipe.lines.flatMap((line, place) =>
      addLine(model, { line, boxes: count, name: `b${index + 1}_l${place + 1}` }, heaps),
    );
    model.addRow(`guarantee_b${index + 1}`, lines, ['>=', box.recipe.guaranteedGrams * count]);
    guaranteed += box.recipe.guaranteedGrams * count;
  }
  for (const heap of heaps) if (heap.grams.length > 0) addHeap(model, heap);
  const byPacks = lowerBound(boxes, packs);
  if (boxes.length === 0) return 0;
  const solution = await solver.solve(model.write({ sense: 'Minimize' }));
  if (!solution.hasAnswer) return byPacks;
  return Math.max(byPacks, Math.ceil(solution.objective - guaranteed - 1e-3));
}
