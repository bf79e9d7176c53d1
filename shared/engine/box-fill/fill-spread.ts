import type { WeighedPack } from './box-fill-types.ts';
import { isAllowed } from './check-box.ts';
import { excess, lack, put, takeOut, type FillState, type OpenBox, type OpenLine } from './fill-state.ts';

const MOST_SWAPS = 2_000;

type Place = { line: OpenLine; pack: WeighedPack };

function placesOf(box: OpenBox): Place[] {
  return box.lines.flatMap((line) => line.packs.map((pack) => ({ line, pack })));
}

function mayTake({ line, pack }: Place, other: WeighedPack): boolean {
  const grams = line.grams - pack.grams + other.grams;
  return isAllowed(line.line, other) && grams >= line.line.minGrams && grams <= line.line.maxGrams;
}

/** Swaps one pack each so that two boxes give away nearly the same; the sum stays. */
function swapNearer(state: FillState, heavy: OpenBox, light: OpenBox): boolean {
  const gap = excess(heavy) - excess(light);
  let best: { from: Place; to: Place; off: number } | null = null;
  for (const from of placesOf(heavy)) {
    for (const to of placesOf(light)) {
      const moved = from.pack.grams - to.pack.grams;
      if (moved <= 0 || moved >= gap || !mayTake(from, to.pack) || !mayTake(to, from.pack)) continue;
      const off = Math.abs(gap / 2 - moved);
      if (!best || off < best.off) best = { from, to, off };
    }
  }
  if (!best) return false;
  takeOut(state, heavy, best.from);
  takeOut(state, light, best.to);
  put(state, heavy, { line: best.from.line, pack: best.to.pack });
  put(state, light, { line: best.to.line, pack: best.from.pack });
  return true;
}

function isOpen(box: OpenBox): boolean {
  return !box.isKept && lack(box) === 0;
}

/** Evens out what the boxes give away, the heaviest against the lightest, until no swap brings them nearer. */
export function evenOut(state: FillState): void {
  const open = state.boxes.filter(isOpen);
  for (let guard = 0; guard < MOST_SWAPS; guard += 1) {
    const order = [...open].sort((a, b) => excess(b) - excess(a) || (a.box.id < b.box.id ? -1 : 1));
    const [heavy] = order;
    if (!heavy || excess(heavy) <= 1) return;
    const light = [...order].reverse().find((box) => swapNearer(state, heavy, box));
    if (!light) return;
  }
}

function recipeKey({ box }: OpenBox): string {
  const lines = [...box.recipe.lines].sort((a, b) => (a.id < b.id ? -1 : 1));
  return JSON.stringify([box.recipe.guaranteedGrams, lines]);
}

/** Among boxes of one recipe the heaviest goes to the customer who has been given least so far. */
export function handToCustomers(state: FillState): void {
  const groups = new Map<string, OpenBox[]>();
  for (const box of state.boxes.filter(isOpen)) {
    const key = recipeKey(box);
    groups.set(key, [...(groups.get(key) ?? []), box]);
  }
  for (const boxes of groups.values()) {
    const contents = [...boxes]
      .sort((a, b) => excess(b) - excess(a) || (a.box.id < b.box.id ? -1 : 1))
      .map(({ lines, grams }) => ({ lines, grams }));
    const customers = [...boxes].sort(
      (a, b) => a.box.earlierGiveAwayGrams - b.box.earlierGiveAwayGrams || (a.box.id < b.box.id ? -1 : 1),
    );
    for (const [index, box] of customers.entries()) Object.assign(box, contents[index]);
  }
}
