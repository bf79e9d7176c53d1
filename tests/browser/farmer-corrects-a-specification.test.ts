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
import { makeCuttingDay, makeFarm } from '#tests/support/make-farm.ts';
import { makeTraditionalCuts, makeTraditionalSide } from '#tests/support/make-specification.ts';
import { makeWeighedDay } from '#tests/support/make-weighed-day.ts';
import type { SpecificationEdition } from '#shared/contracts/specifications.ts';
import { addDays } from '#shared/domain/day.ts';
import { formatDay } from '#shared/domain/words.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';

let farm: BrowserWorld;
let owner: Awaited<ReturnType<BrowserWorld['world']['signIn']>>;

beforeAll(async () => {
  farm = await startBrowserWorld();
  const { db, clock } = farm.world;
  await makeFarm(db);
  await makeTraditionalCuts(db);
  const { id: specificationId } = await makeTraditionalSide(db);
  const day = addDays(clock.today(), -10);
  await makeWeighedDay(db, {
    specificationId,
    day,
    carcases: 2,
    perMille: { 'fore/brisket': 1_100, 'fore/chuck': 950 },
  });
  owner = await farm.world.signIn('owner');
});

afterAll(() => farm.stop());

async function editions(): Promise<SpecificationEdition[]> {
  const answer = await farm.world.request(owner.cookie).get('/api/specifications');
  return (answer.body as { specifications: SpecificationEdition[] }).specifications;
}

async function open(page: Page): Promise<void> {
  await enterAs(page, farm.world.origin, owner);
  await page.goto('/office/specifications');
  await page.getByRole('link', { name: traditionalSide.name }).first().click();
  await page.getByText('Everything adds up to 100 %.', { exact: true }).waitFor();
}

/** A day that is planned and not on sale. */
async function planDay() {
  const { db, clock } = farm.world;
  const [present] = await editions();
  return makeCuttingDay(db, clock.today(), { specificationId: present?.id ?? '', state: 'planned' });
}

const meatOf = (name: string) => {
  const primal = traditionalSide.quarters.flatMap(({ primals }) => primals).find((one) => one.name === name);
  return (primal?.tissues.meat ?? 0) / 1000;
};

test('the farmer, moving meat from the neck to the brisket, sees what does not add up, and saves a new edition', async () => {
  const page = await farm.openPage(WIDE);
  await open(page);
  await expectAccessible(page);

  await page.getByLabel('Brisket, meat').fill(String(meatOf('Brisket') + 0.5));
  await page.getByText('1 thing does not add up yet.').waitFor();
  await page.getByText(/^Forequarter adds up to .* 0\.5 % too much\.$/).waitFor();
  await page.getByRole('button', { name: 'Save as edition 2' }).click();
  await page.getByText('Nothing was saved: not everything adds up to 100 %.').waitFor();
  expect(await editions()).toHaveLength(1);

  await page.getByLabel('Neck and chuck, meat').fill(String(meatOf('Neck and chuck') - 0.5));
  await page.getByText('Everything adds up to 100 %.', { exact: true }).waitFor();
  await page.getByRole('button', { name: 'Save as edition 2' }).click();
  await page.getByText('Edition 2 is saved.').waitFor();
  await page.getByText('Edition 2 of 2, written here').waitFor();
  await expectAccessible(page);
  expect((await editions()).map(({ edition, days }) => [edition, days.length])).toEqual([
    [2, 0],
    [1, 1],
  ]);
});

test('the farmer, shown what two carcases weighed, accepts the proposal as the next edition', async () => {
  const before = (await editions())[0]?.edition ?? 0;
  const page = await farm.openPage(WIDE);
  await open(page);
  await page.getByRole('link', { name: 'What your own weights propose' }).click();
  await page.getByRole('heading', { name: 'Shares that would change' }).waitFor();
  await page.getByText(/^From 4 sides cut on /).waitFor();
  await page.getByText('How the proposal is reached').first().click();
  await page.getByText('4 of 10 sides').first().waitFor();
  await expectAccessible(page);
  await page.getByRole('button', { name: `Accept as edition ${before + 1}` }).click();
  await page.getByText(`Accepted: edition ${before + 1} has these shares.`).waitFor();
  await page.getByText('Nothing to decide').waitFor();
  expect((await editions())[0]).toMatchObject({ edition: before + 1, origin: 'learned' });
});

test('the farmer, with a phone, goes down to one way, takes a share out of it and is told where', async () => {
  const page = await farm.openPage(PHONE);
  await open(page);
  await page.getByRole('button', { name: /^Ways of brisket/ }).click();
  await page.getByRole('button', { name: 'Boned and rolled' }).click();
  await expectAccessible(page);
  await page.getByRole('button', { name: /^Brisket, boned and rolled/ }).click();
  await page.getByLabel('Brisket, boned and rolled, of the meat of Brisket').fill('80');
  await page.getByText(/^Its meat adds up to .* missing\.$/).waitFor();
  await expectAccessible(page);
  await page.getByRole('button', { name: 'The whole way' }).click();
  await page
    .getByText(/meat of brisket adds up to .*, not to 100 %\.$/)
    .first()
    .waitFor();
  await page.getByRole('button', { name: 'All ways of this choice' }).click();
  await page.getByRole('button', { name: /^Boned and rolled.*does not add up$/ }).waitFor();
  await page.getByRole('button', { name: 'Undo all changes' }).click();
  await page.getByText('Everything adds up to 100 %.', { exact: true }).waitFor();
});

test('the farmer copies a specification that came with the program, and cuts a planned day by it', async () => {
  const { id: dayId, day } = await planDay();
  const page = await farm.openPage(WIDE);
  await enterAs(page, farm.world.origin, owner);
  await page.goto('/office/specifications');
  const form = page.getByRole('form', { name: 'A specification of your own' });
  await form.getByLabel('Start from').selectOption({ label: 'Seam-butchery side, steak-led, as it came' });
  await form.getByLabel('Its name').fill('Our seam side');
  await form.getByRole('button', { name: 'Make this specification' }).click();
  await page.getByRole('heading', { name: 'Our seam side', level: 1 }).waitFor();
  await page.getByText('Edition 1 of 1, a copy').waitFor();

  await page.goto(`/office/cutting-days/${dayId}`);
  await page.getByRole('heading', { name: formatDay(day), level: 1 }).waitFor();
  await page.getByText('Cut by another specification').click();
  await page.getByLabel('Cutting specification').selectOption({ label: 'Our seam side, edition 1' });
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Cut the day by this one' }).click();
  await page.getByText('Cut by “Our seam side, edition 1”.').waitFor();
  const answer = await farm.world.request(owner.cookie).get(`/api/cutting-days/${dayId}`);
  expect(answer.body).toMatchObject({ specificationName: 'Our seam side, edition 1', figuresVersion: 2 });
});
