import type { TradeUnit } from '#shared/engine/allocation/allocation-input.ts';
import type { SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import type { QuarterId } from '#shared/engine/figures/specification.ts';

/** `side`, `fore`, `hind` or `primal:<id>`, as price lists and reservations name what leaves whole. */
export function parseUnitKind(unitKind: string): TradeUnit {
  if (unitKind === 'side') return { kind: 'side' };
  if (unitKind === 'fore' || unitKind === 'hind') return { kind: 'quarter', quarter: unitKind };
  return { kind: 'primal', primalId: unitKind.replace('primal:', '') };
}

export function toUnitKind(unit: TradeUnit): string {
  if (unit.kind === 'side') return 'side';
  return unit.kind === 'quarter' ? unit.quarter : `primal:${unit.primalId}`;
}

export type SideUnit = { unitKind: string; name: string; grams: number; primalIds: string[]; hasVertebrae: boolean };

/** Everything of a side that can leave whole: the side, its quarters, its primals, each with its grams. */
export function listUnits(side: SideSupply): SideUnit[] {
  const primals = side.choices.flatMap((choice) =>
    choice.primals.map((primal) => ({ ...primal, quarter: choice.quarter })),
  );
  const quarter = (id: QuarterId, name: string): SideUnit => ({
    ...gather(primals.filter((primal) => primal.quarter === id)),
    unitKind: id,
    name,
    grams: side.quarterGrams[id],
  });
  return [
    { ...gather(primals), unitKind: 'side', name: 'Side', grams: side.grams },
    quarter('fore', 'Forequarter'),
    quarter('hind', 'Hindquarter'),
    ...primals.map((primal) => ({
      ...gather([primal]),
      unitKind: `primal:${primal.primalId}`,
      name: primal.name,
      grams: primal.grams,
    })),
  ];
}

function gather(primals: readonly { primalId: string; hasVertebrae: boolean }[]) {
  return {
    primalIds: primals.map((primal) => primal.primalId),
    hasVertebrae: primals.some((primal) => primal.hasVertebrae),
  };
}
