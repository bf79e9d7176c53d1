import type { Recipe, RecipeLine } from '#shared/engine/allocation/allocation-input.ts';
import type { BoxCheck, MissingLine, PlacedPack, WeighedPack } from './box-fill-types.ts';

export function isAllowed(
  line: Pick<RecipeLine, 'cutIds' | 'state'>,
  pack: Pick<WeighedPack, 'cutId' | 'state'>,
): boolean {
  return line.cutIds.includes(pack.cutId) && (line.state === 'either' || line.state === pack.state);
}

type LineSum = { line: RecipeLine; grams: number; packs: number; wrongGrams: number; wrongPacks: number };

function sumLine(line: RecipeLine, packs: readonly PlacedPack[]): LineSum {
  const sum: LineSum = { line, grams: 0, packs: 0, wrongGrams: 0, wrongPacks: 0 };
  for (const pack of packs) {
    if (pack.lineId !== line.id) continue;
    if (isAllowed(line, pack)) {
      sum.grams += pack.grams;
      sum.packs += 1;
    } else {
      sum.wrongGrams += pack.grams;
      sum.wrongPacks += 1;
    }
  }
  return sum;
}

function missingOf({ line, grams, packs }: LineSum): MissingLine[] {
  const shortGrams = Math.max(0, line.minGrams - grams);
  const shortPacks = Math.max(0, line.minPacks - packs);
  return shortGrams > 0 || shortPacks > 0 ? [{ lineId: line.id, name: line.name, shortGrams, shortPacks }] : [];
}

function excessOf({ line, grams, packs, wrongGrams, wrongPacks }: LineSum): BoxCheck['excess'] {
  const overGrams = Math.max(0, grams - line.maxGrams) + wrongGrams;
  const overPacks = Math.max(0, packs - (line.maxPacks ?? Infinity)) + wrongPacks;
  return overGrams > 0 || overPacks > 0 ? [{ lineId: line.id, name: line.name, overGrams, overPacks }] : [];
}

/** The line with the most room: where grams that the guarantee still wants would go. */
function roomiest(sums: readonly LineSum[]): LineSum | undefined {
  const room = ({ line, grams }: LineSum) => line.maxGrams - grams;
  return [...sums].sort((a, b) => room(b) - room(a) || (a.line.id < b.line.id ? -1 : 1))[0];
}

/**
 * Whether these packs are what the recipe promises: every line within its grams and packs, nothing that is not allowed,
 * and the guaranteed weight reached. The one check of plans, fills and packing by hand.
 */
export function checkBox(recipe: Recipe, packs: readonly PlacedPack[]): BoxCheck {
  const sums = recipe.lines.map((line) => sumLine(line, packs));
  const grams = packs.reduce((sum, pack) => sum + pack.grams, 0);
  const known = new Set(recipe.lines.map(({ id }) => id));
  const stray = packs.filter(({ lineId }) => !known.has(lineId));
  const missing = sums.flatMap(missingOf);
  const excess = sums.flatMap(excessOf);
  for (const { lineId, grams: overGrams } of stray) excess.push({ lineId, name: lineId, overGrams, overPacks: 1 });
  const giveAwayGrams = grams - recipe.guaranteedGrams;
  const widest = giveAwayGrams < 0 && missing.length === 0 ? roomiest(sums) : undefined;
  if (widest) {
    missing.push({ lineId: widest.line.id, name: widest.line.name, shortGrams: -giveAwayGrams, shortPacks: 0 });
  }
  return { isFilled: missing.length === 0 && excess.length === 0, grams, giveAwayGrams, missing, excess };
}
