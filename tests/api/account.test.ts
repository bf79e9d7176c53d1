import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { session, user } from '#db/schema/auth.ts';
import { consentEntry, marketingContact } from '#db/schema/customers.ts';
import { mailMessage } from '#db/schema/mail.ts';
import { customerOrder, orderLine, payment, webhookEvent } from '#db/schema/orders.ts';
import { boxKind } from '#db/schema/products.ts';
import { proveCounters } from '#server/orders/prove-counters.ts';
import { addDays } from '#shared/domain/day.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeBoxKind, makeBoxOffer, makeCuttingDay } from '#tests/support/make-farm.ts';
import { makeConfirmedOrder, makeStall, type Stall } from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 40 });
});
afterAll(() => world.stop());

describe('details', () => {
  test('saved once, are read back with the address of the account; a telephone number of letters is refused', async () => {
    const { cookie, email } = await world.signIn('customer');
    const me = world.request(cookie);
    expect((await me.get('/api/my/details').expect(200)).body).toEqual({
      ...{ name: 'Test customer', email, phone: '' },
      news: { isGiven: false, since: null },
    });
    await me.put('/api/my/details').send({ name: 'Ada', phone: 'call me' }).expect(400);
    await me.put('/api/my/details').send({ name: 'Ada Fell 🐄', phone: '07700 900123' }).expect(200);
    expect((await me.get('/api/my/details')).body).toMatchObject({ name: 'Ada Fell 🐄', phone: '07700 900123' });
    expect((await me.get('/api/me')).body).toMatchObject({ user: { name: 'Ada Fell 🐄' } });
    await world.request().get('/api/my/details').expect(401);
  });

  test('consent, given and taken back in the account, is kept as two entries and once each', async () => {
    const { cookie, email } = await world.signIn('customer');
    const me = world.request(cookie);
    for (const isGiven of [true, true, false]) await me.put('/api/my/news').send({ isGiven }).expect(200);
    expect((await me.get('/api/my/details')).body).toMatchObject({ news: { isGiven: false } });
    const rows = await world.db
      .select({ isGiven: consentEntry.isGiven, source: consentEntry.source })
      .from(consentEntry)
      .innerJoin(marketingContact, eq(marketingContact.id, consentEntry.contactId))
      .where(eq(marketingContact.email, email))
      .orderBy(consentEntry.createdAt);
    expect(rows).toEqual([
      { isGiven: true, source: 'account' },
      { isGiven: false, source: 'account' },
    ]);
  });
});

describe('ordering again', () => {
  test('takes the next day that has it all, though an earlier one has some of it', async () => {
    const order = await makeConfirmedOrder(world, stall, {
      lines: [
        { offerId: stall.boxOffer.id, quantity: 2 },
        { offerId: stall.looseOffer.id, quantity: 1 },
      ],
    });
    const path = `/api/orders/${order.token}/again`;
    expect((await world.request().get(path).expect(200)).body).toMatchObject({
      dayId: stall.day.id,
      items: [
        { kind: 'box', productId: 'hearth', name: 'Hearth', quantity: 2 },
        { kind: 'loose', productId: 'rump-steak', quantity: 1 },
      ],
      gone: [],
      fewer: [],
    });
    await world.db.update(offer).set({ isClosed: true }).where(eq(offer.id, stall.looseOffer.id));
    const some = (await world.request().get(path)).body as unknown;
    expect(some).toMatchObject({ dayId: stall.day.id, items: [{ name: 'Hearth' }], gone: ['Rump steak'] });
    const today = world.clock.today();
    const later = await makeCuttingDay(world.db, today, { day: addDays(today, 30) });
    await makeBoxOffer(world.db, later.id, stall.box, 1);
    expect((await world.request().get(path)).body).toMatchObject({ dayId: stall.day.id });
    await world.db.update(offer).set({ isClosed: true }).where(eq(offer.id, stall.boxOffer.id));
    expect((await world.request().get(path)).body).toMatchObject({
      ...{ dayId: later.id, items: [{ name: 'Hearth', quantity: 1 }] },
      fewer: [{ name: 'Hearth', asked: 2, left: 1 }],
    });
    await world.db.update(boxKind).set({ isActive: false }).where(eq(boxKind.id, stall.box.id));
    expect((await world.request().get(path)).body).toEqual({
      ...{ dayId: null, day: null, items: [], fewer: [] },
      gone: ['Hearth', 'Rump steak'],
    });
    await world.db.update(boxKind).set({ isActive: true }).where(eq(boxKind.id, stall.box.id));
    await world.db.update(offer).set({ isClosed: false });
    await world
      .request()
      .get(`/api/orders/${'x'.repeat(32)}/again`)
      .expect(404);
  });

  test('a swapped box stands for the box that it was swapped from', async () => {
    const variant = await makeBoxKind(world.db, 'hearth-no-mince', {
      name: 'Hearth without mince',
      variantOfId: stall.box.id,
    });
    const order = await makeConfirmedOrder(world, stall);
    const variantOffer = await makeBoxOffer(world.db, stall.day.id, variant, 5);
    await world.db.update(orderLine).set({ offerId: variantOffer.id }).where(eq(orderLine.orderId, order.id));
    expect((await world.request().get(`/api/orders/${order.token}/again`)).body).toMatchObject({
      items: [{ kind: 'box', productId: 'hearth', name: 'Hearth', quantity: 1 }],
    });
    await world.db.update(orderLine).set({ offerId: stall.boxOffer.id }).where(eq(orderLine.orderId, order.id));
  });
});

