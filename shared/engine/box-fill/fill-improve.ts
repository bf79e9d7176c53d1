import { borrow, dropOne, replaceHeavier, replaceOne, replaceTwo, swapHeavier } from './fill-moves.ts';
import { excess, lack, lineWants, put, type FillState, type OpenBox } from './fill-state.ts';
import { topUp } from './fill-start.ts';

const MOST_ROUNDS = 30;

/** Puts packs of the shelf to lines that want them. */
function addWanted(state: FillState, box: OpenBox): boolean {
  for (const open of box.lines) {
    if (!lineWants(open) || open.packs.length >= (open.line.maxPacks ?? Infinity)) continue;
    const pack = state.shelf.nearest(open.line, open.line.minGrams - open.grams, open.line.maxGrams - open.grams);
    if (!pack) continue;
    put(state, box, { line: open, pack });
    return true;
  }
  return false;
}

/** Works at one box until it is filled or nothing helps; `lenders` may change packs with it. Returns the boxes touched. */
export function mend(state: FillState, box: OpenBox, lenders: readonly OpenBox[]): Set<OpenBox> {
  const touched = new Set<OpenBox>();
  for (let guard = 0; guard < 60 && lack(box) > 0; guard += 1) {
    if (addWanted(state, box) || topUp(state, box) || replaceHeavier(state, box)) continue;
    const lender = borrow(state, box, lenders) ?? swapHeavier(state, box, lenders);
    if (!lender) break;
    touched.add(lender);
  }
  return touched;
}

/** Lets go of the grams above the guarantee of one box, pack by pack from the shelf. */
export function slim(state: FillState, box: OpenBox): boolean {
  let isChanged = false;
  for (let guard = 0; guard < 40 && excess(box) > 0; guard += 1) {
    if (dropOne(state, box) || replaceOne(state, box)) {
      isChanged = true;
      continue;
    }
    if (!replaceTwo(state, box)) break;
    isChanged = true;
  }
  return isChanged;
}

/** Mends what is not filled, then lets every filled box give away as little as can be. */
export function improveFill(state: FillState): void {
  const open = state.boxes.filter(({ isKept }) => !isKept);
  for (const box of open) if (lack(box) > 0) mend(state, box, open);
  for (let round = 0; round < MOST_ROUNDS; round += 1) {
    const order = [...open].sort((a, b) => excess(b) - excess(a) || (a.box.id < b.box.id ? -1 : 1));
    const changed = order.filter((box) => lack(box) === 0 && slim(state, box));
    if (changed.length === 0) return;
  }
}
