import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { CarcaseFacts, Cutout } from '#shared/engine/cutout/cutout-types.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import { listSpecificationFaults } from '#shared/engine/figures/check-specification.ts';
import { CONFORMATIONS, FAT_CLASSES } from '#shared/engine/figures/class-scale.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { cutCarcase, listLeaks } from '#tests/support/make-carcase-facts.ts';
import { anySpecification } from '#tests/support/any-specification.ts';

const settings = { numRuns: 60, seed: 20261201 };

const anyFacts: fc.Arbitrary<Partial<CarcaseFacts>> = fc.record({
  coldGrams: fc.integer({ min: 82_000, max: 700_000 }),
  conformation: fc.option(fc.constantFrom(...CONFORMATIONS), { nil: null }),
  fatClass: fc.option(fc.constantFrom(...FAT_CLASSES), { nil: null }),
  bornDay: fc.constantFrom('2024-11-20', '2023-01-01', null),
  hanging: fc.record({
    method: fc.constantFrom('whole side' as const, 'in the bag' as const),
    days: fc.nat(60),
  }),
});

/** Some nodes weighed, each a little off what was foreseen. */
const anyScales = fc.array(fc.record({ at: fc.nat(10_000), perMille: fc.integer({ min: 930, max: 1070 }) }), {
  maxLength: 12,
});

function weigh(before: Cutout, scales: { at: number; perMille: number }[]): Record<string, number> {
  const measured: Record<string, number> = {};
  for (const { at, perMille } of scales) {
    const node = before.nodes[at % before.nodes.length];
    if (!node) continue;
    const path = node.level === 'carcase' ? 'hung' : node.path;
    measured[path] = Math.round((node.grams * perMille) / 1000);
  }
  return measured;
}

function cutOrRefuse(run: () => Cutout): Cutout | null {
  try {
    return run();
  } catch (error) {
    if (error instanceof EngineError && ['MEASURED_EXCEEDS_PARENT', 'WEIGHT_OUT_OF_RANGE'].includes(error.code)) {
      return null;
    }
    throw error;
  }
}

describe('for any specification, carcase and class', () => {
  it('every node is its parts and its weighing difference, to the gram', () => {
    fc.assert(
      fc.property(anySpecification, anyFacts, (specification, facts) => {
        expect(listSpecificationFaults(specification)).toEqual([]);
        const result = cutCarcase(facts, { specification });
        expect(listLeaks(result)).toEqual([]);
        expect(result.nodes.every((node) => node.weighingDifferenceGrams === 0)).toBe(true);
      }),
      settings,
    );
  });

  it('with anything weighed, keeps what was weighed, leaks nothing and differs by 0.5 % at most, or refuses', () => {
    let accepted = 0;
    fc.assert(
      fc.property(anySpecification, anyFacts, anyScales, (specification, facts, scales) => {
        const measured = weigh(cutCarcase(facts, { specification }), scales);
        const result = cutOrRefuse(() => cutCarcase({ ...facts, measured }, { specification }));
        if (!result) return;
        accepted += 1;
        expect(listLeaks(result)).toEqual([]);
        for (const node of result.nodes) {
          const own = measured[node.level === 'carcase' ? 'hung' : node.path];
          if (own !== undefined) expect(node).toMatchObject({ grams: own, source: 'weighed' });
          expect(Math.abs(node.weighingDifferenceGrams) * 200).toBeLessThanOrEqual(node.grams);
        }
      }),
      settings,
    );
    expect(accepted).toBeGreaterThan(20);
  });

  it('the order of choices, ways, lines, cuts and measured weights never matters', () => {
    fc.assert(
      fc.property(anySpecification, anyFacts, anyScales, (specification, facts, scales) => {
        const measured = weigh(cutCarcase(facts, { specification }), scales);
        const turned = structuredClone(specification);
        turned.choices.reverse();
        turned.cuts.reverse();
        for (const choice of turned.choices) {
          choice.primalIds.reverse();
          for (const way of choice.ways) way.lines.reverse();
        }
        const backwards = Object.fromEntries(Object.entries(measured).reverse());
        const one = cutOrRefuse(() => cutCarcase({ ...facts, measured }, { specification }));
        const other = cutOrRefuse(() => cutCarcase({ ...facts, measured: backwards }, { specification: turned }));
        const weights = (result: Cutout | null) =>
          result && Object.fromEntries(result.nodes.map((node) => [node.path, node.grams]));
        expect(weights(other)).toEqual(weights(one));
      }),
      { ...settings, numRuns: 30 },
    );
  });
});

describe('for the traditional side', () => {
  it('by every way the products, bone, fat and loss of a choice weigh what its primals weigh', () => {
    const wayIds = traditionalSide.choices.flatMap(({ id, ways }) => ways.map((way) => [id, way.id] as const));
    for (const [choiceId, wayId] of wayIds) {
      const result = cutCarcase({ coldGrams: 337_777 }, { ways: { left: { [choiceId]: wayId } } });
      expect(listLeaks(result)).toEqual([]);
    }
  });
});
