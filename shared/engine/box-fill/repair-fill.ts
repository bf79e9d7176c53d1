import type { BoxFill, BoxFillInput, BoxToFill, FilledBox, WeighedPack } from './box-fill-types.ts';
import { readFill } from './fill-boxes.ts';
import { mend, slim } from './fill-improve.ts';
import { excess, lack, openFill, takeOut, type FillState, type OpenBox } from './fill-state.ts';

export type RepairInput = {
  /** Boxes as they were filled. */
  before: readonly Pick<FilledBox, 'boxId' | 'packs'>[];
  boxes: readonly BoxToFill[];
  /** Every pack there is now, in boxes and beside them, at its weight of now; a lost pack is not among them. */
  packs: readonly WeighedPack[];
  seed: number;
};
export type Repair = BoxFill & { touchedBoxIds: string[] };

/** Boxes as they stand now: lost packs are gone, re-weighed packs have their new weight. */
function asTheyStand({ before, boxes, packs, seed }: RepairInput): BoxFillInput {
  const now = new Map(packs.map((pack) => [pack.id, pack]));
  const kept = before.map(({ boxId, packs: placed }) => ({
    boxId,
    packs: placed.flatMap(({ id, lineId }) => {
      const pack = now.get(id);
      return pack ? [{ ...pack, lineId }] : [];
    }),
  }));
  return { boxes, packs, kept, seed };
}

/** Takes packs out of lines that have too much, heaviest first. */
function lighten(state: FillState, box: OpenBox): boolean {
  let isChanged = false;
  for (const line of box.lines) {
    while (line.grams > line.line.maxGrams || line.packs.length > (line.line.maxPacks ?? Infinity)) {
      const pack = [...line.packs].sort((a, b) => b.grams - a.grams || (a.id < b.id ? -1 : 1))[0];
      if (!pack) break;
      takeOut(state, box, { line, pack });
      isChanged = true;
    }
  }
  return isChanged;
}

/** Boxes that are open already lend first, then those that give most away. */
function lendersFor(state: FillState, box: OpenBox, touched: ReadonlySet<OpenBox>): OpenBox[] {
  return state.boxes
    .filter((other) => other !== box && lack(other) === 0)
    .sort(
      (a, b) =>
        Number(touched.has(b)) - Number(touched.has(a)) || excess(b) - excess(a) || (a.box.id < b.box.id ? -1 : 1),
    );
}

/**
 * Sets right what lost and re-weighed packs have broken. Boxes that are still filled stay closed; a broken box takes from
 * the packs that lie beside, and only when these do not do is another box opened to change a pack with it.
 */
export function repairFill(repair: RepairInput): Repair {
  const input = asTheyStand(repair);
  const state = openFill(input);
  const had = new Map(repair.before.map(({ boxId, packs }) => [boxId, packs.length]));
  const touched = new Set<OpenBox>();
  for (const box of state.boxes) {
    const isShort = box.lines.reduce((sum, { packs }) => sum + packs.length, 0) < (had.get(box.box.id) ?? 0);
    if (lighten(state, box) || lack(box) > 0 || isShort) touched.add(box);
  }
  const broken = [...touched].filter((box) => lack(box) > 0);
  for (const box of broken) box.isKept = false;
  for (const box of broken) mend(state, box, []);
  for (const box of broken.filter((each) => lack(each) > 0)) {
    for (const lender of mend(state, box, lendersFor(state, box, touched))) touched.add(lender);
  }
  for (const box of touched) if (lack(box) === 0) slim(state, box);
  return { ...readFill(state, input), touchedBoxIds: [...touched].map(({ box }) => box.id).sort() };
}
