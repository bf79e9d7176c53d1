import { addDays, type Day } from '#shared/domain/day.ts';

export type DemoDay = { day: Day; killDay: Day; cutOffDay: Day };
export type DemoDays = Record<'past' | 'next' | 'second', DemoDay>;

const THURSDAY = 4;
/** Hung for seventeen days, as native breeds are. */
const HANGING_DAYS = 17;

/** Three Thursdays: one three weeks gone, the next one five to eleven days ahead, and one a fortnight later. */
export function demoDays(today: Day): DemoDays {
  const soonest = addDays(today, 5);
  const weekday = new Date(`${soonest}T00:00:00Z`).getUTCDay();
  const next = addDays(soonest, (THURSDAY - weekday + 7) % 7);
  const around = (day: Day): DemoDay => ({
    day,
    killDay: addDays(day, -HANGING_DAYS),
    cutOffDay: addDays(day, -2),
  });
  return { past: around(addDays(next, -21)), next: around(next), second: around(addDays(next, 14)) };
}
