import { londonDay } from '#shared/domain/day.ts';
import type { Clock } from './deps.ts';

/** The one place that asks the system clock. */
export const systemClock: Clock = {
  now: () => new Date(),
  today: () => londonDay(new Date()),
};
