import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { makeFillInstance } from '#scripts/bench/box-fill-instances.ts';
import type { RecipeLine } from '#shared/engine/allocation/allocation-input.ts';
import type { BoxFillInput, BoxToFill, PlacedPack, WeighedPack } from '#shared/engine/box-fill/box-fill-types.ts';
import { checkBox } from '#shared/engine/box-fill/check-box.ts';
import { fillBoxes } from '#shared/engine/box-fill/fill-boxes.ts';

function makeLine(line: Partial<RecipeLine> & { id: string; cutIds: string[] }): RecipeLine {
  return { name: line.id, minGrams: 400, maxGrams: 900, minPacks: 1, maxPacks: null, state: 'either', ...line };
}

function makeBox(id: string, lines: RecipeLine[], guaranteedGrams: number): BoxToFill {
  return { id, recipe: { guaranteedGrams, lines }, earlierGiveAwayGrams: 0 };
}

function makePack(id: string, cutId: string, grams: number): WeighedPack {
  return { id, cutId, grams, state: 'fresh' };
}

/** Every pack is in one place: in a box, or unused. */
function expectWhole(input: BoxFillInput, fill: ReturnType<typeof fillBoxes>): void {
  const used = fill.boxes.flatMap(({ packs }) => packs.map(({ id }) => id));
  expect([...used, ...fill.unusedPackIds].sort()).toEqual(input.packs.map(({ id }) => id).sort());
  for (const filled of fill.boxes) {
    const box = input.boxes.find(({ id }) => id === filled.boxId);
    if (box) expect(checkBox(box.recipe, filled.packs)).toMatchObject({ isFilled: filled.isFilled });
  }
}

/** Every way to place every pack: how many boxes can be filled, and the least grams given away then. */
function bruteForce(input: BoxFillInput): { filled: number; giveAway: number } {
  let best = { filled: -1, giveAway: Infinity };
  const contents = input.boxes.map((): PlacedPack[] => []);
  const place = (index: number): void => {
    const pack = input.packs[index];
    if (!pack) {
      const checks = input.boxes.map((box, each) => checkBox(box.recipe, contents[each] ?? []));
      const done = checks.filter(({ isFilled }) => isFilled);
      const giveAway = done.reduce((sum, check) => sum + check.giveAwayGrams, 0);
      const isBetter = done.length > best.filled || (done.length === best.filled && giveAway < best.giveAway);
      if (isBetter) best = { filled: done.length, giveAway };
      return;
    }
    place(index + 1);
    for (const [each, box] of input.boxes.entries()) {
      for (const line of box.recipe.lines) {
        contents[each]?.push({ ...pack, lineId: line.id });
        place(index + 1);
        contents[each]?.pop();
      }
    }
  };
  place(0);
  return best;
}

