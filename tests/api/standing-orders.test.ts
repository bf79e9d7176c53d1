import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { mailMessage } from '#db/schema/mail.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { standingTurn } from '#db/schema/standing-orders.ts';
import { proveCounters } from '#server/orders/prove-counters.ts';
import { sweepHolds } from '#server/payments/payment-service.ts';
import { runStandingOrders } from '#server/standing-orders/run-standing.ts';
import { addDays, londonInstant } from '#shared/domain/day.ts';
import type { MyStanding } from '#shared/contracts/standing-orders.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeBoxOffer, makeCuttingDay, makeSlot } from '#tests/support/make-farm.ts';
import {
  basketFor,
  countersOf,
  makeStall,
  payOn,
  takenOf,
  type Placed,
  type Stall,
} from '#tests/support/make-order.ts';
import { cards } from '#tests/support/pay.ts';
import type { SignedIn } from '#tests/support/sign-in.ts';

let world: World;
let stall: Stall;
let ada: SignedIn;

beforeEach(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 5 });
  ada = await world.signIn('customer');
  return () => world.stop();
});

const wish = (more: Record<string, unknown> = {}) => ({
  ...{
    basketKey: randomUUID(),
    slug: 'hearth',
    quantity: 1,
    everyWeeks: 4,
    dayId: stall.day.id,
    slotId: stall.slot.id,
  },
  ...{ name: 'Ada Fell', phone: '07700 900123', isAgreed: true },
  ...more,
});

const start = (more: Record<string, unknown> = {}) =>
  world.request(ada.cookie).post('/api/my/standing-orders').send(wish(more));

async function listed(): Promise<MyStanding> {
  return (await world.request(ada.cookie).get('/api/my/standing-orders').expect(200)).body as MyStanding;
}

/** A standing order whose first box is paid with this card. */
async function startPaid(card = cards.good) {
  const placed = (await start().expect(200)).body as Placed;
  await payOn(placed.paymentUrl, card);
  await world.payments.flush();
  return placed;
}

/** A cutting day so many days ahead, with boxes and one time at the same place. */
async function makeDayAhead(days: number, boxes = 3) {
  const today = world.clock.today();
  const day = await makeCuttingDay(world.db, today, { day: addDays(today, days) });
  const offer = await makeBoxOffer(world.db, day.id, stall.box, boxes);
  const on = addDays(today, days + 1);
  const times = { startsAt: londonInstant(on, '10:00'), endsAt: londonInstant(on, '10:30') };
  const slot = await makeSlot(world.db, day.id, today, { pointId: stall.slot.pointId, ...times });
  return { day, offer, slot };
}

const mailsOf = (kind: string) => world.db.select().from(mailMessage).where(eq(mailMessage.kind, kind));

/** Until just after the card is to be charged. */
async function goToCharge() {
  const [turn] = await world.db.select().from(standingTurn);
  const minutes = Math.ceil(((turn?.chargeAt.getTime() ?? 0) - world.clock.now().getTime()) / 60_000) + 1;
  world.clock.advance({ minutes });
  world.payments.advance({ minutes });
}

describe('setting up', () => {
  test('without agreeing, with odd weeks, as a butcher or signed out is refused; an empty shelf leaves nothing behind', async () => {
    await start({ isAgreed: false }).expect(400);
    await start({ everyWeeks: 5 }).expect(400);
    await start({ quantity: 9 }).expect(409);
    expect((await listed()).standing).toEqual([]);
    await world.request().post('/api/my/standing-orders').send(wish()).expect(401);
    const butcher = await world.signIn('butcher');
    await world.request(butcher.cookie).post('/api/my/standing-orders').send(wish()).expect(403);
  });

  test('begins once its first box is paid, and keeps the card for those to come', async () => {
    const placed = (await start().expect(200)).body as Placed;
    expect((await listed()).standing).toMatchObject([{ state: 'pending', box: 'Hearth', everyWeeks: 4 }]);
    await payOn(placed.paymentUrl);
    await world.payments.flush();
    const { standing, terms } = await listed();
    expect(standing).toMatchObject([{ state: 'active', nextFrom: addDays(stall.day.day, 28), turn: null }]);
    expect(terms).toContain('end the standing order');
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 5, held: 0, sold: 1 });
  });
});

