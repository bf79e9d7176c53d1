import { afterAll, beforeAll, expect, test } from 'vitest';
import { collectionPoint } from '#db/schema/orders.ts';
import { addDays, londonInstant } from '#shared/domain/day.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeCuttingDay, makeSlot } from '#tests/support/make-farm.ts';
import {
  basketFor,
  getOrderRow,
  makeConfirmedOrder,
  makePackedOrder,
  makeStall,
  place,
  takenOf,
  type Stall,
} from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;
let chapelId: string;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 60 });
  const [chapel] = await world.db
    .insert(collectionPoint)
    .values({ name: 'The old chapel', addressLines: ['ZZ2 4HH'], directions: 'Ring the bell.', bring: 'A bag.' })
    .returning();
  chapelId = chapel?.id ?? '';
});
afterAll(() => world.stop());

let hours = 10;

/** A time at the chapel with so much room; each call makes a later one. */
function makeTime(capacity: number) {
  hours += 1;
  const day = addDays(world.clock.today(), 10);
  const [startsAt, endsAt] = [londonInstant(day, `${hours}:00`), londonInstant(day, `${hours}:30`)];
  return makeSlot(world.db, stall.day.id, world.clock.today(), { pointId: chapelId, startsAt, endsAt, capacity });
}

function move(token: string, slotId: string) {
  return world.request().post(`/api/orders/${token}/slot`).send({ slotId });
}

test('moving a paid order to a time with room, gives the old place back and tells the customer once', async () => {
  const order = await makeConfirmedOrder(world, stall, { email: 'mover@example.com' });
  const slot = await makeTime(1);
  const before = (await takenOf(world, stall.slot.id)) ?? 0;
  const answer = await move(order.token, slot.id);
  expect(answer.status).toBe(200);
  expect(answer.body).toMatchObject({ slotId: slot.id, collection: { name: 'The old chapel' }, canChange: true });
  expect(await takenOf(world, stall.slot.id)).toBe(before - 1);
  expect(await takenOf(world, slot.id)).toBe(1);
  expect((await move(order.token, slot.id)).status).toBe(200);
  expect(await takenOf(world, slot.id)).toBe(1);
  await world.runJobs();
  const isChange = (mail: { subject: string }) => mail.subject.startsWith(`Order ${order.orderNo} has changed`);
  const mail = await world.mail.waitForMail('mover@example.com', isChange);
  expect(mail.text).toContain('from The old chapel');
  expect(mail.html).toContain('The old chapel');
  expect(mail.text).toContain(`/orders/${order.token}`);
  const file = Buffer.from(mail.attachments[0]?.contentBase64 ?? '', 'base64').toString();
  expect(file).toContain(`SEQUENCE:${order.version + 1}`);
  expect(world.mail.messages().filter(isChange)).toHaveLength(1);
});

test('moving two orders to the last place of a time at once, moves one and says SLOT_FULL to the other', async () => {
  const orders = [await makeConfirmedOrder(world, stall), await makeConfirmedOrder(world, stall)];
  const slot = await makeTime(1);
  const before = (await takenOf(world, stall.slot.id)) ?? 0;
  const answers = await Promise.all(orders.map((order) => move(order.token, slot.id)));
  expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
  const refused = answers.find((answer) => answer.status === 409);
  expect(refused?.body).toMatchObject({ code: 'SLOT_FULL', fields: { slotId: 'This time is full.' } });
  expect(await takenOf(world, slot.id)).toBe(1);
  expect(await takenOf(world, stall.slot.id)).toBe(before - 1);
});

test('moving two orders into each other’s times at once, moves both', async () => {
  const [one, other] = [await makeTime(2), await makeTime(2)];
  const first = await makeConfirmedOrder(world, stall, { slotId: one.id });
  const second = await makeConfirmedOrder(world, stall, { slotId: other.id });
  const answers = await Promise.all([move(first.token, other.id), move(second.token, one.id)]);
  expect(answers.map((answer) => answer.status)).toEqual([200, 200]);
  expect([await takenOf(world, one.id), await takenOf(world, other.id)]).toEqual([1, 1]);
});

test('moving an order to a time of another cutting day, is refused beside the time', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const later = await makeCuttingDay(world.db, world.clock.today(), { day: addDays(world.clock.today(), 16) });
  const slot = await makeSlot(world.db, later.id, world.clock.today(), { pointId: chapelId });
  const answer = await move(order.token, slot.id);
  expect(answer.status).toBe(400);
  expect(answer.body).toMatchObject({ code: 'INVALID_INPUT', fields: { slotId: expect.any(String) as unknown } });
  expect(await getOrderRow(world, order.token)).toMatchObject({ slotId: stall.slot.id, version: order.version });
});

test('moving an order that is not paid or is packed, is refused and changes nothing', async () => {
  const waiting = await place(world, basketFor(stall));
  const { order: packed } = await makePackedOrder(world, stall);
  for (const token of [waiting.token, packed.token]) {
    const answer = await move(token, stall.slot.id);
    expect(answer.status).toBe(409);
    expect(answer.body).toMatchObject({ code: 'STATE_CHANGED' });
  }
  expect((await move('x'.repeat(32), stall.slot.id)).status).toBe(404);
});

test('moving an order after the cut-off, is refused with CUTOFF_PASSED', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const slot = await makeTime(5);
  world.clock.advance({ days: 8 });
  const answer = await move(order.token, slot.id);
  expect(answer.status).toBe(409);
  expect(answer.body).toMatchObject({ code: 'CUTOFF_PASSED' });
  expect(await takenOf(world, slot.id)).toBe(0);
  const seen = await world.request().get(`/api/orders/${order.token}`);
  expect(seen.body).toMatchObject({ canChange: false });
});
