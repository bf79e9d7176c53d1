import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { reservation } from '#db/schema/trade.ts';
import type { Reservation, TradeDay } from '#shared/contracts/trade.ts';
import { addDays } from '#shared/domain/day.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeAnimal, makeCarcase, makeCuttingDay, makeFarm } from '#tests/support/make-farm.ts';
import { makeCutsOfTheSide, makeTradeAccount } from '#tests/support/make-selling-day.ts';

let world: World;
let butcher: string;
let dayId: string;
let oldId: string;
let youngId: string;

beforeAll(async () => {
  world = await startWorld();
  const { db, clock } = world;
  const today = clock.today();
  await makeFarm(db);
  await makeCutsOfTheSide(db);
  const day = await makeCuttingDay(db, today, { state: 'planned' });
  dayId = day.id;
  const killed = { killDay: addDays(today, -3), hotGrams: 320_000, conformation: 'R', fatClass: '4L' } as const;
  const carcases = [];
  for (const months of [40, 24]) {
    const { id: animalId } = await makeAnimal(db, { born: addDays(today, -months * 30 - 20) });
    carcases.push(await makeCarcase(db, dayId, { ...killed, animalId, state: 'hanging' }));
  }
  [oldId, youngId] = [carcases[0]?.id ?? '', carcases[1]?.id ?? ''];
  const person = await world.signIn('butcher');
  butcher = person.cookie;
  await makeTradeAccount(db, person.userId);
});
afterAll(() => world.stop());

function hinds(day: TradeDay | undefined, carcaseId: string) {
  const carcase = day?.carcases.find((each) => each.id === carcaseId);
  return (carcase?.sides ?? []).flatMap((side) => side.units.filter((unit) => unit.unitKind === 'hind'));
}

function reserve(line: object) {
  const body = { requestKey: randomUUID(), dayId, lines: [line], cuttingNote: '' };
  return world.request(butcher).post('/api/trade/reservations').send(body);
}

test('a beast over thirty months shows why its hindquarters may not leave whole, and none can be reserved', async () => {
  const [day] = ((await world.request(butcher).get('/api/trade/days')).body as { days: TradeDay[] }).days;
  expect(hinds(day, youngId).map((unit) => unit.closedReason)).toEqual([null, null]);
  const reasons = hinds(day, oldId).map((unit) => unit.closedReason);
  expect(reasons).toHaveLength(2);
  for (const reason of reasons) expect(reason).toMatch(/30 months|vertebral/i);

  const line = { kind: 'unit', unitKind: 'hind', carcaseId: oldId, side: null };
  const refused = await reserve(line);
  expect(refused.status).toBe(400);
  expect(refused.body).toMatchObject({ code: 'INVALID_INPUT', fields: { 'lines.0': reasons[0] } });
  expect(await world.db.select().from(reservation)).toEqual([]);
});

test('before anything is on sale, a reservation waits as asked', async () => {
  const asked = (await reserve({ kind: 'unit', unitKind: 'hind', carcaseId: youngId, side: 'left' }))
    .body as Reservation;
  expect(asked).toMatchObject({
    state: 'asked',
    lines: [{ name: 'Hindquarter', side: 'left', dispatchedGrams: null }],
  });
  const path = `/api/trade/reservations/${asked.id}/cancel`;
  const cancelled = await world.request(butcher).post(path).send({ version: asked.version });
  expect(cancelled.body).toMatchObject({ state: 'cancelled' });
});

test('a closed day cannot be reserved on', async () => {
  const { id } = await makeCuttingDay(world.db, world.clock.today(), {
    day: addDays(world.clock.today(), 23),
    state: 'closed',
  });
  const body = {
    requestKey: randomUUID(),
    dayId: id,
    cuttingNote: '',
    lines: [{ kind: 'unit', unitKind: 'hind', carcaseId: null, side: null }],
  };
  const answer = await world.request(butcher).post('/api/trade/reservations').send(body);
  expect(answer.status).toBe(404);
});
