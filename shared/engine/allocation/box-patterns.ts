import type { BoxVariant } from './allocation-input.ts';
import type { Pattern, Patterns } from './allocation-model.ts';
import { checkPattern } from './check-recipe.ts';
import type { PlannedContents } from './deal-packs.ts';

const MOST_PATTERNS = 40;

function keyOf(pattern: Pattern): string {
  return pattern.map(({ line, cutId, state, packs }) => `${line.id} ${cutId} ${state} ${packs}`).join('|');
}

function patternOf(variant: BoxVariant, packs: PlannedContents): Pattern {
  const cells = new Map<string, { -readonly [Key in keyof Pattern[number]]: Pattern[number][Key] }>();
  for (const { lineId, cut, state } of packs) {
    const key = `${lineId} ${cut.id} ${state}`;
    const line = variant.lines.find(({ id }) => id === lineId);
    if (!line) continue;
    const cell = cells.get(key) ?? { line, cutId: cut.id, state, packs: 0 };
    cell.packs += 1;
    cells.set(key, cell);
  }
  return [...cells.keys()].sort().flatMap((key) => cells.get(key) ?? []);
}

/** The same box with one pack more or one less of one of its cuts. */
function neighbours(pattern: Pattern): Pattern[] {
  return pattern.flatMap((cell, index) =>
    [cell.packs - 1, cell.packs + 1].map((packs) =>
      pattern.map((each, place) => (place === index ? { ...each, packs } : each)).filter((each) => each.packs > 0),
    ),
  );
}

/** The patterns that the dealt boxes follow and those beside them, as far as their packs can meet the recipe. */
export function findPatterns(
  dealt: ReadonlyMap<string, readonly PlannedContents[]>,
  about: { variants: readonly BoxVariant[]; limits: Parameters<typeof checkPattern>[2] },
): Patterns {
  return new Map(
    about.variants.map((variant) => {
      const own = (dealt.get(variant.id) ?? []).map((packs) => patternOf(variant, packs));
      const found = new Map<string, Pattern>();
      for (const pattern of [...own, ...own.flatMap(neighbours)]) {
        if (found.size >= MOST_PATTERNS) break;
        if (checkPattern(variant, pattern, about.limits)) found.set(keyOf(pattern), pattern);
      }
      return [variant.id, [...found.values()]] as const;
    }),
  );
}
