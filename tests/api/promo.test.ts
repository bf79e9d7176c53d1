import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { orderLine } from '#db/schema/orders.ts';
import { promoUse } from '#db/schema/promo.ts';
import type { PromoCode } from '#shared/contracts/promo.ts';
import { addDays } from '#shared/domain/day.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import {
  basketFor,
  getOrderRow,
  makeConfirmedOrder,
  makeStall,
  payFor,
  paymentsOf,
  place,
  type Stall,
} from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;
let owner: string;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 200, packs: 200 });
  owner = (await world.signIn('owner')).cookie;
});
afterAll(() => world.stop());

const PLAIN = {
  ...{ percent: null, amountPence: null, minimumPence: 0, lastDay: null, usageLimit: null, isOncePerCustomer: false },
};

function make(code: string, more: object) {
  return world
    .request(owner)
    .post('/api/office/promo-codes')
    .send({ code, ...PLAIN, ...more });
}

function check(code: string, more: object = {}) {
  const lines = [{ offerId: stall.boxOffer.id, quantity: 1 }];
  return world
    .request()
    .post('/api/promo-checks')
    .send({ code, dayId: stall.day.id, lines, ...more });
}

function order(promoCode: string, email: string) {
  return world.request().post('/api/orders').send(basketFor(stall, { promoCode, email }));
}

const countUses = (promoId: string) => world.db.$count(promoUse, eq(promoUse.promoId, promoId));

test('a code of ten per cent, typed with a space and in small letters, is taken off and charged so', async () => {
  expect((await make('spring 10', { percent: 10 })).body).toMatchObject({ code: 'SPRING10', uses: 0 });
  expect((await check('Spring 10')).body).toEqual({ code: 'SPRING10', discountPence: 940 });
  const lines = [
    { offerId: stall.boxOffer.id, quantity: 1 },
    { offerId: stall.looseOffer.id, quantity: 2 },
  ];
  const row = await makeConfirmedOrder(world, stall, { promoCode: 'spring10', lines });
  expect(row).toMatchObject({ totalPence: 10_800, discountPence: 1_200, state: 'confirmed' });
  expect(await paymentsOf(world, row.id)).toMatchObject([{ amountPence: 10_800 }]);
  const kept = await world.db.select().from(orderLine).where(eq(orderLine.orderId, row.id));
  expect(kept.map((line) => [line.name, line.discountPence]).sort()).toEqual([
    ['Hearth', 940],
    ['Rump steak', 260],
  ]);
  const seen = await world.request().get(`/api/orders/${row.token}`);
  expect(seen.body).toMatchObject({ promoCode: 'SPRING10', discountPence: 1_200, totalPence: 10_800 });
});

test('a code with three uses left, asked for by eight buyers at once, goes to three of them', async () => {
  const code = (await make('THREE', { amountPence: 500, usageLimit: 3 })).body as PromoCode;
  const answers = await Promise.all(
    Array.from({ length: 8 }, (_, index) => order('THREE', `buyer-${index}@example.com`)),
  );
  expect(answers.map((answer) => answer.status).sort()).toEqual([200, 200, 200, 400, 400, 400, 400, 400]);
  const refused = answers.find((answer) => answer.status === 400);
  expect(refused?.body).toMatchObject({
    fields: { promoCode: expect.stringContaining('as often as it can') as unknown },
  });
  expect(await countUses(code.id)).toBe(3);
});

test('a code for once per customer, used again in other letters or with the account, is refused', async () => {
  await make('WELCOME', { percent: 20, isOncePerCustomer: true });
  const ada = await world.signIn('customer');
  const both = await Promise.all([order('WELCOME', 'once@example.com'), order('WELCOME', 'Once@Example.com')]);
  expect(both.map((answer) => answer.status).sort()).toEqual([200, 400]);
  const placed = await place(world, basketFor(stall, { promoCode: 'WELCOME', email: ada.email }), ada.cookie);
  await payFor(world, placed);
  const again = await world
    .request(ada.cookie)
    .post('/api/orders')
    .send(basketFor(stall, { promoCode: 'WELCOME', email: 'other@example.com' }));
  expect(again.status).toBe(400);
  expect(again.body).toMatchObject({ fields: { promoCode: 'You have used this code before.' } });
});

