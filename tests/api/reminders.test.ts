import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { cuttingDay } from '#db/schema/carcases.ts';
import { consentEntry, marketingContact } from '#db/schema/customers.ts';
import { mailMessage } from '#db/schema/mail.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { inviteAgain, tellCutOffs } from '#server/mail/reminders.ts';
import { addDays, londonInstant } from '#shared/domain/day.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeBoxOffer, makeCuttingDay, makeSlot } from '#tests/support/make-farm.ts';
import { makeConfirmedOrder, makeStall, type Stall } from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 80 });
});
afterAll(() => world.stop());
beforeEach(() => world.db.delete(mailMessage));

const mailsOf = (kind: string) => world.db.select().from(mailMessage).where(eq(mailMessage.kind, kind));

/** A day whose orders close tomorrow at six, with a box and a time. */
async function makeClosingDay(days: number) {
  const today = world.clock.today();
  const cutOffAt = londonInstant(addDays(today, 1), '18:00');
  const day = await makeCuttingDay(world.db, today, { day: addDays(today, days), cutOffAt });
  const boxOffer = await makeBoxOffer(world.db, day.id, stall.box, 20);
  const slot = await makeSlot(world.db, day.id, today, {
    pointId: stall.slot.pointId,
    startsAt: londonInstant(addDays(today, days + 1), '11:00'),
    endsAt: londonInstant(addDays(today, days + 1), '11:30'),
  });
  return { day, boxOffer, slot };
}

async function orderedYesterday(orderId: string): Promise<void> {
  const reachedPaymentAt = londonInstant(addDays(world.clock.today(), -1), '12:00');
  await world.db.update(customerOrder).set({ reachedPaymentAt }).where(eq(customerOrder.id, orderId));
}

describe('the day before orders close', () => {
  test('reminding twice, when one order can be changed, one was ordered today and one is cancelled, writes one mail', async () => {
    const counter = await makeClosingDay(3);
    const due = await makeConfirmedOrder(world, counter, { email: 'due@example.com' });
    const fresh = await makeConfirmedOrder(world, counter, { email: 'fresh@example.com' });
    const gone = await makeConfirmedOrder(world, counter, { email: 'gone@example.com' });
    const farOff = await makeConfirmedOrder(world, stall, { email: 'far@example.com' });
    for (const { id } of [due, gone, farOff]) await orderedYesterday(id);
    await world.request().post(`/api/orders/${gone.token}/cancel`).expect(200);
    await tellCutOffs(world.deps);
    await tellCutOffs(world.deps);
    const mails = await mailsOf('cut-off tomorrow');
    expect(mails.map((mail) => mail.toAddress)).toEqual(['due@example.com']);
    expect(fresh.state).toBe('confirmed');
    const [mail] = mails;
    expect(mail?.subject).toBe(`Order ${due.orderNo}: changes close tomorrow at 18:00 · Skelderwick`);
    for (const words of [`${world.origin}/orders/${due.token}`, '1 × Hearth', '£94.00', 'The farm gate']) {
      expect(mail?.text).toContain(words);
      expect(mail?.html).toContain(words);
    }
    // Order mail: nobody can opt out of it.
    expect(mail?.unsubscribeUrl).toBeNull();
  });
});

describe('an order that nobody fetched', () => {
  test('being ticked as missed writes one mail that asks to ring, and a refused tick writes none', async () => {
    const { cookie } = await world.signIn('owner');
    const order = await makeConfirmedOrder(world, stall, { email: 'late@example.com' });
    const path = `/api/office/orders/${order.id}/state`;
    await world.request(cookie).post(path).send({ version: order.version, state: 'missed' }).expect(409);
    expect(await mailsOf('missed collection')).toEqual([]);
    await world.db.update(customerOrder).set({ state: 'ready' }).where(eq(customerOrder.id, order.id));
    await world.request(cookie).post(path).send({ version: order.version, state: 'missed' }).expect(200);
    const [mail] = await mailsOf('missed collection');
    expect(mail).toMatchObject({ toAddress: 'late@example.com', orderId: order.id });
    expect(mail?.text).toContain('Please ring 01632 960100');
  });
});

