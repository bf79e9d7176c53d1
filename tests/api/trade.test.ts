import { randomUUID } from 'node:crypto';
import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { datedSetting } from '#db/schema/farm.ts';
import { boxKind } from '#db/schema/products.ts';
import { reservation } from '#db/schema/trade.ts';
import type { Reservation, TradeDay } from '#shared/contracts/trade.ts';
import { addDays, londonInstant } from '#shared/domain/day.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { workOut } from '#tests/support/work-out.ts';
import { makeSellingDay, makeTradeAccount } from '#tests/support/make-selling-day.ts';

// Most of these work the day out again, which takes seconds on a busy machine.
const SLOW = 300_000;

const TEXT: unknown = expect.any(String);
const NUMBER: unknown = expect.any(Number);

let world: World;
let farm: Awaited<ReturnType<typeof makeSellingDay>>;
let owner: string;
let butcher: string;

beforeAll(async () => {
  world = await startWorld();
  farm = await makeSellingDay(world.db, world.clock, [330_000]);
  // More people want grill boxes than the steaks of one beast can fill: every hindquarter that leaves costs some.
  await world.db.update(boxKind).set({ demandBoxes: 30 }).where(eq(boxKind.id, farm.grillId));
  owner = (await world.signIn('owner')).cookie;
  const first = await world.signIn('butcher');
  butcher = first.cookie;
  await makeTradeAccount(world.db, first.userId, 'Fellside Butchers');
  const plan = await workOut(world.request(owner), farm.day.id);
  const wish = { figuresVersion: plan.figuresVersion };
  const answer = await world.request(owner).post(`/api/allocations/${plan.id}/publish`).send(wish);
  expect(answer.body).toMatchObject({ state: 'published' });
}, SLOW);
afterAll(() => world.stop());

const HIND = { kind: 'unit', unitKind: 'hind', carcaseId: null, side: null };
const BRISKET = { kind: 'cut', cutId: 'brisket-joint', grams: 10_000 };

function ask(lines: unknown[], more: Record<string, unknown> = {}) {
  return { requestKey: randomUUID(), dayId: farm.day.id, lines, cuttingNote: '', ...more };
}

async function reserve(body: unknown, cookie = butcher): Promise<Reservation> {
  const answer = await world
    .request(cookie)
    .post('/api/trade/reservations')
    .send(body as object);
  expect(answer.body).toMatchObject({ reservationNo: NUMBER });
  return answer.body as Reservation;
}

function readOffers() {
  return world.db.select().from(offer).where(eq(offer.cuttingDayId, farm.day.id)).orderBy(offer.productKey);
}

async function boxesOffered(): Promise<number> {
  const offers = await readOffers();
  return offers.filter(({ kind }) => kind === 'box').reduce((sum, each) => sum + each.offered, 0);
}

async function setAutomatic(isAutomatic: boolean): Promise<void> {
  const row = { key: 'isReallocationAutomatic', validFrom: world.clock.today(), value: isAutomatic };
  await world.db
    .insert(datedSetting)
    .values(row)
    .onConflictDoUpdate({ target: [datedSetting.key, datedSetting.validFrom], set: { value: isAutomatic } });
}

async function cancel({ id, version }: Reservation, cookie = butcher) {
  return world.request(cookie).post(`/api/trade/reservations/${id}/cancel`).send({ version });
}

async function mailAbout(subject: string): Promise<string> {
  await world.runJobs();
  return world.mail.messages().find((mail) => mail.subject.startsWith(subject))?.text ?? '';
}

async function listDays(cookie = butcher): Promise<TradeDay[]> {
  return ((await world.request(cookie).get('/api/trade/days')).body as { days: TradeDay[] }).days;
}

