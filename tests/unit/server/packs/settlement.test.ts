import { describe, expect, test } from 'vitest';
import { assert, integer, nat, property } from 'fast-check';
import type { Job } from '#server/packs/fill-work.ts';
import { owedPence, settleJob } from '#server/packs/settlement.ts';

const head = { id: 'line/1', lineId: 'line', copy: 1, orderId: 'order', orderNo: 1001, orderName: 'Ada Fell' };
const state = { isPacked: true, isDone: false };

function weighed(grams: number): Job['packs'] {
  if (grams === 0) return [];
  const facts = { code: 'ABCDEFGHJK', cuttingDayId: 'day', carcaseId: 'beast', cutId: 'mince', cut: 'Mince' };
  const dates = { packedOn: '2026-12-01', useBy: '2026-12-08', createdAt: new Date(0) };
  return [{ ...facts, ...dates, id: 'pack', earTag: 'UK123456700001', grams, boxLine: 'mince' }];
}

function loose(grams: number, more: { pricePence?: number; upperGrams?: number } = {}): Job {
  const sold = { pricePence: 1_300, upperGrams: 650, ...more };
  return { ...head, ...state, ...sold, item: 'Rump steak', kind: 'loose', cutId: 'rump-steak', packs: weighed(grams) };
}

function box(grams: number): Job {
  const line = {
    id: 'mince',
    name: 'Mince',
    cutIds: ['mince'],
    minGrams: 0,
    maxGrams: 9_000,
    minPacks: 0,
    maxPacks: null,
  };
  const recipe = { guaranteedGrams: 4_000, lines: [{ ...line, state: 'either' as const }] };
  return { ...head, ...state, item: 'Everyday', kind: 'box', recipe, pricePence: 6_400, packs: weighed(grams) };
}

describe('a loose pack', () => {
  test.each([
    ['at its upper weight costs what was paid', 650, 1_300],
    ['heavier than its upper weight is never charged more', 700, 1_300],
    ['one gram lighter costs the rounded rate', 649, 1_298],
    ['at half its upper weight costs half', 325, 650],
    ['that never came costs nothing', 0, 0],
  ])('%s', (_name, grams, pricePence) => {
    expect(settleJob(loose(grams))).toMatchObject({ grams, paidPence: 1_300, pricePence });
  });

  test('rounds half a penny away from zero', () => {
    expect(settleJob(loose(1, { pricePence: 1, upperGrams: 2 })).pricePence).toBe(1);
  });
});

describe('a box', () => {
  test.each([
    ['at its guarantee keeps its price', 4_000, 6_400],
    ['above its guarantee keeps its price', 4_600, 6_400],
    // 1 g x 6,400 p / 4,000 g = 1.6 p, in the buyer's favour.
    ['one gram below it gives back the missing gram, rounded up', 3_999, 6_398],
    ['at three quarters of it costs three quarters', 3_000, 4_800],
    ['that is empty costs nothing', 0, 0],
  ])('%s', (_name, grams, pricePence) => {
    expect(settleJob(box(grams))).toMatchObject({ grams, paidPence: 6_400, pricePence });
  });
});

test('whatever is weighed, nobody pays more than was paid and nothing costs less than nothing', () => {
  assert(
    property(
      nat(60_000),
      integer({ min: 1, max: 100_000 }),
      integer({ min: 1, max: 60_000 }),
      (grams, pence, upper) => {
        const items = [settleJob(loose(grams, { pricePence: pence, upperGrams: upper })), settleJob(box(grams))];
        for (const item of items) {
          expect(item.pricePence).toBeGreaterThanOrEqual(0);
          expect(item.pricePence).toBeLessThanOrEqual(item.paidPence);
        }
        expect(owedPence(items)).toBe(items.reduce((sum, item) => sum + item.paidPence - item.pricePence, 0));
      },
    ),
  );
});
