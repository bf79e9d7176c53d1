import type { WeighedPack } from './box-fill-types.ts';
import { isAllowed } from './check-box.ts';
import { excess, lack, lineWants, put, takeOut, type FillState, type OpenBox, type OpenLine } from './fill-state.ts';

type Place = { line: OpenLine; pack: WeighedPack };
type Swap = { out: Place; into: WeighedPack };

function placesOf(box: OpenBox): Place[] {
  return box.lines.flatMap((line) => line.packs.map((pack) => ({ line, pack })));
}

/** Limits for a pack that takes another's place, so that the line stays within its own. */
function limits({ line, pack }: Place): { least: number; most: number } {
  const rest = line.grams - pack.grams;
  return { least: line.line.minGrams - rest, most: line.line.maxGrams - rest };
}

function exchange(state: FillState, box: OpenBox, { out, into }: Swap): void {
  takeOut(state, box, out);
  put(state, box, { line: out.line, pack: into });
}

/** Brings a box closer to its guarantee from above by one pack for another; true when something changed. */
export function replaceOne(state: FillState, box: OpenBox): boolean {
  const over = excess(box);
  let best: (Swap & { left: number }) | null = null;
  for (const out of placesOf(box)) {
    const { least, most } = limits(out);
    const into = state.shelf.lightest(out.line.line, Math.max(least, out.pack.grams - over), most);
    if (!into) continue;
    const left = over + into.grams - out.pack.grams;
    if (left < over && left >= 0 && (!best || left < best.left)) best = { out, into, left };
  }
  if (!best) return false;
  exchange(state, box, best);
  return true;
}

/** Packs of the shelf that a place could take, at most this many, spread over the weights. */
const CANDIDATES = 24;

function candidates(state: FillState, place: Place): WeighedPack[] {
  const { most } = limits(place);
  return state.shelf.heapsFor(place.line.line).flatMap((heap) => {
    const step = Math.max(1, Math.floor(heap.length / CANDIDATES));
    return heap.filter((pack, index) => index % step === 0 && pack.grams <= most);
  });
}

type Pair = { first: Swap; second: Swap; left: number };

function pairFor(state: FillState, about: { over: number; first: Place; second: Place }): Pair | null {
  const { over, first, second } = about;
  let best: Pair | null = null;
  const firstLimits = limits(first);
  const secondLimits = limits(second);
  for (const into of candidates(state, first)) {
    if (into.grams < firstLimits.least) continue;
    const left = over + into.grams - first.pack.grams;
    const least = Math.max(secondLimits.least, second.pack.grams - left);
    const other = state.shelf.lightest(second.line.line, least, secondLimits.most);
    if (!other || other.id === into.id) continue;
    const after = left + other.grams - second.pack.grams;
    if (after >= 0 && after < over && (!best || after < best.left)) {
      best = { first: { out: first, into }, second: { out: second, into: other }, left: after };
    }
  }
  return best;
}

/** The same with two packs of two lines at once: far finer steps. */
export function replaceTwo(state: FillState, box: OpenBox): boolean {
  const over = excess(box);
  const places = placesOf(box);
  let best: Pair | null = null;
  for (const [index, first] of places.entries()) {
    for (const second of places.slice(index + 1)) {
      if (second.line === first.line) continue;
      const pair = pairFor(state, { over, first, second });
      if (pair && (!best || pair.left < best.left)) best = pair;
      if (best?.left === 0) break;
    }
    if (best?.left === 0) break;
  }
  if (!best) return false;
  exchange(state, box, best.first);
  exchange(state, box, best.second);
  return true;
}

/** Takes a pack out that nothing in the box needs. */
export function dropOne(state: FillState, box: OpenBox): boolean {
  const over = excess(box);
  const spare = placesOf(box)
    .filter(({ line, pack }) => {
      const rest = line.grams - pack.grams;
      return pack.grams <= over && rest >= line.line.minGrams && line.packs.length > line.line.minPacks;
    })
    .sort((a, b) => b.pack.grams - a.pack.grams)[0];
  if (!spare) return false;
  takeOut(state, box, spare);
  return true;
}

/** Moves a box that lacks something nearer to filled by a heavier pack from the shelf. */
export function replaceHeavier(state: FillState, box: OpenBox): boolean {
  const before = lack(box);
  let best: (Swap & { after: number }) | null = null;
  for (const out of placesOf(box)) {
    const { most } = limits(out);
    const wanted = out.pack.grams + Math.max(-excess(box), out.line.line.minGrams - out.line.grams, 1);
    const into = state.shelf.lightest(out.line.line, wanted, most) ?? state.shelf.nearest(out.line.line, wanted, most);
    if (!into || into.grams <= out.pack.grams) continue;
    const after = Math.abs(wanted - into.grams) + (into.grams < wanted ? 1e6 : 0);
    if (!best || after < best.after) best = { out, into, after };
  }
  if (!best) return false;
  exchange(state, box, best);
  if (lack(box) < before) return true;
  exchange(state, box, { out: { line: best.out.line, pack: best.into }, into: best.out.pack });
  return false;
}

function hasRoom({ line, packs, grams }: OpenLine, pack: WeighedPack): boolean {
  return packs.length < (line.maxPacks ?? Infinity) && grams + pack.grams <= line.maxGrams;
}

/** A pack in another box that this line wants, and a pack of the shelf that can take its place there. */
function findLoan(state: FillState, lender: OpenBox, open: OpenLine): { from: Place; instead: WeighedPack } | null {
  const over = excess(lender);
  for (const from of placesOf(lender)) {
    if (!isAllowed(open.line, from.pack) || !hasRoom(open, from.pack)) continue;
    const { least, most } = limits(from);
    const instead = state.shelf.lightest(from.line.line, Math.max(least, from.pack.grams - Math.max(0, over)), most);
    if (instead) return { from, instead };
  }
  return null;
}

/**
 * Fills a wanting line with a pack of another box, which gets one of the shelf instead and stays filled. Returns the
 * lender, or null when there is none.
 */
export function borrow(state: FillState, box: OpenBox, lenders: readonly OpenBox[]): OpenBox | null {
  for (const open of box.lines) {
    if (!lineWants(open)) continue;
    for (const lender of lenders) {
      if (lender === box) continue;
      const loan = findLoan(state, lender, open);
      if (!loan) continue;
      takeOut(state, lender, loan.from);
      put(state, lender, { line: loan.from.line, pack: loan.instead });
      put(state, box, { line: open, pack: loan.from.pack });
      return lender;
    }
  }
  return null;
}

/** Swaps a light pack of this box for a heavier one of a box that can spare the difference. */
export function swapHeavier(state: FillState, box: OpenBox, lenders: readonly OpenBox[]): OpenBox | null {
  const wanted = -excess(box);
  for (const lender of lenders) {
    if (lender === box || excess(lender) <= 0) continue;
    for (const own of placesOf(box)) {
      const ownLimits = limits(own);
      for (const other of placesOf(lender)) {
        const gain = other.pack.grams - own.pack.grams;
        if (gain <= 0 || gain > excess(lender) || other.pack.grams > ownLimits.most) continue;
        if (!isAllowed(own.line.line, other.pack) || !isAllowed(other.line.line, own.pack)) continue;
        const theirs = limits(other);
        if (own.pack.grams < theirs.least || own.pack.grams > theirs.most || (wanted > 0 && gain === 0)) continue;
        takeOut(state, box, own);
        takeOut(state, lender, other);
        put(state, box, { line: own.line, pack: other.pack });
        put(state, lender, { line: other.line, pack: own.pack });
        return lender;
      }
    }
  }
  return null;
}
