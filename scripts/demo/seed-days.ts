import type { DemoPoints } from '#db/seed/demo-farm.ts';
import { KILL_PLANS, type DemoHerd } from '#db/seed/demo-herd.ts';
import { bookCarcases } from '#server/carcases/booking-service.ts';
import { addCuttingDay } from '#server/carcases/cutting-day-service.ts';
import { enterKillSheet } from '#server/carcases/kill-sheet-service.ts';
import type { Deps } from '#server/deps.ts';
import { addDays } from '#shared/domain/day.ts';
import { onDay } from './demo-deps.ts';
import type { DemoDay, DemoDays } from './demo-days.ts';

export type SeededDay = DemoDay & { id: string; carcases: { id: string; animalId: string }[] };
export type SeededDays = Record<keyof DemoDays, SeededDay>;

type Ground = { ownerId: string; specificationId: string; points: DemoPoints; herd: DemoHerd; days: DemoDays };

/** Plans the three days and books their beasts; those that are dead by now have their kill sheets. */
export async function seedDays(deps: Deps, ground: Ground): Promise<SeededDays> {
  const past = await seedDay(deps, ground, 'past');
  const next = await seedDay(deps, ground, 'next');
  const second = await seedDay(deps, ground, 'second');
  for (const [key, day] of [
    ['past', past],
    ['next', next],
  ] as const) {
    const then = onDay(deps, addDays(day.killDay, 1));
    for (const [index, carcase] of day.carcases.entries()) {
      const plan = KILL_PLANS[key][index];
      if (!plan) continue;
      const { id: carcaseId } = carcase;
      await enterKillSheet(then, ground.ownerId, {
        ...plan.sheet,
        carcaseId,
        version: 1,
        killDay: day.killDay,
        dressingSpec: 'UK standard',
      });
    }
  }
  return { past, next, second };
}

async function seedDay(deps: Deps, ground: Ground, key: keyof DemoDays): Promise<SeededDay> {
  const { ownerId, specificationId, points, herd } = ground;
  const when = ground.days[key];
  const earlier = [deps.clock.today(), addDays(when.killDay, -10)].sort()[0] ?? when.killDay;
  const then = onDay(deps, earlier);
  const { day, cutOffDay } = when;
  const friday = addDays(day, 1);
  const saturday = addDays(day, 2);
  const { id } = await addCuttingDay(then, ownerId, {
    day,
    cutOffDay,
    cutOffTime: '18:00',
    specificationId,
    collections: [
      { pointId: points.gate, day: friday, from: '14:00', to: '18:30', slotMinutes: 30, capacity: 6 },
      { pointId: points.chapel, day: saturday, from: '09:00', to: '11:30', slotMinutes: 30, capacity: 6 },
    ],
  });
  const booking = { animalIds: herd[key], killDay: when.killDay, cuttingDayId: id };
  const booked = await bookCarcases(then, ownerId, booking);
  const carcases = herd[key].map((animalId) => ({
    animalId,
    id: booked.find((carcase) => carcase.animalId === animalId)?.id ?? '',
  }));
  return { ...when, id, carcases };
}
