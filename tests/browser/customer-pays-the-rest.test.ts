import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { takeBalance } from '#server/payments/balance.ts';
import { type BrowserWorld, expectAccessible, PHONE, startBrowserWorld } from '#tests/support/browser.ts';
import { basketFor, getOrderRow, paymentsOf, place } from '#tests/support/make-order.ts';
import { makePackingDay } from '#tests/support/make-packing-day.ts';
import { cards, payByCard } from '#tests/support/pay.ts';

let shop: BrowserWorld;

beforeAll(async () => {
  shop = await startBrowserWorld();
});
afterAll(() => shop.stop());

test('a customer whose bank wants to ask about the rest, answers it on the page of the mail and has paid', async () => {
  const { world } = shop;
  const bench = await makePackingDay(world);
  await world.db.update(offer).set({ offered: 40 }).where(eq(offer.id, bench.looseOffer.id));
  const lines = [{ offerId: bench.looseOffer.id, quantity: 3 }];
  const placed = await place(world, basketFor(bench, { lines, pay: 'deposit', email: 'bank@example.com' }));
  await payByCard(placed.paymentUrl ?? '', cards.asksAlways, { bank: 'complete' });
  await world.payments.flush();
  const upper = bench.looseOffer.upperGrams ?? 0;
  await bench.weigh(bench.looseCutId, [upper, upper, upper]);
  await bench.fill();
  const order = await getOrderRow(world, placed.token);
  const balance = (await paymentsOf(world, order.id)).find((row) => row.reason === 'balance');
  await takeBalance(world.deps, balance?.id ?? '');
  await world.runJobs(['send-mail']);
  const mail = await world.mail.waitForMail('bank@example.com', (each) => each.subject.includes('is still open'));
  const link = /https?:\/\/\S+\/pay/.exec(mail.text)?.[0] ?? '';

  const page = await shop.openPage(PHONE);
  await page.goto(link);
  const button = page.getByRole('button', { name: /^Pay £[\d.]+ with the same card$/ });
  await button.waitFor();
  await expectAccessible(page);
  await button.click();
  await page.getByRole('dialog', { name: 'Your bank asks' }).getByRole('button', { name: 'Fail' }).click();
  await page.getByText(/Nothing was charged; try again or use another card/).waitFor();
  await button.click();
  await page.getByRole('dialog', { name: 'Your bank asks' }).getByRole('button', { name: 'Complete' }).click();
  await page.getByRole('heading', { name: 'Packed and weighed.', level: 1 }).waitFor();
  await world.payments.flush();
  expect(await getOrderRow(world, order.token)).toMatchObject({ paymentState: 'paid' });
});
