import { describe, expect, test } from 'vitest';
import {
  deliveryPenceOf,
  findArea,
  formatPostcode,
  nearestPoint,
  readPostcode,
  roundDay,
} from '#shared/domain/delivery.ts';

const postcode = (text: string) => readPostcode(text) ?? { outward: '', inward: '' };

describe('reading a postcode', () => {
  test.each([
    ['ZZ1 1AA', 'ZZ1 1AA'],
    ['zz11aa', 'ZZ1 1AA'],
    ['  zz12  3ab ', 'ZZ12 3AB'],
    ['Z1A1AA', 'Z1A 1AA'],
  ])('%s, gives %s', (typed, kept) => {
    expect(formatPostcode(postcode(typed))).toBe(kept);
  });

  test.each(['', 'ZZ1', '12345', 'ZZ1 1A', '<b>', 'ZZ111 1AA'])('%s, is none', (typed) => {
    expect(readPostcode(typed)).toBeNull();
  });
});

describe('finding the area of a postcode', () => {
  const areas = [
    { name: 'all of it', prefixes: ['ZZ'] },
    { name: 'the dale', prefixes: ['ZZ1', 'ZZ12'] },
  ];

  test('takes the closest prefix, and a district never for a longer one', () => {
    expect(findArea(areas, postcode('ZZ1 1AA'))?.name).toBe('the dale');
    expect(findArea(areas, postcode('ZZ12 1AA'))?.name).toBe('the dale');
    expect(findArea(areas, postcode('ZZ11 1AA'))?.name).toBe('all of it');
  });

  test('answers nothing outside', () => {
    expect(findArea(areas, postcode('YY1 1AA'))).toBeNull();
    expect(findArea([], postcode('ZZ1 1AA'))).toBeNull();
  });
});

test('the nearest point is one of the same district, else of the same letters, else the first by name', () => {
  const points = [
    { name: 'Chapel', addressLines: ['ZZ2 4HH'] },
    { name: 'Gate', addressLines: ['Under Rigg', 'ZZ1 1AA'] },
    { name: 'Abbey', addressLines: ['no postcode'] },
  ];
  expect(nearestPoint(points, postcode('ZZ1 9ZZ'))?.name).toBe('Gate');
  expect(nearestPoint(points, postcode('ZZ9 9ZZ'))?.name).toBe('Chapel');
  expect(nearestPoint(points, postcode('YY9 9ZZ'))?.name).toBe('Abbey');
  expect(nearestPoint([], postcode('YY9 9ZZ'))).toBeNull();
});

test('a delivery costs its price below the threshold and nothing from it on', () => {
  expect(deliveryPenceOf({ pricePence: 600, freeFromPence: 10_000 }, 9_999)).toBe(600);
  expect(deliveryPenceOf({ pricePence: 600, freeFromPence: 10_000 }, 10_000)).toBe(0);
  expect(deliveryPenceOf({ pricePence: 600, freeFromPence: null }, 90_000)).toBe(600);
});

test('the round is on the first such weekday after the cutting, a week later on the same weekday', () => {
  expect(roundDay('2026-12-10', 5)).toBe('2026-12-11');
  expect(roundDay('2026-12-10', 3)).toBe('2026-12-16');
  expect(roundDay('2026-12-10', 4)).toBe('2026-12-17');
});
