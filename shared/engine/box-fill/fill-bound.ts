import type { BoxToFill, WeighedPack } from './box-fill-types.ts';
import { isAllowed } from './check-box.ts';

type Group = { box: BoxToFill; count: number };

function recipeKey({ recipe }: BoxToFill): string {
  return JSON.stringify([recipe.guaranteedGrams, [...recipe.lines].sort((a, b) => (a.id < b.id ? -1 : 1))]);
}

export function groupLikeBoxes(boxes: readonly BoxToFill[]): Group[] {
  const groups = new Map<string, Group>();
  for (const box of boxes) {
    const group = groups.get(recipeKey(box)) ?? { box, count: 0 };
    group.count += 1;
    groups.set(recipeKey(box), group);
  }
  return [...groups.keys()].sort().flatMap((key) => groups.get(key) ?? []);
}

/** Fewest packs that reach the line's least: the heaviest allowed ones decide. */
function fewestPacks(line: BoxToFill['recipe']['lines'][number], allowed: readonly WeighedPack[]): number {
  const heaviest = allowed.at(-1)?.grams ?? 0;
  const byGrams = heaviest > 0 ? Math.ceil(line.minGrams / heaviest) : 0;
  return Math.max(line.minPacks, byGrams);
}

/** So many boxes cannot hold less of a line than its least, nor than their lightest sufficient number of whole packs. */
function lineBound(group: Group, line: BoxToFill['recipe']['lines'][number], packs: readonly WeighedPack[]): number {
  const allowed = packs.filter((pack) => isAllowed(line, pack));
  const count = fewestPacks(line, allowed) * group.count;
  const lightest = allowed.slice(0, count).reduce((sum, { grams }) => sum + grams, 0);
  return Math.max(lightest, line.minGrams * group.count);
}

/**
 * No fill of these boxes from these packs gives away less: for each recipe the lightest sufficient whole packs over its
 * lines, less its guarantees, and never under zero. Each recipe is looked at as if it had all packs to itself.
 */
export function lowerBound(boxes: readonly BoxToFill[], packs: readonly WeighedPack[]): number {
  const sorted = [...packs].sort((a, b) => a.grams - b.grams || (a.id < b.id ? -1 : 1));
  return groupLikeBoxes(boxes).reduce((sum, group) => {
    const { recipe } = group.box;
    const least = recipe.lines.reduce((all, line) => all + lineBound(group, line, sorted), 0);
    return sum + Math.max(0, least - recipe.guaranteedGrams * group.count);
  }, 0);
}
