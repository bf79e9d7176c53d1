import type { WeighedPack } from './box-fill-types.ts';
import { isAllowed } from './check-box.ts';
import { excess, lack, put, takeOut, type FillState, type OpenBox, type OpenLine } from './fill-state.ts';

/** Above so many ways to place the packs, the search by moves is left to itself. */
const MOST_WAYS = 300_000;

type Place = { box: OpenBox; line: OpenLine };
type Score = readonly [unfilled: number, giveAway: number, spread: number];

/** Fewer unfilled boxes first, then fewer grams given away, then the smaller distance between the boxes. */
function scoreOf(boxes: readonly OpenBox[]): Score {
  const filled = boxes.filter((box) => lack(box) === 0).map(excess);
  const spread = filled.length > 0 ? Math.max(...filled) - Math.min(...filled) : 0;
  return [boxes.length - filled.length, filled.reduce((sum, grams) => sum + grams, 0), spread];
}

function isBetter(a: Score, b: Score): boolean {
  for (const [index, value] of a.entries()) {
    const other = b[index] ?? 0;
    if (value !== other) return value < other;
  }
  return false;
}

function placesFor(boxes: readonly OpenBox[], pack: WeighedPack): Place[] {
  return boxes.flatMap((box) => box.lines.filter(({ line }) => isAllowed(line, pack)).map((line) => ({ box, line })));
}

function hasRoom({ line: { line, packs, grams } }: Place, pack: WeighedPack): boolean {
  return packs.length < (line.maxPacks ?? Infinity) && grams + pack.grams <= line.maxGrams;
}

function packsInHand(state: FillState, boxes: readonly OpenBox[]): WeighedPack[] {
  const inBoxes = boxes.flatMap(({ lines }) => lines.flatMap(({ packs }) => packs));
  return [...state.shelf.all(), ...inBoxes].sort((a, b) => b.grams - a.grams || (a.id < b.id ? -1 : 1));
}

function clear(state: FillState, boxes: readonly OpenBox[]): void {
  for (const box of boxes) {
    for (const line of box.lines) for (const pack of [...line.packs]) takeOut(state, box, { line, pack });
  }
}

/**
 * Tries every way to place the packs when they are few, so that a small fill is the best there is and not only a good one.
 * Leaves the state as it was when nothing is better or there are too many ways.
 */
export function fillExactly(state: FillState): void {
  const boxes = state.boxes.filter(({ isKept }) => !isKept);
  const packs = packsInHand(state, boxes);
  const places = packs.map((pack) => placesFor(boxes, pack));
  if (places.reduce((ways, each) => ways * (each.length + 1), 1) > MOST_WAYS) return;
  const start = boxes.flatMap((box) =>
    box.lines.flatMap((line) => line.packs.map((pack) => ({ place: { box, line }, pack }))),
  );
  let best = { score: scoreOf(boxes), placed: start };
  clear(state, boxes);
  const placed: typeof start = [];
  const search = (index: number): void => {
    const pack = packs[index];
    if (!pack) {
      const score = scoreOf(boxes);
      if (isBetter(score, best.score)) best = { score, placed: [...placed] };
      return;
    }
    for (const place of places[index] ?? []) {
      if (!hasRoom(place, pack)) continue;
      put(state, place.box, { line: place.line, pack });
      placed.push({ place, pack });
      search(index + 1);
      placed.pop();
      takeOut(state, place.box, { line: place.line, pack });
    }
    search(index + 1);
  };
  search(0);
  for (const { place, pack } of best.placed) put(state, place.box, { line: place.line, pack });
}
