import type { Carcase, CarcaseSummary } from '#shared/contracts/carcases.ts';
import { ageInMonths } from '#shared/domain/day.ts';
import type { Cutout } from '#shared/engine/cutout/cutout-types.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import type { CarcaseFigures } from './day-figures.ts';

export function summariseCarcase({ row, facts, cutout }: CarcaseFigures): CarcaseSummary {
  return {
    id: row.id,
    animalId: row.animalId,
    earTag: row.animal.earTag,
    sex: row.animal.sex,
    breed: row.animal.breed,
    state: row.state,
    killDay: row.killDay,
    cuttingDayId: row.cuttingDayId,
    day: row.day,
    ageMonths: ageInMonths(row.animal.born, row.killDay),
    isOverThirtyMonths: cutout.isOverThirtyMonths,
    hungDays: facts.hanging.days,
    conformation: row.conformation,
    fatClass: row.fatClass,
    coldGrams: cutout.cold.grams,
    coldSource: cutout.cold.source,
    version: row.version,
  };
}

export function describeCarcase(
  figures: CarcaseFigures,
  specification: Specification,
  rails: Carcase['rails'],
): Carcase {
  const { row, cutout } = figures;
  return {
    ...summariseCarcase(figures),
    liveGrams: row.liveGrams,
    hotGrams: row.hotGrams,
    leftGrams: row.leftGrams,
    rightGrams: row.rightGrams,
    hungGrams: cutout.hung.grams,
    hungSource: cutout.hung.source,
    isGraded: cutout.isGraded,
    dressingSpec: row.dressingSpec,
    nodes: cutout.nodes.map(({ cutId: _cutId, ...node }) => node),
    closedWays: describeClosedWays(cutout, specification),
    clamps: cutout.clamps.map((clamp) => clamp.sentence),
    rails,
  };
}

/** Both sides are of one beast and close the same ways: each is named once. */
function describeClosedWays(cutout: Cutout, specification: Specification): Carcase['closedWays'] {
  const seen = new Map<string, Carcase['closedWays'][number]>();
  for (const closed of cutout.closedWays) {
    const choice = specification.choices.find((candidate) => candidate.id === closed.choiceId);
    const way = choice?.ways.find((candidate) => candidate.id === closed.wayId);
    seen.set(`${closed.choiceId}/${closed.wayId}`, {
      choice: choice?.name ?? closed.choiceId,
      way: way?.name ?? closed.wayId,
      reason: closed.reason,
    });
  }
  return [...seen.values()];
}
