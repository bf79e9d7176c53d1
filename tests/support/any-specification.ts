import * as fc from 'fast-check';
import { apportion } from '#shared/engine/apportion.ts';
import { britishCuts } from '#shared/engine/figures/british-cuts.ts';
import { toQuarter } from '#shared/engine/figures/reference-tissues.ts';
import type { Choice, Primal, Specification, Take, WayLine } from '#shared/engine/figures/specification.ts';
import { TISSUES } from '#shared/engine/figures/tissues.ts';

const WHOLE = 100_000;
const PRODUCTS = ['fillet-steak', 'diced-beef', 'brisket-joint', 'lean-trim', 'trim'];
const REST = ['fat', 'bone', 'loss'] as const;

function splitWhole(weights: readonly number[]): number[] {
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const even = total === 0 ? weights.map(() => 1) : weights;
  const parts = apportion(
    WHOLE,
    even.map((weight, at) => ({ id: String(at).padStart(3, '0'), weight })),
  );
  return weights.map((_, at) => parts.get(String(at).padStart(3, '0')) ?? 0);
}

type Drawn = { primalIds: string[]; weights: number[][][]; keepsVertebrae: boolean[] };

function toChoice(id: string, drawn: Drawn): Choice {
  const ways = drawn.weights.map((wayWeights, at) => {
    const ids = [...PRODUCTS, ...REST];
    const lines = ids.map((lineId): WayLine => {
      const isRest = REST.some((rest) => rest === lineId);
      const kind = isRest ? (lineId as (typeof REST)[number]) : lineId.endsWith('trim') ? 'trim' : 'cut';
      return { id: lineId, kind, takes: [] };
    });
    for (const primalId of drawn.primalIds) {
      const byTissue = TISSUES.map((_, tissueAt) => splitWhole(wayWeights[tissueAt] ?? []));
      lines.forEach((line, lineAt) => {
        const take = Object.fromEntries(TISSUES.map((tissue, tissueAt) => [tissue, byTissue[tissueAt]?.[lineAt] ?? 0]));
        line.takes.push({ primalId, ...take } as Take);
      });
    }
    const keepsVertebrae = at > 0 && (drawn.keepsVertebrae[at] ?? false);
    return { id: `way-${at}`, name: `Way ${at}`, keepsVertebrae, extraTenthPencePerKg: at * 100, lines };
  });
  return { id, name: id, primalIds: drawn.primalIds, ways };
}

const lineWeights = fc.array(fc.nat(1_000), { minLength: 8, maxLength: 8 });
const wayWeights = fc.array(lineWeights, { minLength: 4, maxLength: 4 });

/** Any specification that adds up: two to five primals a quarter, some without one tissue, one to three ways each. */
export const anySpecification: fc.Arbitrary<Specification> = fc
  .record({
    fore: fc.integer({ min: 1, max: 4 }),
    hind: fc.integer({ min: 2, max: 4 }),
    tissues: fc.array(fc.nat(5_000), { minLength: 32, maxLength: 32 }),
    ways: fc.array(fc.array(wayWeights, { minLength: 1, maxLength: 3 }), { minLength: 8, maxLength: 8 }),
    keeps: fc.array(fc.boolean(), { minLength: 3, maxLength: 3 }),
  })
  .map(({ fore, hind, tissues, ways, keeps }) => {
    const count = fore + hind;
    // At least one part of every tissue somewhere, so that a class can be applied.
    const parts = splitWhole(tissues.slice(0, count * 4).map((weight, at) => weight + (at < 4 ? 2_000 : 0)));
    const primals = Array.from({ length: count }, (_, at): Primal => {
      const [meat = 0, fat = 0, bone = 0, loss = 0] = parts.slice(at * 4, at * 4 + 4);
      const id = `primal-${at}`;
      return { id, name: id, shortName: id, hasVertebrae: at % 2 === 0, tissues: { meat, fat, bone, loss } };
    });
    const single = primals.slice(0, -2).map(({ id }) => [id]);
    const pair = [primals.slice(-2).map(({ id }) => id)];
    const choices = [...single, ...pair].map((primalIds, at) =>
      toChoice(`choice-${at}`, { primalIds, weights: ways[at] ?? [], keepsVertebrae: keeps }),
    );
    return {
      id: 'any',
      name: 'Any',
      source: 'made',
      reference: { conformation: 'R', fatClass: '4L' },
      quarters: [toQuarter('fore', primals.slice(0, fore)), toQuarter('hind', primals.slice(fore))],
      narrowPrimals: [{ id: 'all', name: 'All', shortName: 'All', primalIds: [primals[0]?.id ?? ''] }],
      choices,
      cuts: britishCuts(new Set(PRODUCTS)),
    } satisfies Specification;
  });