test('the coming days show each side with what may leave whole, at the butcher’s own prices', async () => {
  const [day] = await listDays();
  expect(day).toMatchObject({ id: farm.day.id, isInTime: true });
  expect(day?.carcases).toHaveLength(1);
  for (const side of day?.carcases.flatMap((carcase) => carcase.sides) ?? []) {
    const unit = (kind: string) => side.units.find((each) => each.unitKind === kind);
    expect(unit('hind')).toMatchObject({ isTaken: false, closedReason: null, tenthPencePerKg: 7_200 });
    expect(unit('side')).toMatchObject({ tenthPencePerKg: null, grams: side.sideGrams });
    expect((unit('hind')?.grams ?? 0) + (unit('fore')?.grams ?? 0)).toBe(side.sideGrams);
  }
  expect(day?.cuts).toMatchObject([{ cutId: 'brisket-joint', tenthPencePerKg: 9_400 }]);
  expect(day?.cuts[0]?.madeGrams).toBeGreaterThan(0);
});

describe('reserving, while automatic re-allocation is off', () => {
  test('something without a price, or of another day, is refused beside its line', async () => {
    const lines = [HIND, { kind: 'cut', cutId: 'rib-eye-steak', grams: 5_000 }, { ...HIND, carcaseId: randomUUID() }];
    const answer = await world.request(butcher).post('/api/trade/reservations').send(ask(lines));
    expect(answer.status).toBe(400);
    expect(answer.body).toMatchObject({
      code: 'INVALID_INPUT',
      fields: {
        'lines.1': 'There is no price agreed for this yet. Ask the farm.',
        'lines.2': 'This beast does not belong to this day.',
      },
    });
    expect(await world.db.select().from(reservation)).toEqual([]);
  });

  test(
    'waits as asked and holds nothing; the owner’s yes confirms it together with the smaller offers',
    async () => {
      const before = await readOffers();
      const boxes = await boxesOffered();
      const body = ask([HIND, BRISKET], { cuttingNote: 'Leave the rump on.' });
      const [asked, again] = [await reserve(body), await reserve(body)];
      expect(again.id).toBe(asked.id);
      expect(asked).toMatchObject({
        state: 'asked',
        businessName: 'Fellside Butchers',
        cuttingNote: 'Leave the rump on.',
      });
      expect(await readOffers()).toEqual(before);
      expect((await listDays())[0]?.carcases.flatMap(takenHinds)).toEqual([]);

      const path = `/api/office/reservations/${asked.id}/confirm`;
      const stale = await world
        .request(owner)
        .post(path)
        .send({ version: asked.version + 1 });
      expect(stale.body).toMatchObject({ code: 'STATE_CHANGED' });
      const confirmed = (await world.request(owner).post(path).send({ version: asked.version })).body as Reservation;
      expect(confirmed).toMatchObject({ state: 'confirmed' });
      expect(confirmed.lines).toContainEqual(
        expect.objectContaining({
          name: 'Hindquarter',
          earTag: expect.stringContaining('UK') as unknown,
          side: TEXT,
        }) as unknown,
      );
      expect(await boxesOffered()).toBeLessThan(boxes);
      const trade = (await readOffers()).filter(({ kind }) => kind === 'unit' || kind === 'cut');
      expect(trade.map(({ kind, offered, sold }) => ({ kind, offered, sold }))).toEqual([
        { kind: 'cut', offered: 10_000, sold: 10_000 },
        { kind: 'unit', offered: 1, sold: 1 },
      ]);
      expect((await listDays())[0]?.carcases.flatMap(takenHinds)).toHaveLength(1);
      expect(await mailAbout(`Reservation ${asked.reservationNo} is confirmed`)).toContain('Hindquarter');
    },
    SLOW,
  );

  test('the owner’s no is kept with its words and told to the butcher', async () => {
    const asked = await reserve(ask([HIND]));
    const path = `/api/office/reservations/${asked.id}/refuse`;
    const wish = { version: asked.version, answer: 'The hind is kept for the boxes this time.' };
    expect((await world.request(owner).post(path).send(wish)).body).toMatchObject({
      state: 'refused',
      ...answerOf(wish),
    });
    expect(await mailAbout(`Reservation ${asked.reservationNo} for`)).toContain(wish.answer);
    expect((await world.request(owner).post(path).send(wish)).body).toMatchObject({ code: 'STATE_CHANGED' });
  });

  test('after the cut-off, is refused with the time at which it passed', async () => {
    const today = world.clock.today();
    await world.db
      .update(cuttingDay)
      .set({ cutOffAt: londonInstant(addDays(today, -1), '18:00') })
      .where(eq(cuttingDay.id, farm.day.id));
    const answer = await world
      .request(butcher)
      .post('/api/trade/reservations')
      .send(ask([HIND]));
    expect(answer.status).toBe(409);
    expect(answer.body).toMatchObject({ code: 'CUTOFF_PASSED', detail: expect.stringContaining('18:00') as unknown });
    await world.db.update(cuttingDay).set({ cutOffAt: farm.day.cutOffAt }).where(eq(cuttingDay.id, farm.day.id));
  });
});

