import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { asc, eq, ne } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { tradeAccount } from '#db/schema/trade.ts';
import { emptyDatabase, readDemoState } from '#scripts/demo/demo-state.ts';
import { seedDemoFarm } from '#scripts/demo/seed-demo-farm.ts';
import { findPublishedAllocation } from '#server/allocation/allocation-queries.ts';
import { listCarcasesOfDays } from '#server/carcases/carcase-queries.ts';
import { loadDayCutouts } from '#server/carcases/day-figures.ts';
import { listBalances } from '#server/carcases/ledger-queries.ts';
import { readPublishedWays } from '#server/carcases/published-plan.ts';
import { listHerd } from '#server/herd/herd-service.ts';
import { proveCounters } from '#server/orders/prove-counters.ts';
import { addDays } from '#shared/domain/day.ts';
import { hasValidCheckDigit } from '#shared/domain/ear-tag.ts';
import { startWorld, type World } from '#tests/support/harness.ts';

let world: World;

// The seed allocates and publishes three days with the real solver: a minute on a machine that has nothing else to do.
beforeAll(async () => {
  world = await startWorld();
  await seedDemoFarm(world.deps);
}, 900_000);
afterAll(() => world.stop());

const listDays = () => world.db.select().from(cuttingDay).orderBy(asc(cuttingDay.day));

describe('the demo farm', () => {
  test('has a herd of about 140 with ear tags that bear their check digit', async () => {
    const herd = await listHerd(world.deps);
    expect(herd.length).toBeGreaterThanOrEqual(135);
    expect(herd.length).toBeLessThanOrEqual(145);
    expect(herd.every((animal) => hasValidCheckDigit(animal.earTag))).toBe(true);
  });

  test('has one day behind it, closed, and two open ones ahead, of two carcases each', async () => {
    const days = await listDays();
    expect(days.map((day) => day.state)).toEqual(['closed', 'open', 'open']);
    const [past, next] = days;
    expect(past && past.day < world.clock.today()).toBe(true);
    expect(next && next.day > addDays(world.clock.today(), 4)).toBe(true);
    for (const day of days) expect(await listCarcasesOfDays(world.db, [day.id])).toHaveLength(2);
  });

  test('has three butchers, forty customers and twelve loose cuts', async () => {
    expect(await world.db.$count(tradeAccount, eq(tradeAccount.state, 'approved'))).toBe(3);
    const customers = await world.db.query.user.findMany({ where: (user) => eq(user.role, 'customer') });
    expect(customers).toHaveLength(40);
    expect(customers.every((customer) => customer.email.endsWith('example.com'))).toBe(true);
    const [, next] = await listDays();
    const loose = await world.db
      .select()
      .from(offer)
      .where(eq(offer.cuttingDayId, next?.id ?? ''));
    expect(loose.filter((row) => row.kind === 'loose')).toHaveLength(12);
    expect(loose.filter((row) => row.kind === 'box' && row.offered > 0)).toHaveLength(6);
  });

  test('has orders that the van brings, on a round of the next day', async () => {
    const [, next] = await listDays();
    const orders = await world.db
      .select()
      .from(customerOrder)
      .where(eq(customerOrder.cuttingDayId, next?.id ?? ''));
    const brought = orders.filter((order) => order.deliveryAddress !== null);
    expect(brought.length).toBeGreaterThanOrEqual(3);
    expect(new Set(brought.map((order) => order.slotId)).size).toBe(1);
    expect(brought.every((order) => order.deliveryPostcode?.startsWith('ZZ'))).toBe(true);
  });

  test('sells what its carcases give: boxes, loose packs and trade lines add up to it within 2 per cent', async () => {
    for (const day of await listDays()) {
      const published = await findPublishedAllocation(world.db, day.id);
      if (!published) throw new Error(`${day.day} was never published`);
      const { plan } = published.plan;
      const units = new Set(
        plan.fates.flatMap((fate) => fate.soldPrimals.map((sold) => `${fate.sideId}/${sold.primalId}`)),
      );
      const { carcases } = await loadDayCutouts(world.db, day.id, await readPublishedWays(world.db, day.id));
      let given = 0;
      let asUnits = 0;
      for (const { row, cutout } of carcases) {
        for (const node of cutout.nodes) {
          if (node.level !== 'line' || (node.kind !== 'cut' && node.kind !== 'trim')) continue;
          const [side = '', , primalId = ''] = node.path.split('/');
          given += node.grams;
          if (units.has(`${row.id}/${side}/${primalId}`)) asUnits += node.grams;
        }
      }
      const sold = plan.cuts.reduce((sum, cut) => sum + cut.boxGrams + cut.looseGrams + cut.tradeGrams, asUnits);
      expect(Math.abs(sold - given) / given, day.day).toBeLessThan(0.02);
    }
  });

  test('keeps every counter equal to its order lines, and takes money for every order', async () => {
    expect(await proveCounters(world.deps)).toEqual([]);
    const orders = await world.db.select().from(customerOrder);
    expect(orders.length).toBeGreaterThan(50);
    expect(orders.every((order) => order.paymentState !== 'unpaid')).toBe(true);
    const paid = world.payments.charges().reduce((sum, charge) => sum + charge.amount, 0);
    expect(paid).toBe(orders.reduce((sum, order) => sum + order.totalPence, 0));
  });

  test('has a place for every gram of the day that is over', async () => {
    const [past] = await listDays();
    const carcases = await listCarcasesOfDays(world.db, [past?.id ?? '']);
    const { carcases: figures } = await loadDayCutouts(world.db, past?.id ?? '');
    const balances = await listBalances(
      world.db,
      carcases.map((carcase) => carcase.id),
    );
    expect(balances.filter(({ place }) => place === 'carcase' || place === 'chiller')).toEqual([]);
    const there = balances.reduce((sum, balance) => sum + balance.grams, 0);
    expect(there).toBe(figures.reduce((sum, { cutout }) => sum + cutout.cold.grams, 0));
    const open = await world.db.select().from(customerOrder).where(ne(customerOrder.state, 'collected'));
    expect(open.filter((order) => order.cuttingDayId === past?.id).map((order) => order.state)).toEqual(['missed']);
  });

  test('is seeded afresh once its next day has passed, unless somebody has used it', async () => {
    const [, next] = await listDays();
    const after = addDays(next?.day ?? '', 1);
    expect(await readDemoState(world.db, world.clock.today())).toBe('current');
    expect(await readDemoState(world.db, after)).toBe('stale and untouched');
    await world.signIn('customer');
    expect(await readDemoState(world.db, after)).toBe('stale and used');
    await emptyDatabase(world.db);
    expect(await readDemoState(world.db, after)).toBe('empty');
  });
});
