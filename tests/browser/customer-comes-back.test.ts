import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { Page } from 'playwright-core';
import { customerOrder } from '#db/schema/orders.ts';
import { standingTurn } from '#db/schema/standing-orders.ts';
import { inviteAgain } from '#server/mail/reminders.ts';
import { runStandingOrders } from '#server/standing-orders/run-standing.ts';
import { serveWaitingList } from '#server/waiting-list/serve-waiting.ts';
import { addDays, londonInstant } from '#shared/domain/day.ts';
import { type BrowserWorld, enterAs, expectAccessible, PHONE, startBrowserWorld } from '#tests/support/browser.ts';
import { makeBoxKind, makeBoxOffer, makeCuttingDay, makeSlot } from '#tests/support/make-farm.ts';
import { countersOf, makeConfirmedOrder, makeStall, type Stall } from '#tests/support/make-order.ts';

let shop: BrowserWorld;
let stall: Stall;

beforeAll(async () => {
  shop = await startBrowserWorld();
  stall = await makeStall(shop.world);
});
afterAll(() => shop.stop());

async function payOnPage(page: Page, amount: string): Promise<void> {
  await page.getByLabel('Card number').fill('4242 4242 4242 4242');
  await page.getByLabel('Expiry').fill('12 / 40');
  await page.getByLabel('CVC').fill('123');
  await page.getByLabel('Name on card').fill('Ada Fell');
  await page.getByRole('button', { name: `Pay ${amount}` }).click();
}

async function linkInMail(address: string, subject: string, pattern: RegExp): Promise<string> {
  await shop.world.runJobs(['send-mail']);
  const mail = await shop.world.mail.waitForMail(address, (one) => one.subject.includes(subject));
  return pattern.exec(mail.text)?.[0] ?? '';
}

test('a customer, who has collected an order, says how it was, orders the same again in two taps and takes the data along', async () => {
  const { world } = shop;
  const ada = await world.signIn('customer');
  const order = await makeConfirmedOrder(world, stall, { email: ada.email, note: 'Ring twice' }, ada.cookie);
  await world.db.update(customerOrder).set({ state: 'collected' }).where(eq(customerOrder.id, order.id));
  const page = await shop.openPage(PHONE);
  await enterAs(page, world.origin, ada);

  await page.goto(`/orders/${order.token}`);
  await page.getByRole('heading', { name: 'How was it?' }).waitFor();
  await page.getByRole('button', { name: 'Tell the farm' }).click();
  await page.getByText('Choose one to five.').waitFor();
  await page.getByRole('radio', { name: /^4/ }).check();
  await page.getByLabel('In your words').fill('Lovely mince');
  await page.getByRole('button', { name: 'Tell the farm' }).click();
  await page.getByText('Thank you. The farm reads every word.').waitFor();
  await expectAccessible(page);

  await page.goto('/account');
  await page.getByRole('heading', { name: 'Your orders' }).waitFor();
  await expectAccessible(page);
  await page.getByRole('button', { name: `Order again: order ${order.orderNo}` }).click();
  await page.getByRole('link', { name: 'Checkout' }).click();
  await page.getByRole('heading', { name: 'Checkout', level: 1 }).waitFor();
  await page.getByText('1 × Hearth').first().waitFor();

  await page.goto('/account/details');
  await page.getByLabel('Phone').fill('07700 900123');
  await page.getByRole('button', { name: 'Save the details' }).click();
  await page.getByText('Saved.').waitFor();
  await expectAccessible(page);
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: 'Download my data' }).click(),
  ]);
  expect(download.suggestedFilename()).toBe('my-data.json');
});

test('somebody who gets marketing mail, presses its link once and gets no more, without signing in', async () => {
  const { world } = shop;
  const order = await makeConfirmedOrder(world, stall, { email: 'enough@example.com', wantsNews: true });
  const old = await makeCuttingDay(world.db, world.clock.today(), {
    ...{ day: addDays(world.clock.today(), -63), state: 'closed' },
  });
  const change = { state: 'collected', cuttingDayId: old.id } as const;
  await world.db.update(customerOrder).set(change).where(eq(customerOrder.id, order.id));
  await inviteAgain(world.deps);
  const page = await shop.openPage(PHONE);
  await page.goto(await linkInMail('enough@example.com', 'Beef for the freezer', /\S+\/unsubscribe\/\S+/));
  await page.getByRole('heading', { name: 'Stop these mails?', level: 1 }).waitFor();
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Stop these mails' }).click();
  await page.getByRole('heading', { name: 'No more such mails' }).waitFor();
});

