import type { Day } from './day.ts';

/** The one place that turns weights, money and dates into words: screens, mails, PDFs and titles all read the same. */

/** `4.2 kg` from one kilogram up, `650 g` below. */
export function formatWeight(grams: number): string {
  const size = Math.abs(grams);
  if (size < 1000) return `${grams} g`;
  const tenths = Math.sign(grams) * Math.round(size / 100);
  return `${groupThousands((tenths / 10).toFixed(1))} kg`;
}

/** Whole kilograms for large totals: `455 kg`. */
export function formatKilograms(grams: number): string {
  return `${groupThousands(String(Math.round(grams / 1000)))} kg`;
}

/** Every gram, for scales and ledgers: `168.512 kg`. */
export function formatGrams(grams: number): string {
  return `${groupThousands((grams / 1000).toFixed(3))} kg`;
}

/** `£62.00`; a minus sign stands before the pound. */
export function formatMoney(pence: number): string {
  const size = Math.abs(pence);
  const text = `£${groupThousands(String(Math.trunc(size / 100)))}.${String(size % 100).padStart(2, '0')}`;
  return pence < 0 ? `−${text}` : text;
}

/** A rate in tenths of a penny per kg: `£18.80/kg`. */
export function formatRate(tenthPencePerKg: number): string {
  return `${formatMoney(Math.round(tenthPencePerKg / 10))}/kg`;
}

const WEEKDAYS = ['Sun', 'Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat'];
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** Parts per 100,000: `18.3 %`, three decimals at most. */
export function formatPercent(ppht: number): string {
  return `${(ppht / 1000).toFixed(3).replace(/\.?0+$/, '')} %`;
}

/** `Fri 12 Dec`. Written out by hand: the languages' tables differ between browsers and servers. */
export function formatDay(day: Day): string {
  const [year = 0, month = 1, date = 1] = day.split('-').map(Number);
  const weekday = new Date(Date.UTC(year, month - 1, date)).getUTCDay();
  return `${WEEKDAYS[weekday]} ${date} ${MONTHS[month - 1]}`;
}

/** `Fri 12 Dec 2026`, where the year matters (labels, invoices, the herd). */
export function formatDayWithYear(day: Day): string {
  return `${formatDay(day)} ${day.slice(0, 4)}`;
}

const londonParts = new Intl.DateTimeFormat('en-GB', {
  timeZone: 'Europe/London',
  year: 'numeric',
  month: '2-digit',
  day: '2-digit',
  hour: '2-digit',
  minute: '2-digit',
  hourCycle: 'h23',
});

/** Calendar day and wall-clock time of an instant on the farm. */
export function londonDayAndTime(instant: string | Date): { day: Day; time: string } {
  const parts = new Map(londonParts.formatToParts(new Date(instant)).map((part) => [part.type, part.value]));
  const read = (type: Intl.DateTimeFormatPartTypes) => parts.get(type) ?? '';
  return { day: `${read('year')}-${read('month')}-${read('day')}`, time: `${read('hour')}:${read('minute')}` };
}

/** `14:30` on the farm's clock. */
export function formatTime(instant: string | Date): string {
  return londonDayAndTime(instant).time;
}

/** `Fri 12 Dec, 14:30`. */
export function formatDayTime(instant: string | Date): string {
  const { day, time } = londonDayAndTime(instant);
  return `${formatDay(day)}, ${time}`;
}

/** `1 box`, `14 boxes`. */
export function formatCount(count: number, one: string, many = `${one}s`): string {
  return `${count} ${count === 1 ? one : many}`;
}

function groupThousands(digits: string): string {
  return digits.replace(/\B(?<!\.\d*)(?=(\d{3})+(?!\d))/g, ',');
}