describe('the next box', () => {
  test('is kept on the first day that is due, told twice, charged once and sold, however often the job runs', async () => {
    await startPaid();
    await makeDayAhead(20);
    const due = await makeDayAhead(40);
    await Promise.all([runStandingOrders(world.deps), runStandingOrders(world.deps)]);
    expect(await countersOf(world, due.offer.id)).toEqual({ offered: 3, held: 1, sold: 0 });
    expect(await takenOf(world, due.slot.id)).toBe(1);
    expect(await proveCounters(world.deps)).toEqual([]);
    // No payment page is open for it: the sweep must leave it alone.
    world.clock.advance({ days: 5 });
    await sweepHolds(world.deps);
    expect(await countersOf(world, due.offer.id)).toEqual({ offered: 3, held: 1, sold: 0 });
    expect(await mailsOf('standing order reminder')).toEqual([]);
    world.clock.advance({ days: 26 });
    await runStandingOrders(world.deps);
    await runStandingOrders(world.deps);
    expect(await mailsOf('standing order reminder')).toHaveLength(1);
    world.clock.advance({ days: 5 });
    await runStandingOrders(world.deps);
    const reminders = await mailsOf('standing order reminder');
    expect(reminders).toHaveLength(2);
    const [turn] = await world.db.select().from(standingTurn);
    for (const mail of reminders) expect(mail.text).toContain(`${world.origin}/standing/${turn?.token}`);
    await goToCharge();
    await Promise.all([runStandingOrders(world.deps), runStandingOrders(world.deps)]);
    await world.payments.flush();
    await runStandingOrders(world.deps);
    expect(await countersOf(world, due.offer.id)).toEqual({ offered: 3, held: 0, sold: 1 });
    expect(world.payments.charges().filter((charge) => charge.paid)).toHaveLength(2);
    const [order] = await world.db
      .select()
      .from(customerOrder)
      .where(eq(customerOrder.id, turn?.orderId ?? ''));
    expect(order).toMatchObject({ state: 'confirmed', paymentState: 'paid', totalPence: 9_400, email: ada.email });
    expect((await listed()).standing).toMatchObject([
      { state: 'active', nextFrom: addDays(due.day.day, 28), turn: null },
    ]);
    expect(await proveCounters(world.deps)).toEqual([]);
  });

  test('skipped by the mailed link, is free for others, costs nothing, and the next one is planned', async () => {
    await startPaid();
    const due = await makeDayAhead(40);
    await runStandingOrders(world.deps);
    const [turn] = await world.db.select().from(standingTurn);
    const path = `/api/standing-turns/${turn?.token}`;
    expect((await world.request().get(path).expect(200)).body).toMatchObject({
      state: 'planned',
      canSkip: true,
      day: due.day.day,
    });
    await world.request().post(`${path}/pay`).expect(409);
    await world.request().post(`${path}/skip`).expect(200);
    expect((await world.request().post(`${path}/skip`).expect(200)).body).toMatchObject({
      state: 'skipped',
      canSkip: false,
    });
    expect(await countersOf(world, due.offer.id)).toEqual({ offered: 3, held: 0, sold: 0 });
    expect(await takenOf(world, due.slot.id)).toBe(0);
    const next = await makeDayAhead(70);
    await runStandingOrders(world.deps);
    expect(await countersOf(world, next.offer.id)).toMatchObject({ held: 1 });
    expect(world.payments.charges().filter((charge) => charge.paid)).toHaveLength(1);
    expect(await proveCounters(world.deps)).toEqual([]);
    await world
      .request()
      .post(`/api/standing-turns/${'x'.repeat(32)}/skip`)
      .expect(404);
  });

  test('whose card is refused, stays kept, can be paid by hand, and the new card is kept', async () => {
    await startPaid();
    const due = await makeDayAhead(40);
    await runStandingOrders(world.deps);
    await goToCharge();
    world.payments.control({ declineNext: 1 });
    await runStandingOrders(world.deps);
    await runStandingOrders(world.deps);
    const [mail] = await mailsOf('standing order refused');
    const [turn] = await world.db.select().from(standingTurn);
    expect(turn?.state).toBe('failed');
    expect(mail?.text).toContain(`${world.origin}/standing/${turn?.token}`);
    expect(await countersOf(world, due.offer.id)).toEqual({ offered: 3, held: 1, sold: 0 });
    const paid = (await world.request().post(`/api/standing-turns/${turn?.token}/pay`).expect(200)).body as Placed;
    await payOn(paid.paymentUrl);
    await world.payments.flush();
    await runStandingOrders(world.deps);
    expect(await countersOf(world, due.offer.id)).toEqual({ offered: 3, held: 0, sold: 1 });
    expect((await listed()).standing).toMatchObject([
      { state: 'active', nextFrom: addDays(due.day.day, 28), turn: null },
    ]);
    expect(await proveCounters(world.deps)).toEqual([]);
  });

  test('whose card is refused and that nobody pays, goes back on the counter when orders close', async () => {
    await startPaid();
    const due = await makeDayAhead(40);
    await runStandingOrders(world.deps);
    await goToCharge();
    world.payments.control({ declineNext: 1 });
    await runStandingOrders(world.deps);
    world.clock.advance({ days: 2 });
    await runStandingOrders(world.deps);
    expect(await countersOf(world, due.offer.id)).toEqual({ offered: 3, held: 0, sold: 0 });
    expect((await listed()).standing).toMatchObject([{ state: 'active', turn: null }]);
    expect(await proveCounters(world.deps)).toEqual([]);
  });

  test('sold out on the day that is due, comes of the next day that has one', async () => {
    await startPaid();
    const full = await makeDayAhead(40, 1);
    const later = await makeDayAhead(47);
    const counter = { day: full.day, boxOffer: full.offer, slot: full.slot };
    await world.request().post('/api/orders').send(basketFor(counter)).expect(200);
    await runStandingOrders(world.deps);
    expect(await countersOf(world, later.offer.id)).toMatchObject({ held: 1 });
  });
});

test('pausing, going on and ending, skip what is kept and plan again; a stranger may do none of it', async () => {
  await startPaid();
  const due = await makeDayAhead(40);
  await runStandingOrders(world.deps);
  const [standing] = (await listed()).standing;
  const path = `/api/my/standing-orders/${standing?.id}/state`;
  const bess = await world.signIn('customer');
  await world.request(bess.cookie).put(path).send({ state: 'ended' }).expect(404);
  const set = (state: string) => world.request(ada.cookie).put(path).send({ state });
  await set('paused').expect(200);
  expect(await countersOf(world, due.offer.id)).toMatchObject({ held: 0 });
  await runStandingOrders(world.deps);
  expect(await countersOf(world, due.offer.id)).toMatchObject({ held: 0 });
  await set('active').expect(200);
  const next = await makeDayAhead(70);
  await runStandingOrders(world.deps);
  expect(await countersOf(world, next.offer.id)).toMatchObject({ held: 1 });
  await set('ended').expect(200);
  await set('active').expect(409);
  expect(await countersOf(world, next.offer.id)).toMatchObject({ held: 0 });
  expect(await proveCounters(world.deps)).toEqual([]);
});