test('a visitor, whose box is sold out, waits for it and takes the one that comes free', async () => {
  const { world } = shop;
  const kind = await makeBoxKind(world.db, 'ember', { name: 'Ember', position: 2, cutIds: [stall.cut.id] });
  const offer = await makeBoxOffer(world.db, stall.day.id, kind, 1);
  const first = await makeConfirmedOrder(world, { ...stall, boxOffer: offer });
  const page = await shop.openPage(PHONE);
  await page.goto('/boxes/ember');
  await page.getByText('Tell me when Ember can be had again').click();
  await page.getByLabel('E-mail').fill('wait@example.com');
  await page.getByRole('button', { name: 'Put me on the list' }).click();
  await page.getByText('We wrote to wait@example.com.').waitFor();
  await expectAccessible(page);
  await page.goto(await linkInMail('wait@example.com', 'please confirm', /\S+\/waiting-list\/\S+/));
  await page.getByRole('button', { name: 'Yes, put me on the list' }).click();
  await page.getByText('You are next.').waitFor();

  await world.request().post(`/api/orders/${first.token}/cancel`).expect(200);
  await serveWaitingList(world.deps);
  await page.goto(await linkInMail('wait@example.com', 'is kept for you', /\S+\/waiting-list\/\S+/));
  await page.getByRole('heading', { name: 'Ember is kept for you' }).waitFor();
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Put it into the basket' }).click();
  await page.getByRole('link', { name: 'Checkout' }).click();
  await page.getByRole('radio', { name: /^10:00–10:30/ }).check();
  await page.getByLabel('Name').fill('Wanda Wait');
  await page.getByLabel('E-mail').fill('wait@example.com');
  await page.getByLabel('Phone').fill('07700 900123');
  await page.getByRole('button', { name: 'Go to payment · £94.00' }).click();
  await payOnPage(page, '£94.00');
  await page.getByRole('heading', { name: 'It is yours.', level: 1 }).waitFor();
  expect(await countersOf(world, offer.id)).toEqual({ offered: 1, held: 0, sold: 1 });
});

test('a customer, sets up a standing order and skips its next box', async () => {
  const { world } = shop;
  const bess = await world.signIn('customer');
  const page = await shop.openPage(PHONE);
  await enterAs(page, world.origin, bess);
  await page.goto('/account/standing');
  await page.getByRole('link', { name: 'Start a standing order' }).click();
  await page.getByRole('heading', { name: 'Start a standing order', level: 1 }).waitFor();
  await page.getByRole('button', { name: 'Go to payment' }).click();
  await page.getByText('Agree to the terms, or order without a standing order.').waitFor();
  await page.getByRole('radio', { name: /^Hearth/ }).check();
  await page.getByRole('radio', { name: 'Every 6 weeks' }).check();
  await page.getByRole('radio', { name: /^10:00–10:30/ }).check();
  await page.getByLabel('Phone').fill('07700 900123');
  await page.getByRole('checkbox', { name: /^I agree/ }).check();
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Go to payment · £94.00' }).click();
  await payOnPage(page, '£94.00');
  await page.getByRole('heading', { name: 'It is yours.', level: 1 }).waitFor();

  const today = world.clock.today();
  const later = await makeCuttingDay(world.db, today, { day: addDays(today, 60) });
  const offer = await makeBoxOffer(world.db, later.id, stall.box, 4);
  const on = addDays(today, 61);
  const times = { startsAt: londonInstant(on, '10:00'), endsAt: londonInstant(on, '10:30') };
  await makeSlot(world.db, later.id, today, { pointId: stall.slot.pointId, ...times });
  await runStandingOrders(world.deps);
  expect(await countersOf(world, offer.id)).toEqual({ offered: 4, held: 1, sold: 0 });
  await page.goto('/account/standing');
  await page.getByText('1 × Hearth, every 6 weeks').waitFor();
  await expectAccessible(page);
  await page.getByRole('link', { name: 'See or skip this box' }).click();
  await page.getByRole('button', { name: 'Skip this box' }).click();
  await page.getByRole('heading', { name: 'This box is skipped' }).waitFor();
  await expectAccessible(page);
  expect(await countersOf(world, offer.id)).toEqual({ offered: 4, held: 0, sold: 0 });
  const [turn] = await world.db.select().from(standingTurn);
  expect(turn?.state).toBe('skipped');
});
