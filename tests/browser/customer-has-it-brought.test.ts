import { eq } from 'drizzle-orm';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { collectionSlot } from '#db/schema/orders.ts';
import { type BrowserWorld, expectAccessible, PHONE, startBrowserWorld } from '#tests/support/browser.ts';
import { makeStall } from '#tests/support/make-order.ts';
import { cards, payByCard } from '#tests/support/pay.ts';

let shop: BrowserWorld;

beforeAll(async () => {
  shop = await startBrowserWorld();
});
afterAll(() => shop.stop());

async function makeVanAndCode(): Promise<void> {
  const { world } = shop;
  const owner = world.request((await world.signIn('owner')).cookie);
  await owner.post('/api/office/delivery-areas').send({
    ...{ name: 'The dale round', prefixes: ['ZZ1'], pricePence: 600, freeFromPence: null, weekday: 5 },
    ...{ startsAt: '13:00', endsAt: '17:00', capacity: 5, isActive: true },
  });
  await owner.post('/api/office/promo-codes').send({
    ...{ code: 'SPRING10', percent: 10, amountPence: null, minimumPence: 0, lastDay: null },
    ...{ usageLimit: null, isOncePerCustomer: true },
  });
}

async function chooseVan(page: Page): Promise<void> {
  await page.getByRole('radio', { name: /^Bring it to me/ }).check();
  const postcode = page.getByLabel('Postcode');
  await postcode.fill('zz99zz');
  await page.getByText('The van does not come here.').waitFor();
  await page.getByText(/The nearest place to collect is The farm gate/).waitFor();
  await expectAccessible(page);
  await postcode.fill('zz11aa');
  await page.getByText(/^The van comes Fri/).waitFor();
  await page.getByLabel('House and street').fill('2 Beck Row');
}

async function useCode(page: Page): Promise<void> {
  await page.getByText('I have a code').click();
  const code = page.getByLabel('Promotional code');
  await code.fill('spring 10');
  await page.getByRole('button', { name: 'Use the code' }).click();
  await page.getByText('SPRING10 takes £9.40 off.').waitFor();
}

test('a visitor with a phone, who has a code and an address in the dale, pays a deposit and has it brought', async () => {
  const { world } = shop;
  const stall = await makeStall(world);
  await makeVanAndCode();
  const page = await shop.openPage(PHONE);
  await page.goto('/boxes/hearth');
  await page.getByRole('button', { name: 'Add to basket' }).click();
  await page.getByText('1 in your basket').waitFor();
  await page.goto('/checkout');
  await page.getByRole('heading', { name: 'Checkout', level: 1 }).waitFor();
  await useCode(page);
  await chooseVan(page);
  await page.getByLabel('Name').fill('Ada Fell');
  await page.getByLabel('E-mail').fill('ada@example.com');
  await page.getByLabel('Phone').fill('07700 900123');
  // £94.00 less £9.40, and £6.00 for the van: a quarter of £90.60 to the next pound.
  await page.getByRole('radio', { name: /^A deposit/ }).check();
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Go to payment · £23.00' }).click();
  await page.getByRole('heading', { name: 'Pay by card' }).waitFor();
  const paid = await payByCard(page.url(), cards.good);
  await world.payments.flush();
  await page.goto(paid.outcome === 'paid' ? paid.returnedTo : '/');
  await page.getByRole('heading', { name: 'It is yours.', level: 1 }).waitFor();
  await page
    .getByText(/We bring it Fri/)
    .first()
    .waitFor();
  await page
    .getByText(/2 Beck Row/)
    .first()
    .waitFor();
  await page.getByText(/The rest, at most £67.60/).waitFor();
  await expectAccessible(page);
  const [round] = await world.db.select().from(collectionSlot).where(eq(collectionSlot.capacity, 5));
  expect(round).toMatchObject({ cuttingDayId: stall.day.id, taken: 1 });
});
