import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { mailMessage } from '#db/schema/mail.ts';
import { customerOrder, payment } from '#db/schema/orders.ts';
import type { BoxKind, Settings, TodayItem } from '#shared/contracts/office.ts';
import { addDays } from '#shared/domain/day.ts';
import type { Problem } from '#shared/errors.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeBoxKind, makeCarcase, makeCuttingDay, makeFarm, makeSlot } from '#tests/support/make-farm.ts';
import { makeTraditionalCuts, makeTraditionalSide } from '#tests/support/make-specification.ts';

let world: World;
let owner: ReturnType<World['request']>;
let ownerEmail: string;

beforeAll(async () => {
  world = await startWorld();
  await makeFarm(world.db);
  await makeTraditionalCuts(world.db);
  const signedIn = await world.signIn('owner');
  ownerEmail = signedIn.email;
  owner = world.request(signedIn.cookie);
});
afterAll(() => world.stop());

const today = () => world.clock.today();

describe('me', () => {
  test('is nobody before signing in, and the person with their role after', async () => {
    expect((await world.request().get('/api/me').expect(200)).body).toEqual({ user: null });
    const answer = await owner.get('/api/me').expect(200);
    expect(answer.body).toMatchObject({ user: { email: ownerEmail, role: 'owner' } });
  });
});

describe('today', () => {
  const items = async () => ((await owner.get('/api/today').expect(200)).body as { items: TodayItem[] }).items;
  let dayId: string;

  beforeAll(async () => {
    const specificationId = (await makeTraditionalSide(world.db)).id;
    dayId = (await makeCuttingDay(world.db, today(), { specificationId, state: 'open' })).id;
  });

  test('is empty while nothing waits', async () => {
    expect(await items()).toEqual([]);
  });

  test('names the missing kill sheet and the day that is not allocated, each with its link', async () => {
    const carcase = await makeCarcase(world.db, dayId, { killDay: addDays(today(), -2) });
    const found = await items();
    expect(found.find((item) => item.kind === 'kill sheet')?.href).toBe(`/office/carcases/${carcase.id}`);
    expect(found.find((item) => item.kind === 'allocate')?.href).toBe(`/office/cutting-days/${dayId}/allocation`);
  });

  test('names packed orders whose collection mail waits, mails that came back and refunds that failed', async () => {
    const slot = await makeSlot(world.db, dayId, today());
    const [order] = await world.db
      .insert(customerOrder)
      .values({
        token: 'a-token-of-more-than-twenty-letters',
        basketKey: '00000000-0000-4000-8000-000000000001',
        cuttingDayId: dayId,
        slotId: slot.id,
        name: 'Ada Fenwether',
        email: 'ada.fenwether@example.com',
        phone: '07700 900101',
        state: 'packed',
        paymentState: 'paid',
        isHeld: false,
        totalPence: 7_600,
        reachedPaymentAt: world.clock.now(),
      })
      .returning();
    const orderId = order?.id ?? '';
    const [charge] = await world.db
      .insert(payment)
      .values({ orderId, kind: 'charge', reason: 'order', amountPence: 7_600, state: 'done' })
      .returning();
    await world.db.insert(payment).values({
      orderId,
      chargeId: charge?.id ?? '',
      kind: 'refund',
      reason: 'light pack',
      amountPence: 84,
      state: 'failed',
      error: 'Card closed.',
    });
    await world.db.insert(mailMessage).values({
      eventKey: 'collection 1',
      kind: 'collection',
      toAddress: 'ada.fenwether@example.com',
      subject: 'Your beef is ready',
      text: '',
      html: '',
      messageId: '<one@wholeside.example>',
      state: 'bounced',
      lastError: 'Mailbox full.',
    });
    const found = await items();
    expect(found.find((item) => item.kind === 'collection mails')?.title).toContain('1 collection mail');
    expect(found.find((item) => item.kind === 'mail failed')?.detail).toContain('Mailbox full.');
    expect(found.find((item) => item.kind === 'refund failed')?.title).toContain('£0.84');
    const { days } = (await owner.get('/api/today').expect(200)).body as { days: { id: string; soldPence: number }[] };
    expect(days.find((day) => day.id === dayId)?.soldPence).toBe(7_600);
  });

  test('is the owner’s alone', async () => {
    await world.request().get('/api/today').expect(401);
    for (const role of ['customer', 'butcher', 'packer'] as const) {
      const caller = world.request((await world.signIn(role)).cookie);
      for (const path of ['/api/today', '/api/settings', '/api/office/box-kinds']) await caller.get(path).expect(403);
    }
  });
});

