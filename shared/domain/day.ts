import { londonDayAndTime } from './words.ts';

/** A calendar date on the farm, `YYYY-MM-DD`. Plain text, so that no time zone can move it. */
export type Day = string;

const MS_PER_DAY = 86_400_000;

function toUtc(day: Day): number {
  const [year = 0, month = 1, date = 1] = day.split('-').map(Number);
  return Date.UTC(year, month - 1, date);
}

function fromUtc(ms: number): Day {
  return new Date(ms).toISOString().slice(0, 10);
}

/** True for a date that exists: 2026-02-30 does not. */
export function isDay(text: string): boolean {
  return /^\d{4}-\d{2}-\d{2}$/.test(text) && fromUtc(toUtc(text)) === text;
}

export function addDays(day: Day, days: number): Day {
  return fromUtc(toUtc(day) + days * MS_PER_DAY);
}

/** Whole days from `from` to `to`; negative when `to` is earlier. */
export function daysBetween(from: Day, to: Day): number {
  return Math.round((toUtc(to) - toUtc(from)) / MS_PER_DAY);
}

/** The same date `months` later, or the last day of a shorter month. */
export function addMonths(day: Day, months: number): Day {
  const [year = 0, month = 1, date = 1] = day.split('-').map(Number);
  const lastOfMonth = new Date(Date.UTC(year, month - 1 + months + 1, 0));
  return fromUtc(
    Date.UTC(lastOfMonth.getUTCFullYear(), lastOfMonth.getUTCMonth(), Math.min(date, lastOfMonth.getUTCDate())),
  );
}

/** Whole calendar months completed between two dates. */
export function ageInMonths(born: Day, on: Day): number {
  const [bornYear = 0, bornMonth = 1] = born.split('-').map(Number);
  const [year = 0, month = 1] = on.split('-').map(Number);
  const months = (year - bornYear) * 12 + (month - bornMonth);
  return addMonths(born, months) <= on ? months : months - 1;
}

/** The day of an instant in Europe/London. */
export function londonDay(instant: string | Date): Day {
  return londonDayAndTime(instant).day;
}

/** The instant of a wall-clock time on the farm. In the hour that is skipped or doubled the earlier offset counts. */
export function londonInstant(day: Day, time: string): Date {
  const [hour = 0, minute = 0] = time.split(':').map(Number);
  const asUtc = toUtc(day) + (hour * 60 + minute) * 60_000;
  for (const offsetHours of [1, 0]) {
    const candidate = new Date(asUtc - offsetHours * 3_600_000);
    const seen = londonDayAndTime(candidate);
    if (seen.day === day && seen.time === time) return candidate;
  }
  return new Date(asUtc);
}
