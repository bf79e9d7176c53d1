import type { Rail, RailPrimal } from '#shared/contracts/fields-schema.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import type { PrimalFill } from './spoken-for.ts';

type RailNames = Pick<Specification, 'quarters' | 'narrowPrimals'>;

const NOTHING: PrimalFill = { grams: 0, soldGrams: 0, heldGrams: 0 };

/** Primals in the specification's order with their kilograms, and the same merged for a narrow screen. */
export function railOfPrimals(names: RailNames, fills: ReadonlyMap<string, PrimalFill>): Rail {
  const primals = names.quarters
    .flatMap((quarter) => quarter.primals)
    .map(({ id, name, shortName }) => ({ id, name, shortName, ...(fills.get(id) ?? NOTHING) }));
  const narrowPrimals = names.narrowPrimals.map(({ id, name, shortName, primalIds }) => ({
    id,
    name,
    shortName,
    ...sum(primals.filter((primal) => primalIds.includes(primal.id))),
  }));
  return { primals: primals.filter(hasWeight), narrowPrimals: narrowPrimals.filter(hasWeight) };
}

function hasWeight(primal: RailPrimal): boolean {
  return primal.grams > 0;
}

function sum(fills: readonly PrimalFill[]): PrimalFill {
  return fills.reduce(
    (all, fill) => ({
      grams: all.grams + fill.grams,
      soldGrams: all.soldGrams + fill.soldGrams,
      heldGrams: all.heldGrams + fill.heldGrams,
    }),
    NOTHING,
  );
}