describe('marketing mail', () => {
  /** A collected order of a day so many weeks ago. */
  async function makeOldOrder(weeks: number, more: Record<string, unknown>) {
    const order = await makeConfirmedOrder(world, stall, more);
    const day = addDays(world.clock.today(), -7 * weeks);
    const old = await makeCuttingDay(world.db, world.clock.today(), {
      day: addDays(day, -Number(order.orderNo) % 5),
      state: 'closed',
    });
    await world.db
      .update(customerOrder)
      .set({ state: 'collected', cuttingDayId: old.id })
      .where(eq(customerOrder.id, order.id));
    return { ...order, cuttingDayId: old.id };
  }

  test('inviting twice, when only some agreed and ordered long enough ago, writes to those once, with the way out in its headers', async () => {
    const due = await makeOldOrder(9, { email: 'Yes@example.com', wantsNews: true });
    await makeOldOrder(10, { email: 'never-asked@example.com' });
    await makeOldOrder(2, { email: 'too-soon@example.com', wantsNews: true });
    await makeOldOrder(40, { email: 'long-ago@example.com', wantsNews: true });
    await inviteAgain(world.deps);
    await inviteAgain(world.deps);
    const mails = await mailsOf('invitation to order again');
    expect(mails.map((mail) => mail.toAddress)).toEqual(['Yes@example.com']);
    const [contact] = await world.db
      .select()
      .from(marketingContact)
      .where(eq(marketingContact.email, 'yes@example.com'));
    const url = `${world.origin}/unsubscribe/${contact?.token}`;
    expect(mails[0]?.text).toContain(url);
    expect(mails[0]?.text).toContain(`${world.origin}/orders/${due.token}`);
    await world.runJobs(['send-mail']);
    const sent = await world.mail.waitForMail('Yes@example.com', (message) =>
      message.subject.startsWith('Beef for the freezer again'),
    );
    const headers = sent.raw.replace(/\r?\n[ \t]+/g, ' ').replace(/ +/g, ' ');
    expect(headers).toContain(`List-Unsubscribe: <${url}>`);
    expect(headers).toContain('List-Unsubscribe-Post: List-Unsubscribe=One-Click');
  });

  test('unsubscribing as a mail program does, without a cookie and twice, ends it once, keeps the proof and drops what waits', async () => {
    const email = 'stop@example.com';
    const order = await makeOldOrder(9, { email, wantsNews: true });
    await inviteAgain(world.deps);
    const [contact] = await world.db.select().from(marketingContact).where(eq(marketingContact.email, email));
    const path = `/unsubscribe/${contact?.token}`;
    // Looking is not leaving: mail scanners open every link.
    await world.request().get(`/api${path}`).expect(200, { email: 's…@example.com', isSubscribed: true });
    const press = () => world.request().post(path).type('form').send('List-Unsubscribe=One-Click');
    await press().expect(200, { email: 's…@example.com', isSubscribed: false });
    await press().expect(200);
    const log = await world.db
      .select()
      .from(consentEntry)
      .where(eq(consentEntry.contactId, contact?.id ?? ''))
      .orderBy(consentEntry.createdAt);
    expect(log).toMatchObject([
      { isGiven: true, source: 'checkout', wordingVersion: 1 },
      { isGiven: false, source: 'unsubscribe link', wordingVersion: 1 },
    ]);
    expect((await mailsOf('invitation to order again')).map((mail) => mail.orderId)).not.toContain(order.id);
    await inviteAgain(world.deps);
    expect((await mailsOf('invitation to order again')).map((mail) => mail.orderId)).not.toContain(order.id);
    await world
      .request()
      .post(`/unsubscribe/${'x'.repeat(32)}`)
      .expect(404);
  });

  test('setting the weeks, when the farm wants them shorter, invites sooner; a nonsense figure is refused', async () => {
    const owner = world.request((await world.signIn('owner')).cookie);
    const before = (await owner.get('/api/office/customer-settings').expect(200)).body as Record<string, unknown>;
    expect(before).toMatchObject({ inviteAfterWeeks: 8 });
    await owner
      .put('/api/office/customer-settings')
      .send({ ...before, inviteAfterWeeks: 0 })
      .expect(400);
    await owner
      .put('/api/office/customer-settings')
      .send({ ...before, inviteAfterWeeks: 3 })
      .expect(200);
    await makeOldOrder(4, { email: 'sooner@example.com', wantsNews: true });
    await inviteAgain(world.deps);
    expect((await mailsOf('invitation to order again')).map((mail) => mail.toAddress)).toEqual(['sooner@example.com']);
    const [day] = await world.db.select().from(cuttingDay).where(eq(cuttingDay.id, stall.day.id));
    expect(day?.state).toBe('open');
  });
});
