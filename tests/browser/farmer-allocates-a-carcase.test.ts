import { desc } from 'drizzle-orm';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { type BrowserWorld, expectAccessible, fillSignIn, startBrowserWorld, WIDE } from '#tests/support/browser.ts';
import { makeCollectionPoint } from '#tests/support/make-collection-point.ts';
import { makeAnimal } from '#tests/support/make-farm.ts';
import { makeShelves } from '#tests/support/make-selling-day.ts';
import { allocation } from '#db/schema/allocations.ts';
import { explainAllocation } from '#server/allocation/allocation-service.ts';
import { addDays } from '#shared/domain/day.ts';
import { earTagCheckDigit, formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatDay } from '#shared/domain/words.ts';

/** A plan of four carcases takes its time on a busy machine. */
const PLAN = { timeout: 150_000 };

let farm: BrowserWorld;
let ownerEmail: string;

beforeAll(async () => {
  farm = await startBrowserWorld();
  const { db, clock } = farm.world;
  await makeShelves(db);
  await makeCollectionPoint(db);
  for (const liveGrams of [604_000, 618_000, 590_000]) {
    await makeAnimal(db, { born: addDays(clock.today(), -25 * 30), liveGrams });
  }
  ownerEmail = (await farm.world.signIn('owner')).email;
});

afterAll(() => farm.stop());

async function addAnimal(page: Page, born: string): Promise<void> {
  const [herd, animal] = [123_450, 214];
  const check = earTagCheckDigit(herd, animal);
  const tagWith = (digit: number) => `UK ${herd} ${digit}00214`;
  await page.getByRole('link', { name: 'Herd' }).first().click();
  await page.getByRole('link', { name: 'Add an animal' }).click();
  await page.getByLabel('Ear tag', { exact: true }).fill(tagWith((check % 7) + 1));
  await page.getByLabel('Breed').fill('Aberdeen Angus');
  await page.getByLabel('Born').fill(born);
  await page.getByLabel('Live weight').fill('612');
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Add to the herd' }).click();
  await page
    .getByText(/check digit/i)
    .last()
    .waitFor();
  await page.getByLabel('Ear tag', { exact: true }).fill(tagWith(check));
  await page.getByRole('button', { name: 'Add to the herd' }).click();
  await page.getByRole('heading', { name: 'Herd', level: 1 }).waitFor();
  await page.getByText(formatEarTag(`UK${herd}${check}00214`)).waitFor();
}

async function planDay(page: Page, day: string): Promise<void> {
  await page.getByRole('link', { name: 'Cutting days' }).first().click();
  await page.getByRole('link', { name: 'Plan a day' }).first().click();
  const form = page.getByRole('form', { name: 'Cutting day' });
  await form.getByLabel('Cutting day', { exact: true }).fill(day);
  await form.getByLabel('Cutting specification').selectOption({ index: 1 });
  await form.getByLabel('Orders until').fill(addDays(day, -2));
  await page.getByRole('button', { name: 'Add a collection' }).click();
  await form.getByLabel('Collection day').fill(addDays(day, 1));
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Plan this day' }).click();
  await page.getByRole('heading', { name: formatDay(day), level: 1 }).waitFor();
}

async function enterKillSheets(page: Page, killDay: string): Promise<void> {
  const links = await page.getByRole('table', { name: 'Carcases of this day' }).getByRole('link').all();
  const addresses = await Promise.all(links.map((link) => link.getAttribute('href')));
  expect(addresses).toHaveLength(4);
  const overview = page.url();
  for (const [at, address] of addresses.entries()) {
    await page.goto(address ?? '');
    const sheet = page.getByRole('form', { name: 'Kill sheet' });
    await sheet.getByLabel('Kill day').fill(killDay);
    await sheet.getByLabel('Weight, both sides').fill(String(318 + 6 * at));
    await sheet.getByLabel('Conformation').selectOption('R');
    await sheet.getByLabel('Fat class').selectOption('4L');
    await sheet.getByRole('button', { name: 'Save the kill sheet' }).click();
    await page.getByText('This is what is recorded now.').waitFor();
    if (at === 0) await expectAccessible(page);
  }
  await page.goto(overview);
}

/** What the worker does a moment after each plan; here for the newest alone. */
async function explainLatest(): Promise<void> {
  const { db, deps } = farm.world;
  const [latest] = await db.select({ id: allocation.id }).from(allocation).orderBy(desc(allocation.createdAt)).limit(1);
  await explainAllocation(deps, latest?.id ?? '');
}