test('the data of a person, downloaded, names all that is kept of them and nothing of anybody else', async () => {
  const { cookie, email } = await world.signIn('customer');
  await world.request(cookie).put('/api/my/details').send({ name: 'Bess', phone: '07700 900456' }).expect(200);
  const own = await makeConfirmedOrder(world, stall, { email, note: 'Ring twice', wantsNews: true }, cookie);
  const other = await makeConfirmedOrder(world, stall, { email: 'someone-else@example.com', note: 'Not yours' });
  const answer = await world.request(cookie).get('/api/my/data.json').expect(200);
  expect(answer.headers['content-disposition']).toBe('attachment; filename="my-data.json"');
  expect(answer.body).toMatchObject({
    account: { name: 'Bess', email, phone: '07700 900456', sessions: [{}] },
    marketingConsent: [{ isGiven: true, source: 'checkout' }],
    orders: [
      {
        orderNo: own.orderNo,
        note: 'Ring twice',
        lines: [{ name: 'Hearth', quantity: 1 }],
        payments: [{ amountPence: 9_400 }],
      },
    ],
    mails: [{ kind: 'order confirmed' }],
  });
  expect(answer.text).not.toContain('Not yours');
  expect(answer.text).not.toContain(String(other.orderNo));
  await world.request().get('/api/my/data.json').expect(401);
});

describe('closing an account', () => {
  async function askToClose(cookie: string, email: string): Promise<string> {
    await world.request(cookie).post('/api/my/close').expect(200, { sentTo: email });
    await world.runJobs(['send-mail']);
    const mail = await world.mail.waitForMail(email, ({ subject }) => subject.startsWith('Close your account'));
    return /close\?token=([\w-]+)/.exec(mail.text)?.[1] ?? '';
  }

  const close = (token: string) => world.request().post('/api/account/close').send({ token });

  test('when an order is still to come, is refused and changes nothing', async () => {
    const { cookie, email } = await world.signIn('customer');
    const order = await makeConfirmedOrder(world, stall, { email }, cookie);
    const answer = await world.request(cookie).post('/api/my/close').expect(409);
    expect((answer.body as { detail: string }).detail).toContain(`Order ${order.orderNo} is still to come`);
    await world.request(cookie).get('/api/my/orders').expect(200);
  });

  test('by the mailed link, keeps what was sold and removes who bought it, with every session', async () => {
    const { cookie, email, userId } = await world.signIn('customer');
    await world.request(cookie).put('/api/my/details').send({ name: 'Cora Quill', phone: '07700 900789' });
    const personal = { name: 'Cora Quill', email, phone: '07700 900789', note: 'Cora was here', wantsNews: true };
    const order = await makeConfirmedOrder(world, stall, personal, cookie);
    const asGuest = await makeConfirmedOrder(world, stall, personal);
    await world.db.update(customerOrder).set({ state: 'collected' }).where(eq(customerOrder.email, email));
    const token = await askToClose(cookie, email);
    await world.request(cookie).get('/api/my/orders').expect(200);
    await close('y'.repeat(32)).expect(404);
    await close(token).expect(200, { isClosed: true });
    await close(token).expect(404);

    await world.request(cookie).get('/api/my/orders').expect(401);
    for (const id of [order.id, asGuest.id]) {
      const [row] = await world.db.select().from(customerOrder).where(eq(customerOrder.id, id));
      expect(row).toMatchObject({ userId: null, name: 'Account closed', phone: '', note: '', totalPence: 9_400 });
      expect(await world.db.select().from(orderLine).where(eq(orderLine.orderId, id))).toHaveLength(1);
      expect(await world.db.select().from(payment).where(eq(payment.orderId, id))).toHaveLength(1);
    }
    expect(await world.db.select().from(user).where(eq(user.id, userId))).toEqual([]);
    expect(await world.db.select().from(session).where(eq(session.userId, userId))).toEqual([]);
    // Nowhere in the database does the person stand any more.
    for (const table of [customerOrder, mailMessage, webhookEvent, marketingContact]) {
      const text = JSON.stringify(await world.db.select().from(table));
      expect(text).not.toContain(email);
      expect(text).not.toContain('Cora');
    }
    expect(await proveCounters(world.deps)).toEqual([]);
  });

  test('an hour later, or as a butcher or the owner, is refused', async () => {
    const { cookie, email } = await world.signIn('customer');
    const token = await askToClose(cookie, email);
    world.clock.advance({ minutes: 61 });
    await close(token).expect(404);
    for (const role of ['butcher', 'owner', 'packer'] as const) {
      await world
        .request((await world.signIn(role)).cookie)
        .post('/api/my/close')
        .expect(403);
    }
  });
});
