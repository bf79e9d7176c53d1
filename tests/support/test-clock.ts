import { londonDay } from '#shared/domain/day.ts';
import type { Clock } from '#server/deps.ts';

export type TestClock = Clock & { advance: (step: { minutes?: number; days?: number }) => void };

/**
 * Runs with the true clock, since the payment company's clock does too, and jumps when a test says so.
 * Tests therefore name days relative to `today()`, never dates.
 */
export function testClock(): TestClock {
  let ahead = 0;
  const now = () => new Date(Date.now() + ahead);
  return {
    now,
    today: () => londonDay(now()),
    advance: ({ minutes = 0, days = 0 }) => {
      ahead += (minutes + days * 1440) * 60_000;
    },
  };
}
