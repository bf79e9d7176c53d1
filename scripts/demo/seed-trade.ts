import { randomUUID } from 'node:crypto';
import type { DemoPeople } from '#db/seed/demo-people.ts';
import { addReservation } from '#server/trade/trade-queries.ts';
import type { Deps } from '#server/deps.ts';
import type { SeededDay, SeededDays } from './seed-days.ts';

type Line =
  | { unitKind: 'fore' | 'hind'; rate: number; carcase?: number; side?: 'left' | 'right' }
  | { cutId: string; grams: number; rate: number };
type Wish = { butcher: number; note: string; lines: Line[] };

/** Rates in tenths of a penny per kg, as each butcher's own price list has them. */
const WISHES: Record<keyof SeededDays, Wish[]> = {
  past: [
    {
      butcher: 0,
      note: 'Long shin, please, and leave the rump on.',
      lines: [{ unitKind: 'hind', rate: 8_900, carcase: 0, side: 'left' }],
    },
    { butcher: 1, note: '', lines: [{ unitKind: 'fore', rate: 6_200, carcase: 1, side: 'right' }] },
    { butcher: 2, note: '', lines: [{ cutId: 'brisket-joint', grams: 8_000, rate: 9_600 }] },
  ],
  next: [
    {
      butcher: 0,
      note: 'Rump left on, chine bone out.',
      lines: [{ unitKind: 'hind', rate: 8_900, carcase: 0, side: 'left' }],
    },
    {
      butcher: 1,
      note: 'Neck on; we bone it ourselves.',
      lines: [{ unitKind: 'fore', rate: 6_200, carcase: 1, side: 'right' }],
    },
    {
      butcher: 2,
      note: 'Brisket in pieces of about two kilograms.',
      lines: [
        { cutId: 'brisket-joint', grams: 8_000, rate: 9_600 },
        { cutId: 'diced-beef', grams: 6_000, rate: 9_800 },
      ],
    },
  ],
  second: [
    { butcher: 1, note: '', lines: [{ unitKind: 'fore', rate: 6_200 }] },
    {
      butcher: 2,
      note: 'Hang it as long as you can.',
      lines: [
        { unitKind: 'hind', rate: 8_850 },
        { cutId: 'brisket-joint', grams: 5_000, rate: 9_600 },
      ],
    },
  ],
};

/** What the butchers have reserved of each day; on the past day it has left with them. */
export async function seedTrade(
  deps: Deps,
  { butchers }: Pick<DemoPeople, 'butchers'>,
  days: SeededDays,
): Promise<void> {
  for (const key of ['past', 'next', 'second'] as const) {
    for (const wish of WISHES[key]) await seedReservation(deps, { butchers, wish, day: days[key] });
  }
}

async function seedReservation(
  deps: Deps,
  { butchers, wish, day }: { butchers: DemoPeople['butchers']; wish: Wish; day: SeededDay },
): Promise<void> {
  const account = butchers[wish.butcher];
  if (!account) throw new Error('The demo has fewer butchers than reservations name.');
  await deps.db.transaction(async (tx) => {
    await addReservation(
      tx,
      {
        accountId: account.accountId,
        cuttingDayId: day.id,
        requestKey: randomUUID(),
        state: 'confirmed',
        cuttingNote: wish.note,
        answer: 'Confirmed. Weights are settled on the scale.',
      },
      wish.lines.map((line) =>
        'cutId' in line
          ? { kind: 'cut', cutId: line.cutId, grams: line.grams, tenthPencePerKg: line.rate }
          : {
              kind: 'unit',
              unitKind: line.unitKind,
              carcaseId: line.carcase === undefined ? null : (day.carcases[line.carcase]?.id ?? null),
              side: line.side ?? null,
              tenthPencePerKg: line.rate,
            },
      ),
    );
  });
}
