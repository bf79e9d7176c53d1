import { eq } from 'drizzle-orm';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { mailMessage } from '#db/schema/mail.ts';
import { takeBalance } from '#server/payments/balance.ts';
import type { Order } from '#shared/contracts/orders.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { basketFor, getOrderRow, payFor, paymentsOf, place } from '#tests/support/make-order.ts';
import { makePackingDay, type PackingBench } from '#tests/support/make-packing-day.ts';
import { cards, payByCard } from '#tests/support/pay.ts';

let world: World;
let bench: PackingBench;

beforeAll(async () => {
  world = await startWorld();
  bench = await makePackingDay(world);
  await world.db.update(offer).set({ offered: 40 }).where(eq(offer.id, bench.looseOffer.id));
});
afterAll(() => world.stop());
afterEach(() => world.payments.reset());

let count = 0;

/** Three loose packs with a deposit paid by this card; full weights unless told that the first is lighter. */
async function makeDepositOrder(card = cards.good) {
  count += 1;
  const lines = [{ offerId: bench.looseOffer.id, quantity: 3 }];
  const placed = await place(world, basketFor(bench, { lines, pay: 'deposit', email: `rest-${count}@example.com` }));
  await payFor(world, placed, card);
  return getOrderRow(world, placed.token);
}

async function pack(lighterGrams = 0) {
  const upper = bench.looseOffer.upperGrams ?? 0;
  await bench.weigh(bench.looseCutId, [upper - lighterGrams, upper, upper]);
  await bench.fill();
}

async function seen(token: string): Promise<Order> {
  return (await world.request().get(`/api/orders/${token}`)).body as Order;
}

async function mailsOf(orderId: string, kind: string) {
  const mails = await world.db.select().from(mailMessage).where(eq(mailMessage.orderId, orderId));
  return mails.filter((mail) => mail.kind === kind);
}

const chargesOf = async (orderId: string) =>
  (await paymentsOf(world, orderId)).map(({ kind, reason, amountPence, state }) => ({
    kind,
    reason,
    amountPence,
    state,
  }));

describe('an order with a deposit', () => {
  test('pays a quarter now, and the rest once packed, net of what it weighs less', async () => {
    const order = await makeDepositOrder();
    const { totalPence } = order;
    const deposit = Math.ceil(totalPence / 400) * 100;
    expect(order).toMatchObject({ depositPence: deposit, paymentState: 'part paid', state: 'confirmed' });
    expect((await seen(order.token)).deposit).toEqual({
      depositPence: deposit,
      rest: 'later',
      restPence: totalPence - deposit,
    });
    await pack(100);
    const [price, upper] = [bench.looseOffer.pricePence ?? 0, bench.looseOffer.upperGrams ?? 1];
    const lighter = price - Math.round((price * (upper - 100)) / upper);
    const rest = totalPence - deposit - lighter;
    await world.runJobs();
    await world.payments.flush();
    expect(await chargesOf(order.id)).toEqual([
      { kind: 'charge', reason: 'order', amountPence: deposit, state: 'done' },
      { kind: 'charge', reason: 'balance', amountPence: rest, state: 'done' },
    ]);
    expect(await seen(order.token)).toMatchObject({ paymentState: 'paid', deposit: { rest: 'paid', restPence: rest } });
    const [mail] = await mailsOf(order.id, 'balance taken');
    expect(mail?.text).toContain(`−£${(lighter / 100).toFixed(2)}`);
    expect(mail?.text).toContain('/trace/');
    // The job again, and the company's own message again, change nothing.
    const balance = (await paymentsOf(world, order.id)).find((row) => row.reason === 'balance');
    await takeBalance(world.deps, balance?.id ?? '');
    expect(world.payments.charges().filter((charge) => charge.amount === rest)).toHaveLength(1);
    expect((await world.request().get(`/api/orders/${order.token}/balance`)).body).toMatchObject({
      code: 'STATE_CHANGED',
    });
  });
});

