import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { collectionSlot, customerOrder } from '#db/schema/orders.ts';
import { proveCounters } from '#server/orders/prove-counters.ts';
import { londonDay } from '#shared/domain/day.ts';
import type { DeliveryArea } from '#shared/contracts/delivery.ts';
import { roundDay } from '#shared/domain/delivery.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { basketFor, getOrderRow, makeConfirmedOrder, makeStall, place, type Stall } from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;
let owner: string;
let area: DeliveryArea;

const AREA = {
  name: 'The dale round',
  prefixes: ['ZZ1', 'ZZ12'],
  ...{ pricePence: 600, freeFromPence: 15_000, weekday: 5, startsAt: '13:00', endsAt: '17:00' },
  ...{ capacity: 3, isActive: true },
};

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 60 });
  owner = (await world.signIn('owner')).cookie;
  area = (await world.request(owner).post('/api/office/delivery-areas').send(AREA)).body as DeliveryArea;
});
afterAll(async () => {
  expect(await proveCounters(world.deps)).toEqual([]);
  await world.stop();
});

function ask(postcode: string) {
  return world.request().get('/api/delivery').query({ dayId: stall.day.id, postcode });
}

const home = (postcode: string) => ({ addressLines: ['2 Beck Row', 'Under Rigg'], postcode });
const delivered = (postcode: string, more: object = {}) =>
  basketFor(stall, { slotId: undefined, delivery: home(postcode), ...more });

test('a postcode without its space, in small letters, is told the price, the day and the room', async () => {
  const answer = await ask('zz11aa');
  expect(answer.body).toMatchObject({
    postcode: 'ZZ1 1AA',
    area: { name: 'The dale round', pricePence: 600, freeFromPence: 15_000, free: 3 },
    nearest: null,
  });
  const { startsAt } = (answer.body as { area: { startsAt: string } }).area;
  expect(londonDay(startsAt)).toBe(roundDay(stall.day.day, 5));
});

test('a postcode that only begins like one of the area, is outside and told where to collect instead', async () => {
  const answer = await ask('ZZ11 1AA');
  expect(answer.body).toMatchObject({ area: null, nearest: { name: 'The farm gate' } });
  expect((await ask('nonsense')).body).toMatchObject({ fields: { postcode: 'Give a postcode such as ZZ1 1AA.' } });
  const placed = await world.request().post('/api/orders').send(delivered('ZZ9 9ZZ'));
  expect(placed.status).toBe(400);
  expect(placed.body).toMatchObject({ fields: { postcode: expect.stringContaining('The farm gate') as unknown } });
});

test('an order that the van brings, costs its delivery, takes a stop and says where it goes', async () => {
  const order = await makeConfirmedOrder(world, stall, { ...delivered('zz1 1aa', { email: 'van@example.com' }) });
  expect(order).toMatchObject({ totalPence: 10_000, deliveryPence: 600, deliveryPostcode: 'ZZ1 1AA' });
  const seen = await world.request().get(`/api/orders/${order.token}`);
  expect(seen.body).toMatchObject({
    isDelivered: true,
    deliveryPence: 600,
    collection: { name: 'Your address', addressLines: ['2 Beck Row', 'Under Rigg', 'ZZ1 1AA'] },
  });
  const [round] = await world.db.select().from(collectionSlot).where(eq(collectionSlot.id, order.slotId));
  expect(round).toMatchObject({ taken: 1, capacity: 3 });
  await world.runJobs();
  const mail = await world.mail.waitForMail('van@example.com');
  expect(mail.text).toContain('We bring it');
  expect(mail.text).toContain('2 Beck Row');
  expect(mail.text).toContain('Delivery: £6.00');
  const points = await world.request().get(`/api/cutting-days/${stall.day.id}/collections`);
  expect((points.body as { points: { name: string }[] }).points.map((point) => point.name)).toEqual(['The farm gate']);
});

