import { addDays, type Day } from '#shared/domain/day.ts';

export type Dose = { givenOn: Day; withdrawalDays: number };

/**
 * First day on which no withdrawal period is running, or null when no medicine is recorded. The book holds no hour, so
 * the day on which a period ends still counts as inside it.
 */
export function withdrawalClearDay(doses: readonly Dose[]): Day | null {
  const days = doses.map((dose) =>
    dose.withdrawalDays === 0 ? dose.givenOn : addDays(dose.givenOn, dose.withdrawalDays + 1),
  );
  return days.reduce<Day | null>((latest, day) => (latest === null || day > latest ? day : latest), null);
}
