import { expect, test } from 'vitest';
import { paidForCopy } from '#shared/domain/money.ts';
import { discountOf, normaliseCode, shareDiscount } from '#shared/domain/promo.ts';

test('a share of the goods is rounded half up, an amount is as it stands', () => {
  expect(discountOf({ percent: 10, amountPence: null }, 9_405)).toBe(941);
  expect(discountOf({ percent: null, amountPence: 500 }, 9_405)).toBe(500);
});

test('a code never takes so much that a card could not be charged', () => {
  expect(discountOf({ percent: null, amountPence: 9_999 }, 1_000)).toBe(970);
  expect(discountOf({ percent: 90, amountPence: null }, 100)).toBe(70);
  expect(discountOf({ percent: 90, amountPence: null }, 20)).toBe(0);
});

test('a discount is shared out over the lines to the penny, by what they cost', () => {
  const lines = [
    { offerId: 'a', quantity: 1, unitPricePence: 9_400 },
    { offerId: 'b', quantity: 3, unitPricePence: 433 },
  ];
  const shared = shareDiscount(lines, 1_001);
  expect(shared.reduce((sum, line) => sum + line.discountPence, 0)).toBe(1_001);
  expect(shared.map((line) => line.discountPence)).toEqual([879, 122]);
  expect(shareDiscount(lines, 0).map((line) => line.discountPence)).toEqual([0, 0]);
});

test('what each of several boxes was paid with sums to its line', () => {
  const line = { quantity: 3, unitPricePence: 1_000, discountPence: 100 };
  expect([1, 2, 3].map((copy) => paidForCopy(line, copy))).toEqual([967, 967, 966]);
  expect(paidForCopy({ quantity: 1, unitPricePence: 1_000, discountPence: 0 }, 1)).toBe(1_000);
});

test('a code is kept in capitals, without spaces and hyphens', () => {
  expect(normaliseCode(' spring-10 ')).toBe('SPRING10');
});
