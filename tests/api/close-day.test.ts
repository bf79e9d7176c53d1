import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { cuttingDay } from '#db/schema/carcases.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { pack, stockMovement } from '#db/schema/packs.ts';
import { reservation, reservationLine, tradeAccount } from '#db/schema/trade.ts';
import { getCarcase } from '#server/carcases/carcase-service.ts';
import { listBalances } from '#server/carcases/ledger-queries.ts';
import type { CuttingDay } from '#shared/contracts/carcases.ts';
import { addDays, addMonths } from '#shared/domain/day.ts';
import type { Problem } from '#shared/errors.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeAnimal, makeCarcase, makeCuttingDay, makeFarm, makeSlot } from '#tests/support/make-farm.ts';
import { makeTraditionalCuts, makeTraditionalSide } from '#tests/support/make-specification.ts';

let world: World;
let owner: ReturnType<World['request']>;
let ownerId: string;
let specificationId: string;
let made = 0;

beforeAll(async () => {
  world = await startWorld();
  await makeFarm(world.db);
  await makeTraditionalCuts(world.db);
  specificationId = (await makeTraditionalSide(world.db)).id;
  const signedIn = await world.signIn('owner');
  owner = world.request(signedIn.cookie);
  ownerId = signedIn.userId;
});
afterAll(() => world.stop());

const today = () => world.clock.today();

/** A day with one carcase of which `productGrams` lie packed in the chiller. */
async function aDay({ productShare = 1 } = {}) {
  const day = await makeCuttingDay(world.db, today(), { day: addDays(today(), 20 + (made += 1)), specificationId });
  const animal = await makeAnimal(world.db, { born: addMonths(today(), -26), liveGrams: 620_000 });
  const { id: carcaseId } = await makeCarcase(world.db, day.id, {
    animalId: animal.id,
    killDay: addDays(day.day, -17),
    coldGrams: 340_000,
    state: 'cut',
  });
  const { nodes, coldGrams } = await getCarcase(world.db, carcaseId);
  const product = nodes
    .filter((node) => node.level === 'line' && (node.kind === 'cut' || node.kind === 'trim'))
    .reduce((sum, node) => sum + node.grams, 0);
  const grams = Math.round(product * productShare);
  await world.db
    .insert(stockMovement)
    .values({ carcaseId, fromPlace: null, toPlace: 'carcase', grams: coldGrams, reason: 'cold weight' });
  for (let left = grams; left > 0; left -= 50_000) {
    const weight = Math.min(left, 50_000);
    const [row] = await world.db
      .insert(pack)
      .values({
        code: `CODE${(made += 1)}`,
        cuttingDayId: day.id,
        carcaseId,
        cutId: 'mince',
        grams: weight,
        packedOn: day.day,
        useBy: addDays(day.day, 5),
      })
      .returning();
    await world.db.insert(stockMovement).values({
      carcaseId,
      packId: row?.id ?? null,
      fromPlace: 'carcase',
      toPlace: 'chiller',
      grams: weight,
      reason: 'packed',
    });
  }
  return { id: day.id, carcaseId, coldGrams, packedGrams: grams, nodes };
}

const close = (dayId: string, version = 1) => owner.post(`/api/cutting-days/${dayId}/close`).send({ version });
const stateOf = async (dayId: string) => {
  const [row] = await world.db.select().from(cuttingDay).where(eq(cuttingDay.id, dayId));
  return row?.state;
};

async function anOrder(dayId: string, state: 'confirmed' | 'collected') {
  const slot = await makeSlot(world.db, dayId, today(), {
    startsAt: new Date(world.clock.now().getTime() + (made += 1) * 3_600_000),
    endsAt: new Date(world.clock.now().getTime() + made * 3_600_000 + 60_000),
  });
  const [row] = await world.db
    .insert(customerOrder)
    .values({
      token: `a-token-of-more-than-twenty-${made}`,
      basketKey: `00000000-0000-4000-8000-${String(made).padStart(12, '0')}`,
      cuttingDayId: dayId,
      slotId: slot.id,
      name: 'Ada Fenwether',
      email: 'ada.fenwether@example.com',
      phone: '07700 900101',
      state,
      paymentState: 'paid',
      isHeld: false,
      totalPence: 7_600,
      reachedPaymentAt: world.clock.now(),
    })
    .returning();
  return row;
}

