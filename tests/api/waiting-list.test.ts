import { and, eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { mailMessage } from '#db/schema/mail.ts';
import { waitingEntry } from '#db/schema/waiting-list.ts';
import { proveCounters } from '#server/orders/prove-counters.ts';
import { serveWaitingList } from '#server/waiting-list/serve-waiting.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import {
  basketFor,
  countersOf,
  makeConfirmedOrder,
  makeStall,
  payFor,
  place,
  type Placed,
  type Stall,
} from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;

beforeEach(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 2 });
  return () => world.stop();
});

const join = (email: string, more: Record<string, unknown> = {}) =>
  world
    .request()
    .post('/api/waiting-list')
    .send({ slug: 'hearth', email, ...more });

async function entryOf(email: string) {
  const [entry] = await world.db.select().from(waitingEntry).where(eq(waitingEntry.email, email));
  if (!entry) throw new Error(`${email} does not wait.`);
  return entry;
}

/** On the list, by the mailed link. */
async function waitAs(email: string, more: Record<string, unknown> = {}) {
  await join(email, more).expect(200);
  const { token } = await entryOf(email);
  await world.request().post(`/api/waiting-list/${token}/confirm`).expect(200);
  return token;
}

const mailsTo = (email: string, kind = 'waiting list, box kept') =>
  world.db
    .select()
    .from(mailMessage)
    .where(and(eq(mailMessage.toAddress, email), eq(mailMessage.kind, kind)));

/** Both boxes are paid for. */
async function sellOut() {
  const one = await makeConfirmedOrder(world, stall);
  const other = await makeConfirmedOrder(world, stall);
  return [one, other] as const;
}

const cancel = (token: string) => world.request().post(`/api/orders/${token}/cancel`).expect(200);

describe('going on the list', () => {
  test('while a box is free is refused; once it is sold out, asks the address by mail, once', async () => {
    await join('ada@example.com').expect(409);
    await sellOut();
    await join('not an address').expect(400);
    await join('ada@example.com', { slug: 'no-such-box' }).expect(404);
    await join('ada@example.com').expect(200, { sentTo: 'ada@example.com' });
    await join('Ada@example.com').expect(200);
    const mails = await world.db.select().from(mailMessage).where(eq(mailMessage.kind, 'waiting list, confirm'));
    expect(mails).toHaveLength(1);
    const { token, state } = await entryOf('ada@example.com');
    expect(state).toBe('unconfirmed');
    expect(mails[0]?.text).toContain(`${world.origin}/waiting-list/${token}`);
    // Looking is not saying yes.
    const seen = await world.request().get(`/api/waiting-list/${token}`).expect(200);
    expect(seen.body).toMatchObject({ state: 'unconfirmed', box: 'Hearth', slug: 'hearth', day: null, kept: null });
  });

  test('without confirming, gets no box and is forgotten after two days', async () => {
    const [one] = await sellOut();
    await join('silent@example.com').expect(200);
    await cancel(one.token);
    await serveWaitingList(world.deps);
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 2, held: 0, sold: 1 });
    world.clock.advance({ days: 3 });
    await serveWaitingList(world.deps);
    expect((await entryOf('silent@example.com')).state).toBe('lapsed');
  });
});

