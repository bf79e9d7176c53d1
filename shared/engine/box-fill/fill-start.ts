import { lineWants, put, type FillState, type OpenBox, type OpenLine } from './fill-state.ts';

/** Where the line should come out: its least, and its part of what the guarantee asks beyond all leasts. */
function targetGrams(box: OpenBox, { line }: OpenLine): number {
  const { guaranteedGrams, lines } = box.box.recipe;
  const least = lines.reduce((sum, { minGrams }) => sum + minGrams, 0);
  const room = lines.reduce((sum, { minGrams, maxGrams }) => sum + maxGrams - minGrams, 0);
  if (room === 0) return line.minGrams;
  return line.minGrams + ((guaranteedGrams - least) * (line.maxGrams - line.minGrams)) / room;
}

/** Packs to a line, each near to an even share of what the line should weigh, until it has its least. */
function fillLine(state: FillState, box: OpenBox, open: OpenLine): void {
  const { line } = open;
  const target = targetGrams(box, open);
  while (lineWants(open) && open.packs.length < (line.maxPacks ?? Infinity)) {
    const packsLeft = Math.max(1, line.minPacks - open.packs.length);
    const wish = Math.max(1, (target - open.grams) / packsLeft);
    const pack = state.shelf.nearest(line, wish, line.maxGrams - open.grams) ?? lightestOf(state, open);
    if (!pack) return;
    put(state, box, { line: open, pack });
  }
}

function lightestOf(state: FillState, { line, grams }: OpenLine) {
  return state.shelf.lightest(line, 0, line.maxGrams - grams);
}

/** One more pack where the box is under its guarantee and a line has room: the one that ends nearest above it. */
export function topUp(state: FillState, box: OpenBox): boolean {
  const wanted = box.box.recipe.guaranteedGrams - box.grams;
  if (wanted <= 0) return false;
  let best: { line: OpenLine; pack: ReturnType<typeof lightestOf>; off: number } | null = null;
  for (const open of box.lines) {
    if (open.packs.length >= (open.line.maxPacks ?? Infinity)) continue;
    const most = open.line.maxGrams - open.grams;
    const pack = state.shelf.lightest(open.line, wanted, most) ?? state.shelf.nearest(open.line, wanted, most);
    if (!pack) continue;
    const off = pack.grams >= wanted ? pack.grams - wanted : 1e6 + wanted - pack.grams;
    if (!best || off < best.off) best = { line: open, pack, off };
  }
  if (!best?.pack) return false;
  put(state, box, { line: best.line, pack: best.pack });
  return true;
}

/** Grams on the shelf that a line may take: what is scarce is dealt first. */
function supplyOf(state: FillState, { line }: OpenLine): number {
  return state.shelf.heapsFor(line).reduce((sum, heap) => sum + heap.reduce((all, { grams }) => all + grams, 0), 0);
}

type Need = { key: string; places: { box: OpenBox; open: OpenLine }[]; scarcity: number };

/** Lines that allow the same cuts compete for the same packs; the scarcest group comes first. */
function rankNeeds(state: FillState): Need[] {
  const needs = new Map<string, Need>();
  for (const box of state.boxes) {
    if (box.isKept) continue;
    for (const open of box.lines) {
      const key = `${[...open.line.cutIds].sort().join(' ')} ${open.line.state}`;
      const need = needs.get(key) ?? { key, places: [], scarcity: 0 };
      need.places.push({ box, open });
      needs.set(key, need);
    }
  }
  for (const need of needs.values()) {
    const [first] = need.places;
    const wanted = need.places.reduce((sum, { open }) => sum + open.line.minGrams, 0);
    need.scarcity = wanted / Math.max(1, first ? supplyOf(state, first.open) : 1);
  }
  return [...needs.values()].sort((a, b) => b.scarcity - a.scarcity || (a.key < b.key ? -1 : 1));
}

/** A first fill, scarce lines before plentiful ones, then every box up to its guarantee as far as packs go. */
export function startFill(state: FillState): void {
  for (const { places } of rankNeeds(state)) for (const { box, open } of places) fillLine(state, box, open);
  for (const box of state.boxes) {
    if (box.isKept) continue;
    while (topUp(state, box));
  }
}
