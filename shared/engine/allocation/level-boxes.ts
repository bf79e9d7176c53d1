import type { Recipe, RecipeLine } from './allocation-input.ts';
import type { PlannedContents, PlannedPack } from './deal-packs.ts';
import type { Heaps } from './heaps.ts';

type Box = { packs: PlannedContents; recipe: Recipe };

function lineGrams(box: Box, lineId: string): number {
  return box.packs.reduce((sum, pack) => sum + (pack.lineId === lineId ? pack.grams : 0), 0);
}

function boxGrams(box: Box): number {
  return box.packs.reduce((sum, { grams }) => sum + grams, 0);
}

function lineOf(box: Box, pack: PlannedPack): RecipeLine {
  const line = box.recipe.lines.find(({ id }) => id === pack.lineId);
  if (!line) throw new RangeError(`the recipe has no line ${pack.lineId}`);
  return line;
}

/** Grams that a pack can gain without its own or its line's most being passed. */
function canGain(box: Box, pack: PlannedPack): number {
  const line = lineOf(box, pack);
  return Math.max(0, Math.min(pack.cut.maxPackGrams - pack.grams, line.maxGrams - lineGrams(box, line.id)));
}

/** Grams that a pack can lose while its line and its box keep what they are owed. */
function canLose(box: Box, pack: PlannedPack): number {
  const line = lineOf(box, pack);
  const spare = [
    pack.grams - pack.cut.minPackGrams,
    lineGrams(box, line.id) - line.minGrams,
    boxGrams(box) - box.recipe.guaranteedGrams,
  ];
  return Math.max(0, Math.min(...spare));
}

/** Makes a pack heavier by up to `wanted`: from what is spare first, then from like packs in boxes that can lose. */
function grow(box: Box, pack: PlannedPack, about: { wanted: number; boxes: readonly Box[]; heaps: Heaps }): number {
  let open = Math.min(about.wanted, canGain(box, pack));
  const spare = about.heaps.take(pack.cut.id, pack.state, open);
  pack.grams += spare;
  let grown = spare;
  open -= spare;
  for (const other of about.boxes) {
    if (open <= 0) break;
    if (other === box) continue;
    for (const donor of other.packs) {
      if (donor.cut.id !== pack.cut.id || donor.state !== pack.state) continue;
      const moved = Math.min(open, canLose(other, donor));
      donor.grams -= moved;
      pack.grams += moved;
      grown += moved;
      open -= moved;
    }
  }
  return grown;
}

function trimLine(box: Box, line: RecipeLine, heaps: Heaps): void {
  let over = lineGrams(box, line.id) - line.maxGrams;
  for (const pack of box.packs) {
    if (over <= 0) return;
    if (pack.lineId !== line.id) continue;
    const cut = Math.min(over, pack.grams - pack.cut.minPackGrams);
    pack.grams -= cut;
    heaps.add(pack.cut.id, pack.state, cut);
    over -= cut;
  }
}

/** Puts one more pack of a spare cut to a line that has room for it. */
function addPack(box: Box, line: RecipeLine, about: { cuts: readonly PlannedPack['cut'][]; heaps: Heaps }): boolean {
  const packs = box.packs.filter(({ lineId }) => lineId === line.id).length;
  if (packs >= (line.maxPacks ?? Infinity)) return false;
  const room = line.maxGrams - lineGrams(box, line.id);
  const states = line.state === 'either' ? (['fresh', 'frozen'] as const) : [line.state];
  for (const cut of about.cuts) {
    if (!line.cutIds.includes(cut.id) || cut.minPackGrams > room) continue;
    const state = states.find((each) => about.heaps.get(cut.id, each) >= cut.minPackGrams);
    if (!state) continue;
    about.heaps.take(cut.id, state, cut.minPackGrams);
    box.packs.push({ lineId: line.id, cut, state, grams: cut.minPackGrams });
    return true;
  }
  return false;
}

function settleLine(
  box: Box,
  line: RecipeLine,
  about: { boxes: readonly Box[]; heaps: Heaps; cuts: readonly PlannedPack['cut'][] },
): void {
  trimLine(box, line, about.heaps);
  while (box.packs.filter(({ lineId }) => lineId === line.id).length < line.minPacks) {
    if (!addPack(box, line, about)) break;
  }
  const short = () => line.minGrams - lineGrams(box, line.id);
  for (const pack of box.packs) {
    if (short() <= 0) return;
    if (pack.lineId === line.id) grow(box, pack, { ...about, wanted: short() });
  }
  if (short() > 0 && addPack(box, line, about)) settleLine(box, line, about);
}

function settleGuarantee(
  box: Box,
  about: { boxes: readonly Box[]; heaps: Heaps; cuts: readonly PlannedPack['cut'][] },
): void {
  const short = () => box.recipe.guaranteedGrams - boxGrams(box);
  for (const pack of box.packs) {
    if (short() <= 0) return;
    grow(box, pack, { ...about, wanted: short() });
  }
  for (const line of box.recipe.lines) {
    if (short() <= 0) return;
    if (addPack(box, line, about)) settleGuarantee(box, about);
  }
}

/**
 * Moves grams between planned packs of one cut, within each pack's limits, until every line and every guarantee is met
 * where that can be done; what is spare on the heaps helps, and what a line has too much of goes there.
 */
export function levelBoxes(boxes: readonly Box[], heaps: Heaps, cuts: readonly PlannedPack['cut'][]): void {
  const about = { boxes, heaps, cuts };
  for (const box of boxes) for (const line of box.recipe.lines) settleLine(box, line, about);
  for (const box of boxes) settleGuarantee(box, about);
  for (const box of boxes) returnSurplus(box, heaps);
}

/** Grams above the guarantee that nothing in the box needs go back, so that the plan gives nothing away. */
function returnSurplus(box: Box, heaps: Heaps): void {
  for (const pack of box.packs) {
    const spare = canLose(box, pack);
    pack.grams -= spare;
    heaps.add(pack.cut.id, pack.state, spare);
  }
}
