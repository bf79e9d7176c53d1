import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { halfEmsOf, holds, layOutRail, mergePrimals, type RailPrimal } from '#components/rail/rail-geometry.ts';

function makePrimal(change: Partial<RailPrimal> = {}): RailPrimal {
  return { id: 'rump', name: 'Rump', shortName: 'Rump', grams: 10_000, soldGrams: 4_000, heldGrams: 1_000, ...change };
}

const anyPrimals = fc.array(
  fc.record({ grams: fc.nat(90_000), soldGrams: fc.integer({ min: -5, max: 90_000 }), heldGrams: fc.nat(90_000) }),
  { minLength: 1, maxLength: 14 },
);
const named = (rows: Pick<RailPrimal, 'grams' | 'soldGrams' | 'heldGrams'>[]) =>
  rows.map((row, at) => makePrimal({ ...row, id: `p${at}` }));

describe('laying out a rail', () => {
  it('fills from the top by sold, then held, then free', () => {
    const [column] = layOutRail([makePrimal()]).columns;
    expect(column).toMatchObject({ soldPercent: 40, heldPercent: 10, freePercent: 50, freeGrams: 5_000 });
  });

  it('gives each primal a width by its share of the weight', () => {
    const { columns } = layOutRail([makePrimal({ id: 'a', grams: 30_000 }), makePrimal({ id: 'b', grams: 10_000 })]);
    expect(columns.map((column) => column.widthPercent)).toEqual([75, 25]);
  });

  it('makes area kilograms: two rails of one scale draw a kilogram equally large', () => {
    const heavy = layOutRail([makePrimal({ grams: 169_000, soldGrams: 40_000 })], 169_000);
    const light = layOutRail([makePrimal({ grams: 151_000, soldGrams: 40_000 })], 169_000);
    const area = (rail: typeof heavy) =>
      rail.columns.reduce((all, one) => all + (rail.lengthPercent * one.widthPercent * one.soldPercent) / 10_000, 0);
    expect(heavy.lengthPercent).toBe(100);
    expect(light.lengthPercent).toBeCloseTo(89.35, 2);
    expect(area(light)).toBeCloseTo(area(heavy), 9);
  });

  it('shows a primal that is promised beyond its weight as full', () => {
    const [column] = layOutRail([makePrimal({ soldGrams: 9_000, heldGrams: 4_000 })]).columns;
    expect(column).toMatchObject({ soldPercent: 90, heldPercent: 10, freeGrams: 0 });
  });

  it('leaves out what weighs nothing, and survives an empty rail', () => {
    expect(layOutRail([makePrimal({ grams: 0 })])).toMatchObject({ columns: [], totalGrams: 0, lengthPercent: 0 });
    expect(layOutRail([])).toMatchObject({ columns: [], totalGrams: 0 });
  });

  it('never grows past its scale', () => {
    expect(layOutRail([makePrimal({ grams: 200_000 })], 150_000).lengthPercent).toBe(100);
  });

  it('keeps every gram: sold, held and free sum to the weight for any input', () => {
    fc.assert(
      fc.property(anyPrimals, (rows) => {
        const rail = layOutRail(named(rows));
        for (const column of rail.columns) {
          expect(column.soldGrams + column.heldGrams + column.freeGrams).toBe(column.primal.grams);
          expect(Math.min(column.soldGrams, column.heldGrams, column.freeGrams)).toBeGreaterThanOrEqual(0);
        }
        expect(rail.soldGrams + rail.heldGrams + rail.freeGrams).toBe(rail.totalGrams);
      }),
    );
  });
});

describe('merging primals for a narrow rail', () => {
  const shins = [
    makePrimal({ id: 'fore-shin', grams: 6_000, soldGrams: 1_000, heldGrams: 500 }),
    makePrimal({ id: 'loin', grams: 20_000 }),
    makePrimal({ id: 'hind-shin', grams: 4_000, soldGrams: 2_000, heldGrams: 0 }),
  ];
  const shin = { id: 'shin', name: 'Shins', shortName: 'Shin', memberIds: ['fore-shin', 'hind-shin'] };

  it('adds the members up and keeps the rest', () => {
    const merged = mergePrimals(shins, [shin]);
    expect(merged.map((primal) => [primal.id, primal.grams, primal.soldGrams, primal.heldGrams])).toEqual([
      ['shin', 10_000, 3_000, 500],
      ['loin', 20_000, 4_000, 1_000],
    ]);
  });

  it('weighs as much as before for any input', () => {
    fc.assert(
      fc.property(anyPrimals, (rows) => {
        const primals = named(rows);
        const merged = mergePrimals(primals, [{ ...shin, memberIds: ['p0', 'p2'] }]);
        expect(layOutRail(merged).totalGrams).toBe(layOutRail(primals).totalGrams);
      }),
    );
  });

  it('knows a member by the merged primal that holds it', () => {
    const [merged = makePrimal()] = mergePrimals(shins, [shin]);
    expect([
      holds(merged, 'hind-shin'),
      holds(merged, 'shin'),
      holds(merged, 'loin'),
      holds(merged, undefined),
    ]).toEqual([true, true, false, false]);
  });
});

it('a label, by its length, asks for whole half-letters of width', () => {
  expect([halfEmsOf('Rump'), halfEmsOf('Neck & chuck')]).toEqual([5, 13]);
});