describe('a box that comes free', () => {
  test('is kept for the first in line and for nobody else, and the mail says until when', async () => {
    const [one] = await sellOut();
    const first = await waitAs('first@example.com');
    await waitAs('second@example.com', { dayId: stall.day.id });
    expect(
      (await world.request().get(`/api/waiting-list/${(await entryOf('second@example.com')).token}`)).body,
    ).toMatchObject({ ahead: 1, day: stall.day.day });
    await cancel(one.token);
    await Promise.all([serveWaitingList(world.deps), serveWaitingList(world.deps), serveWaitingList(world.deps)]);
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 2, held: 1, sold: 1 });
    expect(await proveCounters(world.deps)).toEqual([]);
    expect(await mailsTo('second@example.com')).toEqual([]);
    const [mail] = await mailsTo('first@example.com');
    expect(mail?.text).toContain(`${world.origin}/waiting-list/${first}`);
    expect((await world.request().post('/api/orders').send(basketFor(stall))).status).toBe(409);
    const kept = (await world.request().get(`/api/waiting-list/${first}`)).body as { kept: { dayId: string } };
    expect(kept).toMatchObject({ state: 'offered', kept: { dayId: stall.day.id } });
  });

  test('taken by its link, goes to payment without a second box being held, and is sold once', async () => {
    const [one] = await sellOut();
    const token = await waitAs('first@example.com');
    await cancel(one.token);
    await serveWaitingList(world.deps);
    const lines = [{ offerId: stall.boxOffer.id, quantity: 1 }];
    const price = (waitingToken?: string) =>
      world.request().post('/api/basket').send({ dayId: stall.day.id, lines, waitingToken });
    expect((await price(token).expect(200)).body).toMatchObject({ lines: [{ free: 1 }] });
    expect((await price().expect(200)).body).toMatchObject({ lines: [{ free: 0 }] });
    const placed = await place(world, basketFor(stall, { waitingToken: token }));
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 2, held: 1, sold: 1 });
    expect((await entryOf('first@example.com')).state).toBe('taken');
    expect(await proveCounters(world.deps)).toEqual([]);
    await payFor(world, placed);
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 2, held: 0, sold: 2 });
    // The link is used up: it gets nobody a second box.
    expect(
      (
        await world
          .request()
          .post('/api/orders')
          .send(basketFor(stall, { waitingToken: token }))
      ).status,
    ).toBe(409);
    expect(await proveCounters(world.deps)).toEqual([]);
  });

  test('two presses at once with one link, of two baskets, make one order', async () => {
    const [one] = await sellOut();
    const token = await waitAs('first@example.com');
    await cancel(one.token);
    await serveWaitingList(world.deps);
    const answers = await Promise.all(
      [1, 2, 3, 4].map(() =>
        world
          .request()
          .post('/api/orders')
          .send(basketFor(stall, { waitingToken: token })),
      ),
    );
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409, 409, 409]);
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 2, held: 1, sold: 1 });
    expect(await proveCounters(world.deps)).toEqual([]);
  });

  test('asked for beyond what is kept, is refused as a whole and stays kept', async () => {
    const [one] = await sellOut();
    const token = await waitAs('first@example.com');
    await cancel(one.token);
    await serveWaitingList(world.deps);
    const lines = [{ offerId: stall.boxOffer.id, quantity: 2 }];
    expect(
      (
        await world
          .request()
          .post('/api/orders')
          .send(basketFor(stall, { waitingToken: token, lines }))
      ).status,
    ).toBe(409);
    expect((await entryOf('first@example.com')).state).toBe('offered');
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 2, held: 1, sold: 1 });
  });

  test('not taken in time, goes to the next; given up, to the one after', async () => {
    const [one] = await sellOut();
    const first = await waitAs('first@example.com');
    const second = await waitAs('second@example.com');
    await waitAs('third@example.com');
    await cancel(one.token);
    await serveWaitingList(world.deps);
    world.clock.advance({ minutes: 24 * 60 + 1 });
    world.payments.advance({ minutes: 24 * 60 + 1 });
    await serveWaitingList(world.deps);
    expect([(await entryOf('first@example.com')).state, (await entryOf('second@example.com')).state]).toEqual([
      'lapsed',
      'offered',
    ]);
    expect(
      (
        await world
          .request()
          .post('/api/orders')
          .send(basketFor(stall, { waitingToken: first }))
      ).status,
    ).toBe(409);
    await world.request().post(`/api/waiting-list/${second}/leave`).expect(200);
    await world.request().post(`/api/waiting-list/${second}/leave`).expect(200);
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 2, held: 0, sold: 1 });
    await serveWaitingList(world.deps);
    expect((await entryOf('third@example.com')).state).toBe('offered');
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 2, held: 1, sold: 1 });
    expect(await proveCounters(world.deps)).toEqual([]);
    const owner = world.request((await world.signIn('owner')).cookie);
    expect((await owner.get('/api/office/waiting-list').expect(200)).body).toEqual({
      boxes: [{ name: 'Hearth', waiting: 0, kept: 1, taken: 0 }],
    });
  });

  test('while visitors rush for it, is never given twice', async () => {
    const [one, other] = await sellOut();
    for (const name of ['a', 'b', 'c']) await waitAs(`${name}@example.com`);
    await Promise.all([cancel(one.token), cancel(other.token)]);
    const [, , ...rush] = await Promise.all([
      serveWaitingList(world.deps),
      serveWaitingList(world.deps),
      ...Array.from({ length: 12 }, () => world.request().post('/api/orders').send(basketFor(stall))),
    ]);
    const placed = rush.filter((answer) => answer.status === 200).map((answer) => answer.body as Placed);
    const { held, sold } = await countersOf(world, stall.boxOffer.id);
    expect({ held, sold }).toEqual({ held: 2, sold: 0 });
    const kept = await world.db.select().from(waitingEntry).where(eq(waitingEntry.state, 'offered'));
    expect(kept.length + placed.length).toBe(2);
    expect(await proveCounters(world.deps)).toEqual([]);
  });
});