/** The browser's half, as the payment company's script does it. */
async function confirmInBrowser(clientSecret: string, paymentMethod: string, answer: 'complete' | 'fail') {
  const send = async (path: string, body: object) =>
    (await (
      await fetch(`${world.payments.url}${path}`, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify(body),
      })
    ).json()) as { paymentIntent?: { status: string } };
  const first = await send('/stripe-js/confirm', { clientSecret, paymentMethod });
  if (first.paymentIntent?.status !== 'requires_action') return first;
  return send('/stripe-js/authenticate', { clientSecret, answer });
}

async function makeFailedBalance() {
  const order = await makeDepositOrder();
  world.payments.control({ declineNext: 1 });
  await pack();
  await world.runJobs(['take-balance', 'send-mail']);
  await world.payments.flush();
  return getOrderRow(world, order.token);
}

describe('a rest that the card refuses', () => {
  test('is told by mail with a link, and paid with the same card by its owner once', async () => {
    const order = await makeFailedBalance();
    expect((await seen(order.token)).deposit?.rest).toBe('failed');
    const [mail] = await mailsOf(order.id, 'balance failed');
    expect(mail?.text).toContain(`/orders/${order.token}/pay`);
    const today = await world.request(bench.owner).get('/api/today');
    expect((today.body as { items: { kind: string; detail: string }[] }).items).toContainEqual(
      expect.objectContaining({
        kind: 'balance failed',
        detail: expect.stringContaining(`Order ${order.orderNo}`) as unknown,
      }),
    );
    const about = await world.request().get(`/api/orders/${order.token}/balance`);
    expect(about.body).toMatchObject({ hasCard: true, publishableKey: 'pk_test_of_the_tests' });
    const presses = await Promise.all([1, 2].map(() => world.request().post(`/api/orders/${order.token}/balance`)));
    const [started] = presses.map((answer) => answer.body as { clientSecret: string; methodId: string });
    expect(presses[1]?.body).toEqual(started);
    const result = await confirmInBrowser(started?.clientSecret ?? '', started?.methodId ?? '', 'complete');
    expect(result.paymentIntent?.status).toBe('succeeded');
    await world.payments.flush();
    await world.payments.flush();
    expect(await seen(order.token)).toMatchObject({ paymentState: 'paid', deposit: { rest: 'paid' } });
    expect((await paymentsOf(world, order.id)).map((row) => row.state)).toEqual(['done', 'done']);
    expect((await world.request().post(`/api/orders/${order.token}/balance`)).status).toBe(409);
  });

  test('can be paid with another card on a page, and then no more with the first', async () => {
    const order = await makeFailedBalance();
    const first = (await world.request().post(`/api/orders/${order.token}/balance`)).body as { clientSecret: string };
    const path = `/api/orders/${order.token}/balance-page`;
    const page = (await world.request().post(path)).body as { paymentUrl: string };
    expect((await world.request().post(path)).body).toEqual(page);
    const result = await confirmInBrowser(first.clientSecret, order.providerMethodId ?? '', 'complete');
    expect(result.paymentIntent?.status).not.toBe('succeeded');
    expect(await payByCard(page.paymentUrl, cards.good)).toMatchObject({ outcome: 'paid' });
    await world.payments.flush();
    expect(await seen(order.token)).toMatchObject({ paymentState: 'paid', deposit: { rest: 'paid' } });
    expect(await mailsOf(order.id, 'balance taken')).toHaveLength(1);
  });

  test('is not asked for any more once the order is cancelled, and the deposit goes back', async () => {
    const order = await makeFailedBalance();
    const cancelled = await world
      .request(bench.owner)
      .post(`/api/office/orders/${order.id}/cancel`)
      .send({ reason: 'The cold room broke down.' });
    expect(cancelled.status).toBe(200);
    await world.runJobs(['settle-refund', 'send-mail']);
    expect(await seen(order.token)).toMatchObject({ state: 'cancelled', refundedPence: order.depositPence });
    expect((await world.request().get(`/api/orders/${order.token}/balance`)).status).toBe(409);
  });
});
