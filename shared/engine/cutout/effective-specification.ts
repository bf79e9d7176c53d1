import { apportion } from '#shared/engine/apportion.ts';
import { totalTissues } from '#shared/engine/figures/reference-tissues.ts';
import type { Quarter, Specification, Tissues } from '#shared/engine/figures/specification.ts';
import { TISSUES } from '#shared/engine/figures/tissues.ts';
import { scale } from '#shared/engine/rounding.ts';
import { composition } from './composition.ts';
import type { CarcaseFacts, Clamp } from './cutout-types.ts';
import { surfaceTrimPpht } from './hanging-loss.ts';

export type EffectiveSpecification = {
  /** Quarters and primals with the tissues of this carcase; the whole is 100,000 again. */
  quarters: [Quarter, Quarter];
  clamps: Clamp[];
  isGraded: boolean;
};

/**
 * The specification for one carcase: every primal's meat, fat and bone scaled by what its class has of them against the
 * reference class, loss as it was, the whole brought back to 100,000 by largest remainder. Dried surface of a hung side
 * then moves from meat to loss. Without a grade the reference class stands in. Refuses with CLASS_UNKNOWN.
 */
export function effectiveSpecification(
  specification: Specification,
  carcase: Pick<CarcaseFacts, 'conformation' | 'fatClass' | 'hanging'>,
): EffectiveSpecification {
  const { reference } = specification;
  const from = composition(reference.conformation, reference.fatClass).tissues;
  const { tissues: to, clamps } = composition(
    carcase.conformation ?? reference.conformation,
    carcase.fatClass ?? reference.fatClass,
  );
  const isGraded = carcase.conformation !== null && carcase.fatClass !== null;
  const quarters = rescale(specification.quarters, from, to);
  const trim = surfaceTrimPpht(carcase.hanging);
  return { quarters: trim > 0 ? dryOut(quarters, trim) : quarters, clamps, isGraded };
}

/** Exact: the common denominator of the three ratios is multiplied in, so that nothing is rounded before the end. */
export function rescale(quarters: Specification['quarters'], from: Tissues, to: Tissues): [Quarter, Quarter] {
  const bottom = BigInt(from.meat) * BigInt(from.fat) * BigInt(from.bone);
  const weigh = (tissue: keyof Tissues, ppht: number) =>
    tissue === 'loss' ? BigInt(ppht) * bottom : (BigInt(ppht) * BigInt(to[tissue]) * bottom) / BigInt(from[tissue]);
  const shares = quarters.flatMap((quarter) =>
    quarter.primals.flatMap((primal) =>
      TISSUES.map((tissue) => ({ id: `${primal.id}/${tissue}`, weight: weigh(tissue, primal.tissues[tissue]) })),
    ),
  );
  const parts = apportion(100_000, shares);
  const part = (primalId: string, tissue: keyof Tissues) => parts.get(`${primalId}/${tissue}`) ?? 0;
  return mapTissues(quarters, (primalId) => ({
    meat: part(primalId, 'meat'),
    fat: part(primalId, 'fat'),
    bone: part(primalId, 'bone'),
    loss: part(primalId, 'loss'),
  }));
}

/** `trimPpht` of the side, shared over the primals by their meat. */
function dryOut(quarters: [Quarter, Quarter], trimPpht: number): [Quarter, Quarter] {
  const meat = quarters.reduce(
    (all, quarter) => quarter.primals.reduce((sum, { tissues }) => sum + tissues.meat, all),
    0,
  );
  if (meat === 0) return quarters;
  return mapTissues(quarters, (_id, tissues) => {
    const dried = scale(tissues.meat, Math.min(trimPpht, meat), meat);
    return { ...tissues, meat: tissues.meat - dried, loss: tissues.loss + dried };
  });
}

function mapTissues(
  quarters: readonly [Quarter, Quarter],
  change: (primalId: string, tissues: Tissues) => Tissues,
): [Quarter, Quarter] {
  const each = (quarter: Quarter): Quarter => {
    const primals = quarter.primals.map((primal) => ({ ...primal, tissues: change(primal.id, primal.tissues) }));
    return { ...quarter, primals, sharePpht: primals.reduce((sum, { tissues }) => sum + totalTissues(tissues), 0) };
  };
  return [each(quarters[0]), each(quarters[1])];
}