test('the owner marks an order that the van brings, and its customer is told once that it is on its way', async () => {
  const order = await makeConfirmedOrder(world, stall, {
    ...delivered('ZZ12 9XY', { email: 'road@example.com', lines: [{ offerId: stall.looseOffer.id, quantity: 1 }] }),
  });
  const packer = (await world.signIn('packer')).cookie;
  await world.db.update(customerOrder).set({ state: 'packed' }).where(eq(customerOrder.id, order.id));
  const mark = async (state: string) => {
    const { version } = await getOrderRow(world, order.token);
    return world.request(packer).post(`/api/office/orders/${order.id}/state`).send({ version, state });
  };
  expect((await mark('ready')).body).toMatchObject({ state: 'ready', address: '2 Beck Row, Under Rigg, ZZ12 9XY' });
  expect((await mark('collected')).body).toMatchObject({ code: 'STATE_CHANGED' });
  expect((await mark('delivered')).body).toMatchObject({ state: 'delivered' });
  expect((await mark('ready')).status).toBe(200);
  await mark('delivered');
  await world.runJobs();
  const isOut = (mail: { subject: string }) => mail.subject.startsWith(`Order ${order.orderNo} is on the van`);
  const mail = await world.mail.waitForMail('road@example.com', isOut);
  expect(mail.text).toContain('2 Beck Row');
  expect(world.mail.messages().filter(isOut)).toHaveLength(1);
  const mails = await world.request(owner).get(`/api/cutting-days/${stall.day.id}/collection-mails`);
  expect((mails.body as { mails: { orderId: string }[] }).mails.map((each) => each.orderId)).not.toContain(order.id);
});

test('an order of the threshold and above, is brought for nothing', async () => {
  const lines = [{ offerId: stall.boxOffer.id, quantity: 2 }];
  const placed = await place(world, delivered('ZZ12 3AB', { lines }));
  expect(await getOrderRow(world, placed.token)).toMatchObject({ totalPence: 18_800, deliveryPence: 0 });
});

test('a round with all stops taken, refuses the next with SLOT_FULL and takes nothing', async () => {
  const answer = await world.request().post('/api/orders').send(delivered('ZZ1 1AA'));
  expect(answer.status).toBe(409);
  expect(answer.body).toMatchObject({ code: 'SLOT_FULL' });
  expect((await ask('ZZ1 1AA')).body).toMatchObject({ area: { free: 0 } });
});

test('a basket with neither a time nor an address, and one that names the van’s round as its time, are refused', async () => {
  const neither = await world
    .request()
    .post('/api/orders')
    .send(basketFor(stall, { slotId: undefined }));
  expect(neither.body).toMatchObject({ fields: { slotId: expect.any(String) as unknown } });
  const [round] = await world.db.select().from(collectionSlot).where(eq(collectionSlot.capacity, 3));
  const van = await world
    .request()
    .post('/api/orders')
    .send(basketFor(stall, { slotId: round?.id }));
  expect(van.status).toBe(400);
});

test('the owner edits an area, and a stale edit, a prefix of another area and bad times are refused', async () => {
  const put = (id: string, body: object) => world.request(owner).put(`/api/office/delivery-areas/${id}`).send(body);
  const edited = await put(area.id, { version: 1, area: { ...AREA, pricePence: 700, prefixes: ['zz1', 'ZZ2'] } });
  expect(edited.body).toMatchObject({ pricePence: 700, prefixes: ['ZZ1', 'ZZ2'], version: 2 });
  expect((await put(area.id, { version: 1, area: AREA })).body).toMatchObject({ code: 'STATE_CHANGED' });
  const second = await world
    .request(owner)
    .post('/api/office/delivery-areas')
    .send({ ...AREA, name: 'Again' });
  expect(second.body).toMatchObject({ fields: { prefixes: 'ZZ1 belongs to another area already.' } });
  const bad = await put(area.id, { version: 2, area: { ...AREA, endsAt: '12:00', prefixes: ['ZZ1 1AA'] } });
  expect(bad.body).toMatchObject({ fields: { 'area.prefixes.0': expect.any(String) as unknown } });
  const { areas } = (await world.request(owner).get('/api/office/delivery-areas')).body as { areas: DeliveryArea[] };
  expect(areas.map((each) => each.name)).toEqual(['The dale round']);
});
