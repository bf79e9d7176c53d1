import { hashPassword } from 'better-auth/crypto';
import { makeChance } from '#db/seed/chance.ts';
import { insertFarm } from '#db/seed/demo-farm.ts';
import { insertHerd } from '#db/seed/demo-herd.ts';
import { insertPeople, type SignIn } from '#db/seed/demo-people.ts';
import signIns from '#db/seed/demo-sign-ins.json' with { type: 'json' };
import { insertStartingProducts } from '#db/seed/starting-products.ts';
import type { Deps } from '#server/deps.ts';
import { addDays } from '#shared/domain/day.ts';
import { demoDays } from './demo-days.ts';
import { onDay } from './demo-deps.ts';
import { seedDays } from './seed-days.ts';
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
  await openSale(onDay(deps, addDays(days.past.day, -12)), seeded.past, ownerId);
  await openSale(onDay(deps, addDays(today, -1)), seeded.next, ownerId);
  await openSale(onDay(deps, addDays(today, -1)), seeded.second, ownerId);
}
