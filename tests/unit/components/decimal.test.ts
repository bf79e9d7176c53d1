import { assert, constantFrom, integer, property } from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseDecimal, UNITS, writeDecimal, type Unit } from '#components/ui/decimal.ts';

describe('figures as they are typed', () => {
  it('reads kilograms as grams, pounds as pence, and rates as tenths of a penny', () => {
    expect(parseDecimal('312.4', 'kilograms')).toBe(312_400);
    expect(parseDecimal('.65', 'kilograms')).toBe(650);
    expect(parseDecimal('62', 'pounds')).toBe(6_200);
    expect(parseDecimal('£1,234.50', 'pounds')).toBe(123_450);
    expect(parseDecimal('18.80', 'poundsPerKg')).toBe(18_800);
    expect(parseDecimal('12', 'count')).toBe(12);
  });

  it('tells an empty field from one that holds no number', () => {
    expect(parseDecimal('  ', 'kilograms')).toBeNull();
    for (const text of ['abc', '4.2.1', '1e3', '-', '.', '0.0001', '12345678901234']) {
      expect(parseDecimal(text, 'kilograms'), text).toBeNaN();
    }
    expect(parseDecimal('2.5', 'count')).toBeNaN();
  });

  it('keeps a minus sign, so that the contract can refuse it', () => {
    expect(parseDecimal('-3', 'kilograms')).toBe(-3_000);
    expect(Object.is(parseDecimal('-0', 'kilograms'), 0)).toBe(true);
  });

  it('writes as few decimals as tell the whole of it, money with two', () => {
    expect(writeDecimal(312_400, 'kilograms')).toBe('312.4');
    expect(writeDecimal(5_000, 'kilograms')).toBe('5');
    expect(writeDecimal(6_200, 'pounds')).toBe('62.00');
    expect(writeDecimal(7_255, 'poundsPerKg')).toBe('7.255');
    expect(writeDecimal(null, 'pounds')).toBe('');
    expect(writeDecimal(Number.NaN, 'pounds')).toBe('');
  });

  it('reads back what it wrote, for every unit and figure', () => {
    const units = Object.keys(UNITS) as Unit[];
    assert(
      property(constantFrom(...units), integer({ min: -1_000_000_000, max: 1_000_000_000 }), (unit, value) => {
        expect(parseDecimal(writeDecimal(value, unit), unit)).toBe(value);
      }),
      { seed: 7 },
    );
  });
});
