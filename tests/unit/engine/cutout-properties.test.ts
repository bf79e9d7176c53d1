import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { CarcaseFacts, Cutout, CutoutNode } from '#shared/engine/cutout/cutout-types.ts';
import { weighByPacks } from '#shared/engine/cutout/packed-lines.ts';
import { proposeCorrection } from '#shared/engine/cutout/propose-correction.ts';
import { sidesOfCutout, type SideCut } from '#shared/engine/cutout/weighed-sides.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import { listSpecificationFaults } from '#shared/engine/figures/check-specification.ts';
import { CONFORMATIONS, FAT_CLASSES } from '#shared/engine/figures/class-scale.ts';
import { Specification } from '#shared/engine/figures/specification.ts';
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

type Scales = { at: number; perMille: number }[];

function weigh(before: Cutout, scales: Scales): Record<string, number> {
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

describe('for any specification and whatever was weighed of it', () => {
  /** Both sides of a carcase with some of their parts weighed; null where the engine refuses the weights. */
  function cutSides(specification: Specification, facts: Partial<CarcaseFacts>, scales: Scales): SideCut[] | null {
    const measured = weigh(cutCarcase(facts, { specification }), scales);
    const result = cutOrRefuse(() => cutCarcase({ ...facts, measured }, { specification }));
    return result && sidesOfCutout(`carcase ${facts.coldGrams}`, result);
  }

  it('the proposed shares add up, hold no fraction and do not depend on the order of the sides', () => {
    let proposed = 0;
    fc.assert(
      fc.property(
        anySpecification,
        fc.array(fc.tuple(anyFacts, anyScales), { minLength: 1, maxLength: 3 }),
        (specification, carcases) => {
          const history = carcases.flatMap(([facts, scales]) => cutSides(specification, facts, scales) ?? []);
          const correction = proposeCorrection(specification, history);
          proposed += correction.rows.length;
          expect(listSpecificationFaults(correction.specification)).toEqual([]);
          expect(Specification.safeParse(correction.specification).success).toBe(true);
          for (const row of correction.rows) {
            const figures = [row.sides, row.estimatedGrams, row.weighedGrams, row.seenPpht, row.proposedPpht];
            expect(figures.every((figure) => Number.isSafeInteger(figure) && figure >= 0)).toBe(true);
          }
          expect(proposeCorrection(specification, history.toReversed())).toEqual(correction);
        },
      ),
      settings,
    );
    expect(proposed).toBeGreaterThan(50);
  });

  it('packs, shared over the lines that give their cut, are counted to the gram', () => {
    fc.assert(
      fc.property(anySpecification, anyFacts, fc.integer({ min: 1, max: 60_000 }), (specification, facts, grams) => {
        const { nodes } = cutCarcase(facts, { specification });
        const ofCut = (list: readonly CutoutNode[]) => list.filter(({ cutId }) => cutId === 'diced-beef');
        const isGiven = ofCut(nodes).some(({ estimatedGrams }) => estimatedGrams > 0);
        const weighed = weighByPacks(nodes, { 'diced-beef': grams }, new Set());
        const sum = ofCut(weighed)
          .filter(({ source }) => source === 'weighed')
          .reduce((all, one) => all + one.grams, 0);
        expect(sum).toBe(isGiven ? grams : 0);
        expect(weighed.filter(({ cutId }) => cutId !== 'diced-beef')).toEqual(
          nodes.filter(({ cutId }) => cutId !== 'diced-beef'),
        );
      }),
      settings,
    );
  });

  it('with sides of unlike weight, parts the carcase by them to the gram', () => {
    fc.assert(
      fc.property(
        anySpecification,
        anyFacts,
        fc.tuple(fc.integer({ min: 20_000, max: 360_000 }), fc.integer({ min: 20_000, max: 360_000 })),
        (specification, facts, [left, right]) => {
          const result = cutCarcase({ ...facts, sideGrams: { left, right } }, { specification });
          expect(listLeaks(result)).toEqual([]);
          const grams = result.nodes.find(({ path }) => path === 'left')?.grams ?? 0;
          expect(Math.abs(grams - (result.hung.grams * left) / (left + right))).toBeLessThan(1);
        },
      ),
      settings,
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
