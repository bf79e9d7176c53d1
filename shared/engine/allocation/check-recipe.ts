import type { Cut } from '#shared/engine/figures/specification.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import type { Recipe, RecipeLine } from './allocation-input.ts';

/** All that a recipe asks of a cut. */
export type PackLimits = Pick<Cut, 'minPackGrams' | 'maxPackGrams'>;

/** What whole packs can make of one line of one box. */
export type LineRange = { minGrams: number; maxGrams: number; minPacks: number; maxPacks: number };

/** How many packs of one cut make its line in one box, when nothing else is in it. */
export function packsInBox(line: RecipeLine, cut: PackLimits): { least: number; most: number } {
  return {
    least: Math.max(1, line.minPacks, Math.ceil(line.minGrams / cut.maxPackGrams)),
    most: Math.min(line.maxPacks ?? Infinity, Math.floor(line.maxGrams / cut.minPackGrams)),
  };
}

/** A cut whose packs alone can make the line; the plan puts no other into it. */
export function isUsable(line: RecipeLine, cut: PackLimits): boolean {
  const { least, most } = packsInBox(line, cut);
  return least <= most;
}

/**
 * Narrows a line to what whole packs can reach: a line of 500 to 700 g in packs of 600 to 900 g begins at 600 g.
 * Null when no number of packs will do.
 */
export function packableRange(line: RecipeLine, cuts: ReadonlyMap<string, PackLimits>): LineRange | null {
  const allowed = line.cutIds.flatMap((id) => cuts.get(id) ?? []).filter((cut) => isUsable(line, cut));
  if (allowed.length === 0) return null;
  const lightest = Math.min(...allowed.map(({ minPackGrams }) => minPackGrams));
  const heaviest = Math.max(...allowed.map(({ maxPackGrams }) => maxPackGrams));
  const least = Math.max(line.minPacks, line.minGrams > 0 ? 1 : 0);
  const most = Math.min(line.maxPacks ?? Infinity, Math.floor(line.maxGrams / lightest));
  const counts = Array.from({ length: Math.max(0, most - least + 1) }, (_, index) => least + index).filter(
    (count) => count * lightest <= line.maxGrams && count * heaviest >= line.minGrams,
  );
  const [first, last] = [counts[0], counts.at(-1)];
  if (first === undefined || last === undefined) return null;
  return {
    minGrams: Math.max(line.minGrams, first * lightest),
    maxGrams: Math.min(line.maxGrams, last * heaviest),
    minPacks: first,
    maxPacks: last,
  };
}

function refuse(name: string, line: RecipeLine | null, sentence: string): never {
  const where = line ? `line '${line.name}' of ${name}` : name;
  throw new EngineError('RECIPE_INFEASIBLE', `${where}: ${sentence} Nothing was changed; edit the recipe.`, {
    node: line ? `${name}/${line.id}` : name,
    figures: line
      ? { minGrams: line.minGrams, maxGrams: line.maxGrams, minPacks: line.minPacks, maxPacks: line.maxPacks }
      : {},
  });
}

function checkLine(name: string, line: RecipeLine, cuts: ReadonlyMap<string, PackLimits>): LineRange {
  const unknown = line.cutIds.filter((id) => !cuts.has(id));
  if (unknown.length > 0) refuse(name, line, `it allows ${unknown.join(', ')}, which the specification does not make.`);
  if (line.cutIds.length === 0) refuse(name, line, 'it allows no cut.');
  const lightest = Math.min(...line.cutIds.map((id) => cuts.get(id)?.minPackGrams ?? Infinity));
  if (line.maxGrams - line.minGrams < lightest / 2) {
    refuse(name, line, 'its most and least are closer together than half of its lightest pack, so packs will not fit.');
  }
  const range = packableRange(line, cuts);
  if (!range) refuse(name, line, 'no number of whole packs lies between its least and its most.');
  return range;
}

/**
 * Refuses with RECIPE_INFEASIBLE a recipe that no box can meet: every line needs room of half its lightest pack, some
 * number of whole packs within its limits, and the guarantee must lie between the sums of least and most.
 */
export function checkRecipe(name: string, recipe: Recipe, cuts: ReadonlyMap<string, PackLimits>): void {
  if (recipe.lines.length === 0) refuse(name, null, 'it has no lines.');
  const ranges = recipe.lines.map((line) => checkLine(name, line, cuts));
  const least = recipe.lines.reduce((sum, { minGrams }) => sum + minGrams, 0);
  const most = ranges.reduce((sum, { maxGrams }) => sum + maxGrams, 0);
  if (recipe.guaranteedGrams < least || recipe.guaranteedGrams > most) {
    throw new EngineError(
      'RECIPE_INFEASIBLE',
      `${name} guarantees ${recipe.guaranteedGrams} g, but its lines add up to ${least} to ${most} g. Nothing was changed; edit the recipe.`,
      { node: name, figures: { guaranteedGrams: recipe.guaranteedGrams, minGrams: least, maxGrams: most } },
    );
  }
}

/** Whether packs of some weight within their limits can make a box of this many packs of each cut in each line. */
export function checkPattern(
  recipe: Recipe,
  pattern: readonly { line: RecipeLine; cutId: string; packs: number }[],
  cuts: ReadonlyMap<string, PackLimits>,
): boolean {
  let most = 0;
  for (const line of recipe.lines) {
    const cells = pattern.filter((cell) => cell.line.id === line.id);
    const sum = (size: keyof PackLimits) =>
      cells.reduce((all, { cutId, packs }) => all + packs * (cuts.get(cutId)?.[size] ?? 0), 0);
    const packs = cells.reduce((all, cell) => all + cell.packs, 0);
    if (packs < line.minPacks || packs > (line.maxPacks ?? Infinity)) return false;
    if (sum('minPackGrams') > line.maxGrams || sum('maxPackGrams') < line.minGrams) return false;
    most += Math.min(line.maxGrams, sum('maxPackGrams'));
  }
  return most >= recipe.guaranteedGrams;
}
