import type { BoxFill, BoxFillInput, FilledBox } from './box-fill-types.ts';
import { checkBox } from './check-box.ts';
import { lowerBound } from './fill-bound.ts';
import { fillExactly } from './fill-exactly.ts';
import { improveFill, mend } from './fill-improve.ts';
import { evenOut, handToCustomers } from './fill-spread.ts';
import { startFill } from './fill-start.ts';
import { lack, openFill, placedPacks, takeOut, type FillState, type OpenBox } from './fill-state.ts';

function empty(state: FillState, box: OpenBox): void {
  for (const line of box.lines) for (const pack of [...line.packs]) takeOut(state, box, { line, pack });
}

/**
 * Where several boxes lack something, the one that lacks most gives its packs up for the others; at the end it takes
 * what is left, so that it can be seen what it misses.
 */
function giveUp(state: FillState): void {
  const given: OpenBox[] = [];
  for (;;) {
    const open = state.boxes.filter((box) => !box.isKept && !given.includes(box));
    const wanting = open
      .filter((box) => lack(box) > 0)
      .sort((a, b) => lack(b) - lack(a) || (a.box.id < b.box.id ? -1 : 1));
    const [worst] = wanting;
    if (!worst) break;
    empty(state, worst);
    given.push(worst);
    for (const box of wanting.slice(1).reverse())
      mend(
        state,
        box,
        open.filter((each) => each !== worst),
      );
  }
  for (const box of given) {
    mend(
      state,
      box,
      state.boxes.filter((each) => !each.isKept && !given.includes(each)),
    );
  }
}

function readBox(box: OpenBox): FilledBox {
  const packs = placedPacks(box);
  return { ...checkBox(box.box.recipe, packs), boxId: box.box.id, packs };
}

/** The outcome as it stands on the bench. */
export function readFill(state: FillState, input: BoxFillInput): BoxFill {
  const boxes = state.boxes.map(readBox);
  const filled = boxes.filter(({ isFilled }) => isFilled);
  const filledIds = new Set(filled.map(({ boxId }) => boxId));
  const packs = [...input.packs, ...input.kept.flatMap((kept) => kept.packs)];
  const unique = [...new Map(packs.map((pack) => [pack.id, pack])).values()];
  return {
    boxes,
    unusedPackIds: state.shelf
      .all()
      .map(({ id }) => id)
      .sort(),
    giveAwayGrams: filled.reduce((sum, { giveAwayGrams }) => sum + giveAwayGrams, 0),
    packedGrams: filled.reduce((sum, { grams }) => sum + grams, 0),
    lowerBoundGrams: lowerBound(
      input.boxes.filter(({ id }) => filledIds.has(id)),
      unique,
    ),
    unfilledBoxIds: boxes.filter(({ isFilled }) => !isFilled).map(({ boxId }) => boxId),
  };
}

/**
 * Puts weighed packs to boxes: each pack at most once, every box checked against its recipe, as many boxes filled as can
 * be found, then the least grams above the guarantees, then evenly; among like boxes the heavier goes to the customer who
 * has been given least. Kept boxes stay as they are. The order in which boxes and packs come never matters.
 */
export function fillBoxes(input: BoxFillInput): BoxFill {
  const state = openFill(input);
  startFill(state);
  improveFill(state);
  if (state.boxes.some((box) => !box.isKept && lack(box) > 0)) {
    giveUp(state);
    improveFill(state);
  }
  fillExactly(state);
  evenOut(state);
  handToCustomers(state);
  return readFill(state, input);
}