describe('closing a cutting day', () => {
  test('gives every gram its place: unsold packs to the freezer, bone, fat and loss to waste', async () => {
    const day = await aDay();
    await anOrder(day.id, 'collected');
    const answer = await close(day.id).expect(200);
    const body = answer.body as CuttingDay;
    expect(body).toMatchObject({ state: 'closed', version: 2 });
    expect(body.carcases[0]?.state).toBe('sold through');
    const balances = await listBalances(world.db, [day.carcaseId]);
    const at = (place: string) =>
      balances.filter((balance) => balance.place === place).reduce((sum, balance) => sum + balance.grams, 0);
    expect(at('freezer')).toBe(day.packedGrams);
    expect(at('waste')).toBe(day.coldGrams - day.packedGrams);
    expect(at('carcase') + at('chiller')).toBe(0);
  });

  test('is refused while an order is not settled, and names it', async () => {
    const day = await aDay();
    const order = await anOrder(day.id, 'confirmed');
    const answer = await close(day.id).expect(409);
    expect((answer.body as Problem).detail).toContain(String(order?.orderNo));
    expect(await stateOf(day.id)).toBe('open');
    expect((await listBalances(world.db, [day.carcaseId])).some(({ place }) => place === 'waste')).toBe(false);
  });

  test('is refused while product lies unweighed', async () => {
    const day = await aDay({ productShare: 0.5 });
    const answer = await close(day.id).expect(409);
    expect((answer.body as Problem).detail).toContain('have no place yet');
    expect((answer.body as Problem).figures).toMatchObject({ unplacedGrams: day.coldGrams - day.packedGrams });
    expect(await stateOf(day.id)).toBe('open');
  });

  test('is refused while a butcher waits for a quarter, and knows that a quarter that left took its bone along', async () => {
    const day = await aDay({ productShare: 0.75 });
    const userId = (await world.signIn('butcher')).userId;
    const [account] = await world.db
      .insert(tradeAccount)
      .values({ userId, businessName: 'Pennick', addressLines: ['ZZ4 2PD'], phone: '01632 960211', state: 'approved' })
      .returning();
    const [row] = await world.db
      .insert(reservation)
      .values({
        accountId: account?.id ?? '',
        cuttingDayId: day.id,
        requestKey: '00000000-0000-4000-8000-00000000a001',
        state: 'confirmed',
      })
      .returning();
    const [line] = await world.db
      .insert(reservationLine)
      .values({
        reservationId: row?.id ?? '',
        kind: 'unit',
        unitKind: 'hind',
        carcaseId: day.carcaseId,
        side: 'left',
        tenthPencePerKg: 8_900,
      })
      .returning();
    const waiting = await close(day.id).expect(409);
    expect((waiting.body as Problem).detail).toContain(String(row?.reservationNo));

    const grams = day.nodes.find((node) => node.path === 'left/hind')?.grams ?? 0;
    await owner
      .post(`/api/office/reservations/${row?.id}/dispatch`)
      .send({ version: 1, weights: [{ lineId: line?.id, grams }], isShortAccepted: false })
      .expect(200);
    await close(day.id).expect(200);
    const balances = await listBalances(world.db, [day.carcaseId]);
    expect(balances.find(({ place }) => place === 'trade')?.grams).toBe(grams);
    expect(balances.some(({ place }) => place === 'carcase')).toBe(false);
  });

  test('by two owners at once is done once', async () => {
    const day = await aDay();
    await close(day.id).expect(200);
    const answer = await close(day.id).expect(409);
    expect(answer.body).toMatchObject({ code: 'STATE_CHANGED' });
    const rows = await world.db.select().from(stockMovement).where(eq(stockMovement.carcaseId, day.carcaseId));
    expect(rows.filter((movement) => movement.toPlace === 'waste')).toHaveLength(1);
    expect(rows.every((movement) => movement.toPlace !== 'waste' || movement.byUserId === ownerId)).toBe(true);
  });
});
