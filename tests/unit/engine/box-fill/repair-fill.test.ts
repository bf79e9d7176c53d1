import { expect, test } from 'vitest';
import { makeFillInstance } from '#scripts/bench/box-fill-instances.ts';
import { fillBoxes } from '#shared/engine/box-fill/fill-boxes.ts';
import { repairFill } from '#shared/engine/box-fill/repair-fill.ts';

const input = makeFillInstance({ boxes: 30, seed: 11 });
const before = fillBoxes(input);
const firstBox = before.boxes[0];
if (!firstBox) throw new RangeError('the fill has no boxes');

function changed(after: ReturnType<typeof repairFill>): string[] {
  const ids = (packs: { id: string }[] = []) =>
    packs
      .map(({ id }) => id)
      .sort()
      .join(' ');
  return before.boxes
    .filter(({ boxId, packs }) => ids(packs) !== ids(after.boxes.find((box) => box.boxId === boxId)?.packs))
    .map(({ boxId }) => boxId);
}

test('a torn pack, is replaced from the packs beside and no other box is opened', () => {
  const lost = firstBox.packs[0]?.id;
  const after = repairFill({
    before: before.boxes,
    boxes: input.boxes,
    packs: input.packs.filter(({ id }) => id !== lost),
    seed: 1,
  });
  expect(after.unfilledBoxIds).toEqual([]);
  expect(after.touchedBoxIds).toEqual([firstBox.boxId]);
  expect(changed(after)).toEqual([firstBox.boxId]);
  expect(after.boxes.flatMap(({ packs }) => packs.map(({ id }) => id))).not.toContain(lost);
});

test('a pack that weighs less than was written, is made up in its own box', () => {
  const light = firstBox.packs.at(-1)?.id;
  const packs = input.packs.map((pack) => (pack.id === light ? { ...pack, grams: pack.grams - 60 } : pack));
  const after = repairFill({ before: before.boxes, boxes: input.boxes, packs, seed: 1 });
  expect(after.unfilledBoxIds).toEqual([]);
  expect(changed(after)).toEqual([firstBox.boxId]);
});

test('a pack that weighs a little more, breaks nothing and opens nothing', () => {
  const heavy = firstBox.packs.find(({ lineId }) => lineId === 'roast')?.id;
  const roast = before.boxes.find(({ packs }) => packs.some(({ id }) => id === heavy));
  const packs = input.packs.map((pack) =>
    pack.id === heavy ? { ...pack, grams: Math.min(1_500, pack.grams + 5) } : pack,
  );
  const after = repairFill({ before: before.boxes, boxes: input.boxes, packs, seed: 1 });
  expect(after.touchedBoxIds).toEqual([]);
  expect(after.boxes.find(({ boxId }) => boxId === roast?.boxId)?.isFilled).toBe(true);
});

test('when nothing beside fits, changes a pack with the fewest other boxes', () => {
  const lost = firstBox.packs.find(({ cutId }) => cutId === 'brisket-joint') ?? firstBox.packs[0];
  const inBoxes = new Set(before.boxes.flatMap(({ packs }) => packs.map(({ id }) => id)));
  const onlySilverside = input.packs.filter(
    ({ id, cutId }) =>
      id !== lost?.id &&
      (inBoxes.has(id) || cutId !== 'brisket-joint') &&
      (inBoxes.has(id) || cutId !== 'silverside-joint' || id.startsWith('slow-')),
  );
  const after = repairFill({ before: before.boxes, boxes: input.boxes, packs: onlySilverside, seed: 1 });
  expect(after.unfilledBoxIds).toEqual([]);
  expect(after.touchedBoxIds.length).toBeLessThanOrEqual(2);
  expect(changed(after).every((id) => after.touchedBoxIds.includes(id))).toBe(true);
});

test('when a cut is gone altogether, names the box and the line, and leaves the other boxes alone', () => {
  const shelfless = new Set(before.boxes.flatMap(({ packs }) => packs.map(({ id }) => id)));
  const lost = firstBox.packs.find(({ lineId }) => lineId === 'mince')?.id;
  const packs = input.packs.filter(({ id }) => shelfless.has(id) && id !== lost);
  const after = repairFill({ before: before.boxes, boxes: input.boxes, packs, seed: 1 });
  expect(after.unfilledBoxIds).toEqual([firstBox.boxId]);
  expect(after.boxes.find(({ boxId }) => boxId === firstBox.boxId)?.missing.map(({ lineId }) => lineId)).toEqual([
    'mince',
  ]);
});
