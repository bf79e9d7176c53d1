import { afterAll, beforeAll, expect, test } from 'vitest';
import { startWorld, type World } from '#tests/support/harness.ts';
import { cards, payByCard } from '#tests/support/pay.ts';

let world: World;
beforeAll(async () => {
  world = await startWorld();
});
afterAll(() => world.stop());

test("a session made with the server's own client, when paid, sends webhooks that the server takes", async () => {
  const { stripe } = world.deps.payments;
  const session = await stripe.checkout.sessions.create({
    mode: 'payment',
    line_items: [{ quantity: 1, price_data: { currency: 'gbp', unit_amount: 900, product_data: { name: 'Shin' } } }],
    expires_at: Math.floor(world.clock.now().getTime() / 1000) + 31 * 60,
    success_url: `${world.origin}/paid?session={CHECKOUT_SESSION_ID}`,
    cancel_url: `${world.origin}/basket`,
  });
  world.payments.control({ webhooks: 'hold' });
  const result = await payByCard(session.url ?? '', cards.good);
  expect(result).toEqual({ outcome: 'paid', returnedTo: `${world.origin}/paid?session=${session.id}` });
  expect(await world.payments.flush()).toEqual({ delivered: 3, failed: 0 });
  expect((await stripe.checkout.sessions.retrieve(session.id)).payment_status).toBe('paid');
});
