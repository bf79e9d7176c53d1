import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { addDays, londonInstant } from '#shared/domain/day.ts';
import { type BrowserWorld, expectAccessible, PHONE, startBrowserWorld } from '#tests/support/browser.ts';
import { makeBoxKind, makeBoxOffer, makeSlot } from '#tests/support/make-farm.ts';
import {
  countersOf,
  getOrderRow,
  makeConfirmedOrder,
  makeStall,
  paymentsOf,
  takenOf,
} from '#tests/support/make-order.ts';
import { cards } from '#tests/support/pay.ts';

let shop: BrowserWorld;
let stall: Awaited<ReturnType<typeof makeStall>>;
let later: { id: string };
let variant: { id: string };

beforeAll(async () => {
  shop = await startBrowserWorld();
  const { world } = shop;
  stall = await makeStall(world);
  const day = addDays(world.clock.today(), 10);
  const [startsAt, endsAt] = [londonInstant(day, '15:00'), londonInstant(day, '15:30')];
  const more = { pointId: stall.slot.pointId, startsAt, endsAt, capacity: 1 };
  later = await makeSlot(world.db, stall.day.id, world.clock.today(), more);
  const kind = await makeBoxKind(world.db, 'hearth-no-mince', {
    ...{ name: 'Hearth without mince', summary: 'More steak instead.', variantOfId: stall.box.id },
    cutIds: [stall.cut.id],
  });
  variant = await makeBoxOffer(world.db, stall.day.id, kind, 2);
});

afterAll(() => shop.stop());

async function payWith(page: Page, pounds: string): Promise<void> {
  await page.getByLabel('Card number').fill(cards.good);
  await page.getByLabel('Expiry').fill('12 / 40');
  await page.getByLabel('CVC').fill('123');
  await page.getByLabel('Name on card').fill('Ada Fell');
  await page.getByRole('button', { name: `Pay ${pounds}` }).click();
}

async function changeTime(page: Page): Promise<void> {
  await page.getByRole('link', { name: 'Change the place or time' }).click();
  await page.getByRole('heading', { name: 'Another place or time', level: 1 }).waitFor();
  await page.getByRole('radio', { name: /^15:00–15:30/ }).check();
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Move it there' }).click();
  await page.getByRole('heading', { name: 'It is yours.', level: 1 }).waitFor();
  await page
    .getByText(/15:00–15:30/)
    .first()
    .waitFor();
}

async function swap(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Swap Hearth' }).click();
  const sheet = page.getByRole('dialog', { name: 'Swap Hearth' });
  await sheet.getByRole('radio', { name: /^Hearth without mince/ }).check();
  await expectAccessible(page);
  await sheet.getByRole('button', { name: 'Swap it' }).click();
  await page.getByText('1 × Hearth without mince').first().waitFor();
}

async function addTwoPacks(page: Page): Promise<void> {
  await page.getByRole('link', { name: 'Add to this order' }).click();
  await page.getByRole('heading', { name: 'Add to your order', level: 1 }).waitFor();
  await page.getByRole('button', { name: 'One more: Rump steak' }).click();
  await page.getByRole('button', { name: 'One more: Rump steak' }).click();
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Go to payment · £26.00' }).click();
  await page.getByRole('heading', { name: 'Pay by card' }).waitFor();
  await payWith(page, '£26.00');
}

test('a customer with a phone, whose plans change, moves, swaps and adds to an order and then cancels it', async () => {
  const { world } = shop;
  const order = await makeConfirmedOrder(world, stall);
  const page = await shop.openPage(PHONE);
  await page.goto(`/orders/${order.token}`);
  await page.getByRole('heading', { name: 'It is yours.', level: 1 }).waitFor();
  await expectAccessible(page);

  await changeTime(page);
  expect(await takenOf(world, later.id)).toBe(1);
  expect(await takenOf(world, stall.slot.id)).toBe(0);

  await swap(page);
  expect(await countersOf(world, variant.id)).toMatchObject({ sold: 1 });
  expect(await countersOf(world, stall.boxOffer.id)).toMatchObject({ sold: 0 });

  await addTwoPacks(page);
  await world.payments.flush();
  await page.getByText('2 × Rump steak').first().waitFor();
  await page.getByText('£120.00').first().waitFor();
  await expectAccessible(page);

  await page.getByRole('button', { name: 'Cancel the order' }).click();
  await page.getByRole('button', { name: 'Yes, cancel it' }).click();
  await page.getByRole('heading', { name: 'Cancelled.', level: 1 }).waitFor();
  await world.runJobs();
  await page.getByText('£120.00 went back to the card that paid.').waitFor();
  await expectAccessible(page);
  expect(await getOrderRow(world, order.token)).toMatchObject({ state: 'cancelled', paymentState: 'refunded' });
  const refunds = (await paymentsOf(world, order.id)).filter((row) => row.kind === 'refund');
  expect(refunds.reduce((sum, row) => sum + row.amountPence, 0)).toBe(12_000);
  expect(await countersOf(world, variant.id)).toMatchObject({ sold: 0 });
  expect(await takenOf(world, later.id)).toBe(0);
});
