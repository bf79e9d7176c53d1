import { hashPassword } from 'better-auth/crypto';
import { makeChance, type Chance } from '#db/seed/chance.ts';
import { insertFarm } from '#db/seed/demo-farm.ts';
import { insertHerd } from '#db/seed/demo-herd.ts';
import { insertPeople, type DemoPeople, type SignIn } from '#db/seed/demo-people.ts';
import signIns from '#db/seed/demo-sign-ins.json' with { type: 'json' };
import { insertStartingProducts } from '#db/seed/starting-products.ts';
import type { Deps } from '#server/deps.ts';
import { enqueue } from '#server/queue.ts';
import { addDays } from '#shared/domain/day.ts';
import { demoDays } from './demo-days.ts';
import { onDay } from './demo-deps.ts';
import { forgetJobs, markDemo } from './demo-state.ts';
import { seedDays, type SeededDays } from './seed-days.ts';
import { seedPastDay } from './seed-past-day.ts';
import { seedOrders, sendConfirmation } from './seed-orders.ts';
import { openSale } from './seed-sale.ts';
import { seedTrade } from './seed-trade.ts';

/** The same farm on every run, with its days counted from today. */
const SEED = 1_764;

/** Fills an empty database with the demo farm. Everything that a rule guards is done by the service that guards it. */
export async function seedDemoFarm(deps: Deps): Promise<void> {
  const chance = makeChance(SEED);
  const today = deps.clock.today();
  const days = demoDays(today);
  const killDays = { past: days.past.killDay, next: days.next.killDay, second: days.second.killDay };
  const ground = await deps.db.transaction(async (tx) => {
    const points = await insertFarm(tx, addDays(days.past.killDay, -30));
    const { specificationId } = await insertStartingProducts(tx);
    const people = await insertPeople(tx, chance, { signIns: signIns as SignIn[], hash: hashPassword });
    const herd = await insertHerd(tx, chance, { today, killDays });
    return { points, specificationId, people, herd };
  });
  const { ownerId } = ground.people;
  const seeded = await seedDays(deps, { ...ground, days, ownerId });
  await seedTrade(deps, ground.people, seeded);
  await sellDays(deps, chance, { seeded, people: ground.people });
  await forgetJobs(deps.db, ['replan-day']);
  await markDemo(deps.db, days.next.day, today);
}

type Sellers = { seeded: SeededDays; people: DemoPeople };

/** Each day goes on sale as the owner would put it there, and the customers buy; the second day has hardly begun. */
async function sellDays(deps: Deps, chance: Chance, { seeded, people }: Sellers): Promise<void> {
  const today = deps.clock.today();
  const { past, next, second } = seeded;
  const { customers } = people;
  const early = customers.slice(0, 1);
  await openSales(deps, seeded, people.ownerId);
  const before = onDay(deps, addDays(past.cutOffDay, -1));
  await seedOrders(before, chance, { day: past, people: [...early, ...customers.slice(12, 36)], from: 9 });
  await seedPastDay(deps, chance, { day: past, people });
  await forgetJobs(deps.db, ['send-mail']);
  const yesterday = onDay(deps, addDays(today, -1));
  const [first] = await seedOrders(yesterday, chance, {
    day: next,
    people: [...early, ...customers.slice(4, 30)],
    from: 7,
    byVan: true,
  });
  await seedOrders(yesterday, chance, { day: second, people: customers.slice(30, 38), from: 1 });
  if (first) await sendConfirmation(deps, first.id);
}

/** All at once: each waits for the solver most of the time. Only what is still on sale is explained. */
async function openSales(deps: Deps, { past, next, second }: SeededDays, ownerId: string): Promise<void> {
  const today = deps.clock.today();
  const [, ...open] = await Promise.all([
    openSale(onDay(deps, addDays(past.day, -12)), past, ownerId),
    openSale(onDay(deps, addDays(today, -9)), next, ownerId),
    openSale(onDay(deps, addDays(today, -2)), second, ownerId),
  ]);
  await forgetJobs(deps.db, ['replan-day', 'explain-allocation']);
  for (const allocationId of open) await enqueue(deps.db, 'explain-allocation', { allocationId });
}
