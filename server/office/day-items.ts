import type { TodayItem } from '#shared/contracts/office.ts';
import type { Day } from '#shared/domain/day.ts';
import { formatCount, formatDay } from '#shared/domain/words.ts';
import type { DayAllocation, OrderCount, TodayDay } from './today-queries.ts';

export type DayFacts = {
  day: TodayDay;
  today: Day;
  allocations: readonly DayAllocation[];
  orders: readonly OrderCount[];
};

/** What one cutting day that is not closed waits for. */
export function dayItems(facts: DayFacts): TodayItem[] {
  if (facts.day.carcases === 0) return [];
  return [...allocationItems(facts), ...packingItems(facts)];
}

function allocationItems({ day, allocations }: DayFacts): TodayItem[] {
  const ofDay = allocations.filter((row) => row.cuttingDayId === day.id);
  const newest = ofDay.reduce<DayAllocation | null>(
    (latest, row) => (latest === null || row.createdAt > latest.createdAt ? row : latest),
    null,
  );
  const href = `/office/cutting-days/${day.id}/allocation`;
  const name = formatDay(day.day);
  if (!newest) {
    const detail = `${formatCount(day.carcases, 'carcase')}, nothing on sale yet.`;
    return [{ kind: 'allocate', title: `Allocate ${name}`, detail, href }];
  }
  const items: TodayItem[] = [];
  const shortfalls = newest.figuresVersion === day.figuresVersion ? newest.plan.plan.shortfalls : [];
  if (shortfalls.length > 0) {
    const detail = shortfalls.map((short) => `${short.name}: ${short.short} ${short.unit} short`).join('; ');
    items.push({ kind: 'shortfall', title: `${name} cannot give all that is promised`, detail, href });
  }
  if (newest.figuresVersion < day.figuresVersion) {
    const detail = 'Weights or carcases have changed since it was worked out.';
    items.push({ kind: 'out of date', title: `The allocation of ${name} is out of date`, detail, href });
  } else if (newest.state === 'draft' && newest.isProven && shortfalls.length === 0) {
    const detail = 'A newer plan waits; what is on sale is still as before.';
    items.push({ kind: 'publish', title: `Publish the allocation of ${name}`, detail, href });
  }
  return items;
}

function packingItems({ day, today, orders }: DayFacts): TodayItem[] {
  const ofDay = orders.filter((row) => row.dayId === day.id);
  const count = (state: OrderCount['state']) => ofDay.find((row) => row.state === state)?.orders ?? 0;
  const name = formatDay(day.day);
  const at = `/office/cutting-days/${day.id}`;
  const items: TodayItem[] = [];
  const toFill = count('confirmed');
  if (day.day <= today && toFill > 0) {
    const detail = 'Weigh the packs, then put them to the orders.';
    items.push({
      kind: 'fill',
      title: `${formatCount(toFill, 'order')} of ${name} to fill`,
      detail,
      href: `${at}/packing`,
    });
  }
  const toTell = count('packed');
  if (toTell > 0) {
    const detail = 'Look through the mails and send them in one go.';
    const title = `${formatCount(toTell, 'collection mail')} of ${name} to confirm`;
    items.push({ kind: 'collection mails', title, detail, href: `${at}/collections` });
  }
  return items;
}