function answerOf({ answer }: { answer: string }) {
  return { answer };
}

function takenHinds(carcase: TradeDay['carcases'][number]): string[] {
  return carcase.sides.flatMap(({ units }) =>
    units.filter((unit) => unit.unitKind === 'hind' && unit.isTaken).map((unit) => unit.name),
  );
}

describe('reserving, while automatic re-allocation is on', () => {
  beforeAll(() => setAutomatic(true));

  test(
    'is confirmed at once; cancelling frees the piece and has the day worked out again',
    async () => {
      const reserved = await reserve(ask([HIND]));
      expect(reserved).toMatchObject({ state: 'confirmed' });
      expect((await readOffers()).filter(({ kind }) => kind === 'unit')).toHaveLength(2);
      const boxes = await boxesOffered();
      expect((await cancel(reserved)).body).toMatchObject({ state: 'cancelled' });
      expect((await readOffers()).filter(({ kind }) => kind === 'unit')).toHaveLength(1);
      await world.runJobs();
      expect(await boxesOffered()).toBeGreaterThan(boxes);
      expect((await cancel(reserved)).body).toMatchObject({ code: 'STATE_CHANGED' });
    },
    SLOW,
  );

  test(
    'more than there is, is refused with what is still possible, and takes nothing',
    async () => {
      const before = await readOffers();
      const refused = await reserve(ask([HIND, { ...BRISKET, grams: 400_000 }]));
      expect(refused).toMatchObject({
        state: 'refused',
        answer: expect.stringMatching(/Still possible: .*Hindquarter/) as unknown,
      });
      expect(refused.answer).toMatch(/[0-9.]+ kg short/);
      expect(await readOffers()).toEqual(before);
    },
    SLOW,
  );

  test(
    'what is sold or held is never taken',
    async () => {
      const isEveryday = and(eq(offer.cuttingDayId, farm.day.id), eq(offer.boxKindId, farm.everydayId));
      const [everyday] = await world.db.select().from(offer).where(isEveryday);
      const most = everyday?.offered ?? 0;
      expect(most).toBeGreaterThan(1);
      await world.db
        .update(offer)
        .set({ sold: most - 1, held: 1 })
        .where(isEveryday);
      const before = await readOffers();
      // The joints of these boxes lie in the hindquarter that is left.
      const refused = await reserve(ask([HIND]));
      expect(refused).toMatchObject({ state: 'refused' });
      expect(await readOffers()).toEqual(before);
      await world.db.update(offer).set({ sold: 0, held: 0 }).where(isEveryday);
    },
    SLOW,
  );

  test(
    'two butchers at once for the last hindquarter: exactly one gets it',
    async () => {
      const other = await world.signIn('butcher');
      await makeTradeAccount(world.db, other.userId, 'Beck Meats');
      const answers = await Promise.all([reserve(ask([HIND])), reserve(ask([HIND]), other.cookie)]);
      expect(answers.map(({ state }) => state).sort()).toEqual(['confirmed', 'refused']);
      expect((await readOffers()).filter(({ kind }) => kind === 'unit')).toHaveLength(2);
      expect((await listDays())[0]?.carcases.flatMap(takenHinds)).toHaveLength(2);
    },
    SLOW,
  );
});
