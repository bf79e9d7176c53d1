import { randomUUID } from 'node:crypto';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import {
  type BrowserWorld,
  enterAs,
  expectAccessible,
  PHONE,
  startBrowserWorld,
  WIDE,
} from '#tests/support/browser.ts';
import { getOrderRow, payFor, place } from '#tests/support/make-order.ts';
import { makePackingDay, type PackingBench } from '#tests/support/make-packing-day.ts';

let farm: BrowserWorld;
let bench: PackingBench;
let token: string;

beforeAll(async () => {
  farm = await startBrowserWorld();
  const { world } = farm;
  bench = await makePackingDay(world);
  const placed = await place(world, {
    basketKey: randomUUID(),
    dayId: bench.dayId,
    lines: [{ offerId: bench.boxOffer.id, quantity: 1 }],
    slotId: bench.slot.id,
    name: 'Ada Fell',
    email: 'ada@example.com',
    phone: '07700 900123',
    note: '',
  });
  token = placed.token;
  await payFor(world, placed);
  await world.runJobs();
  // From here on it is the cutting day.
  world.clock.advance({ days: 9 });
});

afterAll(() => farm.stop());

async function weigh(page: Page, cut: string, kilograms: string): Promise<void> {
  const form = page.getByRole('form', { name: 'Weigh packs' });
  const saved = page.getByText(/^Saved as pack/);
  const before = (await saved.count()) > 0 ? await saved.innerText() : '';
  await form.getByLabel('From carcase').selectOption({ index: 1 });
  await form.getByLabel('Cut', { exact: true }).selectOption({ label: cut });
  await form.getByLabel('Weight of the pack').fill(kilograms);
  await form.getByRole('button', { name: 'Save the pack' }).click();
  await expect
    .poll(async () => ((await saved.count()) > 0 ? saved.innerText() : ''), { timeout: 60_000 })
    .not.toBe(before);
}

async function enterCutWeight(page: Page): Promise<void> {
  await page.goto(`/office/carcases/${bench.carcaseId}`);
  const weights = page.getByRole('form', { name: 'Weights' });
  const row = weights.getByRole('group', { name: 'Rump' });
  const field = row.getByLabel(/^Rump/).first();
  const foreseen = Number(
    /([\d.]+) kg/.exec(
      (await row
        .getByText(/^foreseen/)
        .first()
        .innerText()) ?? '',
    )?.[1],
  );
  await field.fill((foreseen + 0.1).toFixed(3));
  await row.getByText(/^0\.100 kg more/).waitFor();
  await weights.getByRole('button', { name: 'Save the weights' }).click();
  await page.getByText('This is what is recorded now.').waitFor();
  await expectAccessible(page);
}

test('the farmer, on the cutting day, weighs, fills the order, confirms its mail and ticks it off on a phone', async () => {
  const { world } = farm;
  const owner = await world.signIn('owner');
  const page = await farm.openPage(WIDE);
  await enterAs(page, world.origin, owner);
  await enterCutWeight(page);

  await page.goto(`/office/cutting-days/${bench.dayId}/packing`);
  await weigh(page, 'Mince', '0.5');
  await page.getByRole('button', { name: 'Fill the orders' }).click();
  await page.getByText('1 place could not be filled.').waitFor();
  await expectAccessible(page);
  for (const kilograms of ['0.5', '0.5']) await weigh(page, 'Mince', kilograms);
  for (const kilograms of ['0.7', '0.7']) await weigh(page, 'Diced beef', kilograms);
  await weigh(page, 'Topside joint', '1.4');
  await page.getByRole('button', { name: 'Fill the orders' }).click();
  await page.getByText('Everything ordered is filled.').waitFor();

  await page.getByRole('link', { name: 'Collections' }).first().click();
  await page.getByRole('button', { name: /^Preview the mail of order/ }).click();
  const preview = page.getByRole('dialog');
  await preview.getByText('ada@example.com').waitFor();
  await expectAccessible(page);
  await preview.getByRole('button', { name: 'Close' }).click();
  await page.getByRole('button', { name: 'Confirm 1 mail' }).click();
  await page.getByText('Confirmed.', { exact: true }).waitFor();
  await page.getByText('queued', { exact: true }).first().waitFor();
  await world.runJobs(['send-mail']);
  await page.reload();
  await page.getByText('sent', { exact: true }).first().waitFor();
  await expectAccessible(page);
  const mail = await world.mail.waitForMail('ada@example.com', (each) => /collect|ready/i.test(each.subject));
  expect(mail.text).toContain(`/orders/${token}`);
  expect(mail.text).toContain('The farm gate');
  expect(mail.text).toContain('A cool bag');
  expect(mail.attachments.map(({ contentType }) => contentType)).toContain('text/calendar');
  const letter = await farm.openPage(PHONE);
  expect(mail.html).toContain('A cool bag');
  await letter.setContent(mail.html ?? '');
  await expectAccessible(letter);

  world.clock.advance({ days: 1 });
  const phone = await farm.openPage(PHONE);
  await enterAs(phone, world.origin, owner);
  await phone.goto(`/office/cutting-days/${bench.dayId}/run-sheet`);
  await phone.getByRole('heading', { name: 'Run sheet', level: 1 }).waitFor();
  await expectAccessible(phone);
  const ready = phone.getByRole('button', { name: /^Put out ready/ });
  if ((await ready.count()) > 0) await ready.click();
  await phone.getByRole('button', { name: /^Collected order/ }).click();
  await phone.getByText('All handed over.').waitFor();
  expect((await getOrderRow(world, token)).state).toBe('collected');
});
