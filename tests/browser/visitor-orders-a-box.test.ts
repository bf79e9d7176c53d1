import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { type BrowserWorld, expectAccessible, PHONE, startBrowserWorld } from '#tests/support/browser.ts';
import { countersOf, makeStall, takenOf } from '#tests/support/make-order.ts';
import { cards } from '#tests/support/pay.ts';

let shop: BrowserWorld;
let stall: Awaited<ReturnType<typeof makeStall>>;

beforeAll(async () => {
  shop = await startBrowserWorld();
  stall = await makeStall(shop.world);
});

afterAll(() => shop.stop());

async function fillBasket(page: Page): Promise<void> {
  await page.goto('/');
  await page.getByRole('heading', { level: 1 }).first().waitFor();
  await expectAccessible(page);
  await page
    .getByRole('link', { name: /Hearth/ })
    .first()
    .click();
  await page.getByRole('heading', { name: 'Hearth', level: 1 }).waitFor();
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Add to basket' }).click();
  await page.getByText('1 in your basket').waitFor();
  await page.goto('/cuts');
  await page.getByRole('button', { name: 'Add a pack: Rump steak' }).click();
  await page.getByRole('button', { name: 'One more: Rump steak, packs' }).click();
  await expectAccessible(page);
  await page.getByRole('link', { name: /^Go to basket/ }).click();
  await page.getByRole('heading', { name: 'Your basket', level: 1 }).waitFor();
  await page.getByText('£120.00').first().waitFor();
  await expectAccessible(page);
  await page.getByRole('link', { name: 'Checkout' }).click();
}

async function fillCheckout(page: Page): Promise<void> {
  await page.getByRole('heading', { name: 'Checkout', level: 1 }).waitFor();
  const pay = page.getByRole('button', { name: 'Go to payment · £120.00' });
  await pay.click();
  await page.getByText('Choose a place and a time.').waitFor();
  await expectAccessible(page);
  await page.getByRole('radio', { name: /^10:00–10:30/ }).check();
  await page.getByLabel('Name').fill('Ada Fell');
  await page.getByLabel('E-mail').fill('ada at example');
  await page.getByLabel('Phone').fill('07700 900123');
  await pay.click();
  const email = page.getByLabel('E-mail');
  await expect.poll(() => email.getAttribute('aria-invalid'), { timeout: 30_000 }).toBe('true');
  await email.fill('ada@example.com');
  await pay.click();
}

async function payWith(page: Page, card: string): Promise<void> {
  await page.getByLabel('Card number').fill(card);
  await page.getByLabel('Expiry').fill('12 / 40');
  await page.getByLabel('CVC').fill('123');
  await page.getByLabel('Name on card').fill('Ada Fell');
  await page.getByRole('button', { name: 'Pay £120.00' }).click();
}

test('a visitor with a phone, whose first card is declined, orders a box and two packs and is told the truth', async () => {
  const { world } = shop;
  world.payments.control({ webhooks: 'hold' });
  const page = await shop.openPage(PHONE);
  await fillBasket(page);
  await fillCheckout(page);

  await page.getByRole('heading', { name: 'Pay by card' }).waitFor();
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 20, held: 1, sold: 0 });
  expect(await countersOf(world, stall.looseOffer.id)).toEqual({ offered: 20, held: 2, sold: 0 });
  await payWith(page, cards.declined);
  await page.getByRole('alert').waitFor();
  await payWith(page, cards.good);

  // Paid, but the farm has not been told yet.
  await page.getByRole('heading', { name: 'Waiting for the payment.', level: 1 }).waitFor();
  await expectAccessible(page);
  world.payments.control({ webhooks: 'deliver' });
  await world.payments.flush();
  await page.getByRole('heading', { name: 'It is yours.', level: 1 }).waitFor();
  await expectAccessible(page);
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 20, held: 0, sold: 1 });
  expect(await countersOf(world, stall.looseOffer.id)).toEqual({ offered: 20, held: 0, sold: 2 });
  expect(await takenOf(world, stall.slot.id)).toBe(1);

  await world.runJobs();
  const mail = await world.mail.waitForMail('ada@example.com');
  const link = /https?:\/\/\S+\/orders\/[\w-]+/.exec(mail.text)?.[0] ?? '';
  expect(link).toContain(world.origin);
  const later = await shop.openPage(PHONE);
  await later.goto(link);
  await later.getByRole('heading', { name: 'It is yours.', level: 1 }).waitFor();
  await later.getByText('2 × Rump steak').first().waitFor();
});
