import type { RecipeLine } from '#shared/engine/allocation/allocation-input.ts';
import type { BoxFillInput, BoxToFill, PlacedPack, WeighedPack } from './box-fill-types.ts';
import { isAllowed } from './check-box.ts';
import { PackShelf } from './pack-shelf.ts';

export type OpenLine = { line: RecipeLine; packs: WeighedPack[]; grams: number };
/** A box on the bench. `isKept`: finished already and left alone. */
export type OpenBox = { box: BoxToFill; lines: OpenLine[]; grams: number; isKept: boolean };

/** Boxes and the packs that lie beside them, in one fixed order whatever order they came in. */
export type FillState = { boxes: OpenBox[]; shelf: PackShelf };

function byId(a: { id: string }, b: { id: string }): number {
  return a.id < b.id ? -1 : a.id > b.id ? 1 : 0;
}

function openBox(box: BoxToFill): OpenBox {
  const lines = [...box.recipe.lines].sort(byId).map((line): OpenLine => ({ line, packs: [], grams: 0 }));
  return { box, lines, grams: 0, isKept: false };
}

export function put(state: FillState, box: OpenBox, about: { line: OpenLine; pack: WeighedPack }): void {
  state.shelf.remove(about.pack);
  about.line.packs.push(about.pack);
  about.line.grams += about.pack.grams;
  box.grams += about.pack.grams;
}

export function takeOut(state: FillState, box: OpenBox, about: { line: OpenLine; pack: WeighedPack }): void {
  const place = about.line.packs.findIndex(({ id }) => id === about.pack.id);
  if (place < 0) throw new RangeError(`pack ${about.pack.id} is not in box ${box.box.id}`);
  about.line.packs.splice(place, 1);
  about.line.grams -= about.pack.grams;
  box.grams -= about.pack.grams;
  state.shelf.add(about.pack);
}

function keep(state: FillState, box: OpenBox, packs: readonly PlacedPack[]): void {
  box.isKept = true;
  for (const { lineId, ...pack } of packs) {
    const line = box.lines.find((each) => each.line.id === lineId);
    if (!line || !isAllowed(line.line, pack)) throw new RangeError(`pack ${pack.id} has no place in box ${box.box.id}`);
    put(state, box, { line, pack });
  }
}

/** Every pack that is not in a kept box lies on the shelf; every other box is empty. */
export function openFill(input: BoxFillInput): FillState {
  const boxes = [...input.boxes].sort(byId).map(openBox);
  const shelf = new PackShelf();
  const known = new Set<string>();
  for (const pack of [...input.packs].sort(byId)) {
    if (known.has(pack.id)) throw new RangeError(`pack ${pack.id} comes twice`);
    known.add(pack.id);
    shelf.add({ id: pack.id, cutId: pack.cutId, grams: pack.grams, state: pack.state });
  }
  const state = { boxes, shelf };
  for (const { boxId, packs } of input.kept) {
    const box = boxes.find((each) => each.box.id === boxId);
    if (!box) continue;
    for (const { lineId: _lineId, ...pack } of packs) if (!known.has(pack.id)) shelf.add(pack);
    keep(state, box, packs);
  }
  return state;
}

export function excess({ box, grams }: OpenBox): number {
  return grams - box.recipe.guaranteedGrams;
}

/** Grams and packs that a line still wants. */
export function lineWants({ line, packs, grams }: OpenLine): boolean {
  return grams < line.minGrams || packs.length < line.minPacks;
}

/**
 * How far a box is from filled: grams under lines and guarantee, a missing pack counting like a kilogram. Zero when it
 * is filled, since no move ever puts too much into a line.
 */
export function lack(box: OpenBox): number {
  const lines = box.lines.reduce(
    (sum, { line, packs, grams }) =>
      sum + Math.max(0, line.minGrams - grams) + 1000 * Math.max(0, line.minPacks - packs.length),
    0,
  );
  return Math.max(lines, -excess(box), lines > 0 ? 1 : 0);
}

export function placedPacks({ lines }: OpenBox): PlacedPack[] {
  return lines.flatMap(({ line, packs }) => [...packs].sort(byId).map((pack) => ({ ...pack, lineId: line.id })));
}