describe('filling boxes', () => {
  test('with sixty boxes of twelve packs and a tenth to spare, fills all within 0.5 % of the bound', () => {
    const input = makeFillInstance({ boxes: 60, seed: 20261201 });
    const fill = fillBoxes(input);
    expectWhole(input, fill);
    expect(fill.unfilledBoxIds).toEqual([]);
    expect(fill.giveAwayGrams).toBeGreaterThanOrEqual(fill.lowerBoundGrams);
    expect(fill.giveAwayGrams - fill.lowerBoundGrams).toBeLessThanOrEqual(0.005 * fill.packedGrams);
  });

  test('on small cases, fills as many boxes and gives away as little as trying every way', () => {
    const lines = [makeLine({ id: 'mince', cutIds: ['mince', 'dice'] }), makeLine({ id: 'roast', cutIds: ['roast'] })];
    const pack = fc.record({
      cutId: fc.constantFrom('mince', 'dice', 'roast'),
      grams: fc.integer({ min: 300, max: 800 }),
    });
    fc.assert(
      fc.property(fc.array(pack, { maxLength: 7 }), fc.integer({ min: 800, max: 1_300 }), (made, guarantee) => {
        const packs = made.map(({ cutId, grams }, index) => makePack(`p${index}`, cutId, grams));
        const boxes = [makeBox('a', lines, guarantee), makeBox('b', lines, guarantee)];
        const input = { boxes, packs, kept: [], seed: 1 };
        const fill = fillBoxes(input);
        expectWhole(input, fill);
        const best = bruteForce(input);
        expect(fill.boxes.length - fill.unfilledBoxIds.length).toBe(best.filled);
        expect(fill.giveAwayGrams).toBe(best.filled === 0 ? 0 : best.giveAway);
        expect(fill.giveAwayGrams).toBeGreaterThanOrEqual(fill.lowerBoundGrams);
      }),
      { seed: 7, numRuns: 25 },
    );
  });

  test('given boxes and packs in another order, gives the same fill', () => {
    const input = makeFillInstance({ boxes: 20, seed: 3 });
    const turned = { ...input, boxes: [...input.boxes].reverse(), packs: [...input.packs].reverse() };
    expect(fillBoxes(turned)).toEqual(fillBoxes(input));
  });

  test('without enough of one cut, names the box and the line that is missing, and fills the others', () => {
    const input = makeFillInstance({ boxes: 6, seed: 4 });
    const few = { ...input, packs: input.packs.filter(({ id }) => !id.startsWith('slow-') || id < 'slow-00005') };
    const joints = few.packs.filter(({ id }) => !id.startsWith('roast-') || id <= 'roast-00006');
    const fill = fillBoxes({ ...few, packs: joints });
    expectWhole({ ...few, packs: joints }, fill);
    // Ten joints for two lines of six boxes: five boxes can be filled.
    expect(fill.unfilledBoxIds).toHaveLength(1);
    for (const id of fill.unfilledBoxIds) {
      const missing = fill.boxes.find(({ boxId }) => boxId === id)?.missing ?? [];
      expect(missing.map(({ lineId }) => lineId).some((line) => line === 'slow' || line === 'roast')).toBe(true);
    }
  });

  test('with kept boxes, leaves them exactly as they are', () => {
    const input = makeFillInstance({ boxes: 10, seed: 5 });
    const first = fillBoxes(input);
    const kept = first.boxes.slice(0, 4).map(({ boxId, packs }) => ({ boxId, packs }));
    const again = fillBoxes({ ...input, kept });
    for (const { boxId, packs } of kept) {
      expect(
        again.boxes
          .find((box) => box.boxId === boxId)
          ?.packs.map(({ id }) => id)
          .sort(),
      ).toEqual(packs.map(({ id }) => id).sort());
    }
    expect(again.unfilledBoxIds).toEqual([]);
  });

  test('when like boxes cannot weigh the same, the heavier goes to the customer who was given least', () => {
    const lines = [makeLine({ id: 'roast', cutIds: ['roast'], minGrams: 1_000, maxGrams: 2_000, maxPacks: 1 })];
    const boxes = [
      { ...makeBox('a', lines, 1_000), earlierGiveAwayGrams: 300 },
      { ...makeBox('b', lines, 1_000), earlierGiveAwayGrams: 20 },
    ];
    const packs = [makePack('p1', 'roast', 1_010), makePack('p2', 'roast', 1_090)];
    const fill = fillBoxes({ boxes, packs, kept: [], seed: 1 });
    expect(fill.boxes.map(({ boxId, giveAwayGrams }) => [boxId, giveAwayGrams])).toEqual([
      ['a', 10],
      ['b', 90],
    ]);
    expect(fill.lowerBoundGrams).toBe(100);
  });

  test('a frozen pack, never goes to a line of fresh meat', () => {
    const lines = [makeLine({ id: 'mince', cutIds: ['mince'], state: 'fresh' })];
    const frozen: WeighedPack = { ...makePack('p1', 'mince', 500), state: 'frozen' };
    const fill = fillBoxes({ boxes: [makeBox('a', lines, 400)], packs: [frozen], kept: [], seed: 1 });
    expect(fill).toMatchObject({ unfilledBoxIds: ['a'], unusedPackIds: ['p1'] });
  });
});