/** Forces the ribs to be cut in the other way, and returns the words that say what that costs. */
async function lockAnotherWay(page: Page): Promise<string> {
  await page
    .getByText(/^Ways of .*, left$/)
    .first()
    .click();
  await page
    .getByRole('button', { name: /^Choose the way of (Fore rib|Ribs|Rib)/ })
    .first()
    .click();
  const panel = page.getByRole('region', { name: /^Ways of/ });
  const ways = panel.getByRole('radio');
  const free = await ways.count();
  expect(free).toBeGreaterThan(2);
  for (let at = 1; at < free; at += 1) {
    const way = ways.nth(at);
    const words = await way.locator('xpath=..').innerText();
    if (words.includes('planned') || (await way.isDisabled())) continue;
    await way.check();
    break;
  }
  await page.getByText('The locks have changed.').waitFor();
  const drafts = await farm.world.db.$count(allocation);
  await page.getByRole('button', { name: 'Work it out again' }).click();
  await expect.poll(() => farm.world.db.$count(allocation), PLAN).toBe(drafts + 1);
  await explainLatest();
  const cost = panel.getByText(/^This lock costs/);
  await cost.waitFor(PLAN);
  return cost.innerText();
}

/** Every figure opens to the sum behind it. */
async function readTheMargin(page: Page): Promise<void> {
  const day = page.getByRole('navigation', { name: 'This cutting day' });
  await day.getByRole('link', { name: 'Margin' }).click();
  await page.getByRole('heading', { name: 'Margin', level: 1 }).waitFor();
  await page.getByRole('img', { name: /^Contribution and deadweight value by carcase/ }).waitFor();
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Show the sum of Boxes' }).click();
  const sum = page.getByRole('dialog', { name: 'Boxes' });
  for (const term of ['Income', 'Butchery', 'Contribution', 'Deadweight value', 'Gain']) {
    await sum.getByRole('term').filter({ hasText: term }).first().waitFor();
  }
  await page.keyboard.press('Escape');
  await page.getByText('The deadweight value, step by step').first().click();
  await page.getByText('Class R 4L').first().waitFor();
  await page.getByRole('radio', { name: 'What is sold' }).check();
  await page.getByText(/^What is sold so far/).waitFor();
}

/** Two answers side by side, and the plan as it was. */
async function supposeAnotherCarcase(page: Page): Promise<void> {
  const { db } = farm.world;
  const day = page.getByRole('navigation', { name: 'This cutting day' });
  await day.getByRole('link', { name: 'Allocation' }).click();
  await page.getByRole('link', { name: 'What if …' }).click();
  await page.getByLabel('Carcases more or fewer').fill('1');
  await expectAccessible(page);
  const plans = await db.$count(allocation);
  await page.getByRole('button', { name: 'See both answers' }).click();
  const answers = page.getByRole('table', { name: 'The day as it is and as supposed' });
  await answers.waitFor(PLAN);
  await expectAccessible(page);
  const carcases = answers.getByRole('row').filter({ hasText: /^Carcases/ });
  expect(await carcases.getByRole('cell').allInnerTexts()).toEqual(['4', '5', '+ 1']);
  expect(await db.$count(allocation)).toBe(plans);
}

test('the farmer, with four animals in the field, plans a day, locks one way and puts the boxes on sale', async () => {
  const { world } = farm;
  const killDay = world.clock.today();
  const day = addDays(killDay, 9);
  const page = await farm.openPage(WIDE);

  await page.goto('/office');
  await fillSignIn(page, ownerEmail);
  await page.getByRole('heading', { name: 'Today', level: 1 }).waitFor();
  await expectAccessible(page);

  await addAnimal(page, addDays(killDay, -26 * 30));
  await planDay(page, day);

  const booking = page.getByRole('form', { name: 'Book animals' });
  await booking.getByRole('textbox', { name: 'Kill day' }).fill(killDay);
  for (const animal of await booking.getByRole('checkbox').all()) await animal.check();
  await booking.getByRole('button', { name: /^Book 4/ }).click();
  await page.getByRole('table', { name: 'Carcases of this day' }).getByRole('link').nth(3).waitFor();
  await expectAccessible(page);

  await enterKillSheets(page, killDay);

  await page.getByRole('link', { name: 'Allocation' }).first().click();
  await page.getByRole('button', { name: 'Work it out' }).click();
  await page.getByRole('heading', { name: 'On offer' }).waitFor(PLAN);
  await expectAccessible(page);
  await expect.poll(() => page.getByText(/^£[\d,]+\.\d\d$/).count()).toBeGreaterThan(0);

  const cost = await lockAnotherWay(page);
  expect(cost).toMatch(/^This lock costs (£[\d,]+\.\d\d|nothing)\.$/);

  await page.getByRole('button', { name: /^Publish \d+ boxes$/ }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Put on sale' }).click();
  await page.getByText(/^On sale now: /).waitFor();
  await expectAccessible(page);

  const answer = await world.request().get('/api/shop');
  const shop = answer.body as { boxes: { offers: { day: string; free: number }[] }[] };
  const free = shop.boxes.flatMap((box) => box.offers).filter((offer) => offer.day === day);
  expect(free.reduce((sum, offer) => sum + offer.free, 0)).toBeGreaterThan(20);

  await readTheMargin(page);
  await supposeAnotherCarcase(page);
});
