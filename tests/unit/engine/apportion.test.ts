import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { apportion } from '#shared/engine/apportion.ts';
import { divideHalfAway, roundHalfAway, scale } from '#shared/engine/rounding.ts';

test('apportion, with equal remainders, gives the odd unit to the lower id', () => {
  const parts = apportion(10, [
    { id: 'c', weight: 1 },
    { id: 'a', weight: 1 },
    { id: 'b', weight: 1 },
  ]);
  expect(Object.fromEntries(parts)).toEqual({ a: 4, b: 3, c: 3 });
});

test('apportion, with all weights zero or a negative one, throws', () => {
  expect(() => apportion(5, [{ id: 'a', weight: 0 }])).toThrow(RangeError);
  expect(() => apportion(5, [])).toThrow(RangeError);
  expect(() =>
    apportion(5, [
      { id: 'a', weight: 2 },
      { id: 'b', weight: -1 },
    ]),
  ).toThrow(RangeError);
  expect(() => apportion(-1, [{ id: 'a', weight: 1 }])).toThrow(RangeError);
});

test('apportion, for any weights, sums to the total, stays within one unit of the share and ignores the order', () => {
  const shares = fc.uniqueArray(fc.record({ id: fc.string(), weight: fc.nat(1_000_000_000) }), {
    minLength: 1,
    maxLength: 30,
    selector: (share) => share.id,
  });
  fc.assert(
    fc.property(fc.nat(1_000_000_000), shares, (total, list) => {
      const sum = list.reduce((all, share) => all + BigInt(share.weight), 0n);
      fc.pre(sum > 0n);
      const parts = apportion(total, list);
      expect([...parts.values()].reduce((all, units) => all + units, 0)).toBe(total);
      expect(apportion(total, [...list].reverse())).toEqual(parts);
      for (const share of list) {
        const units = BigInt(parts.get(share.id) ?? -1);
        const exact = BigInt(total) * BigInt(share.weight);
        expect(units * sum > exact - sum && units * sum < exact + sum).toBe(true);
      }
    }),
    { numRuns: 300 },
  );
});

test('rounding is half away from zero, on both sides of zero', () => {
  expect([5n, -5n, 4n, -4n, 15n].map((top) => divideHalfAway(top, 10n))).toEqual([1, -1, 0, 0, 2]);
  expect(divideHalfAway(5n, -10n)).toBe(-1);
  expect([0.5, -0.5, 1.49, -1.5].map(roundHalfAway)).toEqual([1, -1, 1, -2]);
  expect(scale(335, 98, 100)).toBe(328);
  expect(scale(325, 98, 100)).toBe(319);
});
