import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { reservation, reservationLine } from '#db/schema/trade.ts';
import { type BrowserWorld, expectAccessible, fillSignIn, startBrowserWorld, WIDE } from '#tests/support/browser.ts';
import { makePackingDay } from '#tests/support/make-packing-day.ts';
import { makeTradeAccount } from '#tests/support/make-selling-day.ts';

let counter: BrowserWorld;
let butcherEmail: string;
let ownerEmail: string;

beforeAll(async () => {
  counter = await startBrowserWorld();
  const { world } = counter;
  await makePackingDay(world);
  const butcher = await world.signIn('butcher');
  butcherEmail = butcher.email;
  ownerEmail = (await world.signIn('owner')).email;
  await makeTradeAccount(world.db, butcher.userId, 'Fellside Butchers');
});

afterAll(() => counter.stop());

test('a butcher, while the farm confirms by hand, reserves a hindquarter and brisket with a note and is told that it is asked', async () => {
  const { world } = counter;
  const page = await counter.openPage(WIDE);
  await page.goto('/trade');
  await fillSignIn(page, butcherEmail);
  await page.getByRole('heading', { name: 'Coming carcases', level: 1 }).waitFor();
  await expectAccessible(page);

  await page.getByRole('link', { name: /^Reserve from this day/ }).click();
  await page.getByRole('heading', { name: /^Reserve from/, level: 1 }).waitFor();
  await page.getByRole('button', { name: 'Reserve', exact: true }).click();
  await page.getByRole('alert').first().waitFor();

  await page
    .getByRole('group', { name: /, left side$/ })
    .first()
    .getByRole('checkbox', { name: /^Hindquarter/ })
    .check();
  await page.getByLabel(/^Brisket/).fill('10');
  await page.getByLabel(/^Note to the cutter/).fill('Aitchbone out, shin left whole.');
  await expectAccessible(page);
  await page.getByRole('button', { name: 'Reserve', exact: true }).click();
  await page.getByText(/^Reservation \d+ is asked\.$/).waitFor({ timeout: 150_000 });
  await expectAccessible(page);

  const [kept] = await world.db.select().from(reservation);
  expect(kept).toMatchObject({ state: 'asked', cuttingNote: 'Aitchbone out, shin left whole.' });
  const lines = await world.db
    .select()
    .from(reservationLine)
    .where(eq(reservationLine.reservationId, kept?.id ?? ''));
  expect(
    lines
      .map(({ kind, unitKind, side, cutId, grams, tenthPencePerKg }) => [
        kind,
        unitKind ?? cutId,
        side ?? grams,
        tenthPencePerKg,
      ])
      .sort(),
  ).toEqual([
    ['cut', 'brisket-joint', 10_000, 9_400],
    ['unit', 'hind', 'left', 7_200],
  ]);

  const office = await counter.openPage(WIDE);
  await office.goto('/office/today');
  await fillSignIn(office, ownerEmail);
  await office
    .getByText(/Fellside Butchers/)
    .first()
    .waitFor();
});
