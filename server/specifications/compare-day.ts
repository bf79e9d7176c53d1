import type { DayComparison } from '#shared/contracts/specifications.ts';
import { compareCuts } from '#shared/engine/cutout/compare-cuts.ts';
import type { Deps } from '#server/deps.ts';
import { loadWeighedDay } from './weighed-days.ts';

/** Foreseen against weighed by cut, of each carcase and of all of them pooled, as the day's own edition foresaw it. */
export async function compareCuttingDay(deps: Deps, dayId: string): Promise<DayComparison> {
  const { day, carcases } = await loadWeighedDay(deps.db, dayId);
  return {
    dayId,
    day: day.day,
    state: day.state,
    specificationId: day.specificationId,
    specificationName: day.specificationName,
    carcases: carcases.map(({ id, earTag, title, nodes }) => ({ id, earTag, title, cuts: compareCuts(nodes) })),
    pooled: compareCuts(...carcases.map(({ nodes }) => nodes)),
  };
}