test('a press twice with one basket, counts one use, and giving the payment up gives it back', async () => {
  const code = (await make('TWICE', { percent: 5, isOncePerCustomer: true })).body as PromoCode;
  const basket = basketFor(stall, { promoCode: 'TWICE', email: 'twice@example.com' });
  const [first, second] = await Promise.all([place(world, basket), place(world, basket)]);
  expect(first.token).toBe(second.token);
  expect(await countUses(code.id)).toBe(1);
  await world.request().post(`/api/orders/${first.token}/leave-payment`);
  expect(await countUses(code.id)).toBe(0);
  // The same basket, without its code this time.
  const plain = await place(world, { ...basket, promoCode: undefined } as typeof basket);
  expect(await getOrderRow(world, plain.token)).toMatchObject({ totalPence: 9_400, discountPence: 0 });
});

test('cancelling a paid order, pays back what was paid and gives its code back', async () => {
  const code = (await make('CANCEL', { amountPence: 1_000, usageLimit: 1 })).body as PromoCode;
  const row = await makeConfirmedOrder(world, stall, { promoCode: 'CANCEL' });
  await world.request().post(`/api/orders/${row.token}/cancel`);
  expect(await countUses(code.id)).toBe(0);
  expect(await paymentsOf(world, row.id)).toMatchObject([{ kind: 'charge' }, { kind: 'refund', amountPence: 8_400 }]);
});

test('a code that takes more than there is, leaves what a card can be charged', async () => {
  await make('WHOLE', { amountPence: 50_000 });
  expect((await check('WHOLE')).body).toMatchObject({ discountPence: 9_370 });
  expect(await makeConfirmedOrder(world, stall, { promoCode: 'WHOLE' })).toMatchObject({ totalPence: 30 });
});

test('a code that is unknown, too early, over or closed, is refused beside its field', async () => {
  await make('BIG', { amountPence: 500, minimumPence: 10_000 });
  await make('OVER', { percent: 10, lastDay: addDays(world.clock.today(), -1) });
  const shut = (await make('SHUT', { percent: 10 })).body as PromoCode;
  await world.request(owner).post(`/api/office/promo-codes/${shut.id}/close`);
  await world.request(owner).post(`/api/office/promo-codes/${shut.id}/close`);
  const words = async (code: string) => ((await check(code)).body as { fields: Record<string, string> }).fields;
  expect(await words('NOSUCH')).toEqual({ promoCode: 'There is no such code.' });
  expect((await words('BIG')).promoCode).toContain('from £100.00 on; £6.00 is missing');
  expect((await words('OVER')).promoCode).toContain('counted until');
  expect(await words('SHUT')).toEqual({ promoCode: 'This code is closed.' });
  expect((await check('<script>')).status).toBe(400);
  expect((await order('SHUT', 'shut@example.com')).status).toBe(400);
});

test('the owner sees codes with their uses, and a code cannot be made twice or without a worth', async () => {
  await make('TAKEN', { percent: 10 });
  const again = await make('taken', { percent: 10 });
  expect(again.status).toBe(409);
  expect(again.body).toMatchObject({ code: 'ALREADY_KNOWN', fields: { code: expect.any(String) as unknown } });
  expect((await make('NEITHER', {})).body).toMatchObject({ fields: { percent: expect.any(String) as unknown } });
  expect((await make('BOTH', { percent: 5, amountPence: 5 })).status).toBe(400);
  const { codes } = (await world.request(owner).get('/api/office/promo-codes')).body as { codes: PromoCode[] };
  expect(codes.find((each) => each.code === 'SPRING10')?.uses).toBe(1);
});