describe('a box kind', () => {
  const line = (more = {}) => ({
    name: 'Mince',
    minGrams: 1_200,
    maxGrams: 2_200,
    minPacks: 3,
    maxPacks: 4,
    cutIds: ['mince'],
    ...more,
  });
  const edit = (more = {}) => ({
    version: 1,
    name: 'Hearth',
    summary: 'The everyday mix.',
    guaranteedGrams: 2_000,
    pricePence: 3_400,
    packagingPence: 250,
    demandBoxes: 12,
    isActive: true,
    lines: [
      line(),
      line({ name: 'Steaks', minGrams: 400, maxGrams: 1_200, minPacks: 1, maxPacks: 2, cutIds: ['rump-steak'] }),
    ],
    ...more,
  });
  let made = 0;
  const aBox = () => makeBoxKind(world.db, `box-${(made += 1)}`, { cutIds: ['mince'] });

  test('gets a swap as a copy that is off sale and follows its price, and whose own price is refused', async () => {
    const box = await aBox();
    await owner.put(`/api/office/box-kinds/${box.id}`).send(edit()).expect(200);
    const path = `/api/office/box-kinds/${box.id}/swaps`;
    const swap = (await owner.post(path).send({ name: 'No steak' }).expect(200)).body as BoxKind;
    expect(swap).toMatchObject({
      name: 'No steak',
      swapOfId: box.id,
      isActive: false,
      demandBoxes: 0,
      pricePence: 3_400,
    });
    expect(swap.lines).toEqual(edit().lines);
    expect((await owner.post(path).send({ name: 'no steak' }).expect(409)).body).toMatchObject({
      code: 'ALREADY_KNOWN',
      fields: { name: expect.any(String) as unknown },
    });
    await owner.post(`/api/office/box-kinds/${swap.id}/swaps`).send({ name: 'Deeper' }).expect(409);
    await owner
      .put(`/api/office/box-kinds/${box.id}`)
      .send(edit({ version: 2, pricePence: 3_600 }))
      .expect(200);
    const { boxKinds } = (await owner.get('/api/office/box-kinds').expect(200)).body as { boxKinds: BoxKind[] };
    const followed = boxKinds.find((kind) => kind.id === swap.id);
    expect(followed).toMatchObject({ pricePence: 3_600, version: 2 });
    const own = await owner
      .put(`/api/office/box-kinds/${swap.id}`)
      .send(edit({ version: 2, pricePence: 3_000 }))
      .expect(400);
    expect(own.body).toMatchObject({ fields: { pricePence: expect.any(String) as unknown } });
  });

  test('is edited with its recipe, and listed so', async () => {
    const box = await aBox();
    const answer = await owner.put(`/api/office/box-kinds/${box.id}`).send(edit()).expect(200);
    expect(answer.body).toMatchObject({ ...edit(), id: box.id, slug: box.slug, version: 2 });
    const { boxKinds } = (await owner.get('/api/office/box-kinds').expect(200)).body as { boxKinds: BoxKind[] };
    expect(boxKinds.find((kind) => kind.id === box.id)).toEqual(answer.body);
  });

  test.each([
    ['whose guarantee its lines cannot reach', { guaranteedGrams: 9_000 }],
    [
      'whose line leaves no room for its lightest pack',
      { lines: [line({ minGrams: 2_000, maxGrams: 2_100, minPacks: 0, maxPacks: null })] },
    ],
    [
      'whose line no number of whole packs can meet',
      { lines: [line({ minGrams: 600, maxGrams: 790, minPacks: 2, maxPacks: 2 })], guaranteedGrams: 700 },
    ],
  ])('%s is refused by the engine and stays as it was', async (_name, more) => {
    const box = await aBox();
    const answer = await owner.put(`/api/office/box-kinds/${box.id}`).send(edit(more)).expect(422);
    expect((answer.body as Problem).code).toBe('RECIPE_INFEASIBLE');
    const { boxKinds } = (await owner.get('/api/office/box-kinds').expect(200)).body as { boxKinds: BoxKind[] };
    expect(boxKinds.find((kind) => kind.id === box.id)).toMatchObject({ version: 1, name: box.name });
  });

  test.each([
    ['with a line of no known cut', { lines: [line({ cutIds: ['wing'] })] }, 'lines.0.cutIds'],
    ['whose most is less than its least', { lines: [line({ minGrams: 2_300 })] }, 'lines.0.maxGrams'],
    ['without a price', { pricePence: 0 }, 'pricePence'],
    ['without lines', { lines: [] }, 'lines'],
  ])('%s is refused beside the field', async (_name, more, field) => {
    const box = await aBox();
    const answer = await owner.put(`/api/office/box-kinds/${box.id}`).send(edit(more)).expect(400);
    expect((answer.body as Problem).fields).toHaveProperty([field]);
  });

  test('edited by two owners at once keeps the first and tells the second', async () => {
    const box = await aBox();
    await owner
      .put(`/api/office/box-kinds/${box.id}`)
      .send(edit({ pricePence: 3_500 }))
      .expect(200);
    const answer = await owner
      .put(`/api/office/box-kinds/${box.id}`)
      .send(edit({ pricePence: 1 }))
      .expect(409);
    expect(answer.body).toMatchObject({ code: 'STATE_CHANGED', figures: { yourVersion: 1, presentVersion: 2 } });
    const { boxKinds } = (await owner.get('/api/office/box-kinds').expect(200)).body as { boxKinds: BoxKind[] };
    expect(boxKinds.find((kind) => kind.id === box.id)).toMatchObject({ pricePence: 3_500 });
  });
});

describe('settings', () => {
  test('hold from today on, and a threshold of nothing is refused', async () => {
    const before = (await owner.get('/api/settings').expect(200)).body as Settings;
    // On until a legal check says otherwise.
    expect(before).toMatchObject({ vertebralColumnMonths: 30, isVertebralColumnRuleActive: true });
    const wanted = { ...before, isReallocationAutomatic: true, killPence: 17_250 };
    await owner.put('/api/settings').send(wanted).expect(200);
    expect((await owner.get('/api/settings').expect(200)).body).toEqual(wanted);
    const wrong = await owner
      .put('/api/settings')
      .send({ ...wanted, vertebralColumnMonths: 0 })
      .expect(400);
    expect((wrong.body as Problem).fields).toHaveProperty('vertebralColumnMonths');
    expect((await owner.get('/api/settings').expect(200)).body).toEqual(wanted);
  });
});
