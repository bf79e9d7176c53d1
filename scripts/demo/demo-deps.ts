import type { Deps } from '#server/deps.ts';
import { londonInstant, type Day } from '#shared/domain/day.ts';

/** The same server on an earlier day, so that the demo's past is lived through by the rules of its time. */
export function onDay(deps: Deps, day: Day, time = '12:00'): Deps {
  const now = londonInstant(day, time);
  return { ...deps, clock: { now: () => now, today: () => day } };
}
