import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { user } from '#db/schema/auth.ts';
import type { TradeAccount } from '#shared/contracts/trade.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeCutsOfTheSide, makeTradeAccount } from '#tests/support/make-selling-day.ts';

const TEXT: unknown = expect.any(String);

let world: World;
let owner: string;

beforeAll(async () => {
  world = await startWorld();
  await makeCutsOfTheSide(world.db);
  owner = (await world.signIn('owner')).cookie;
});
afterAll(() => world.stop());

describe('a trade account', () => {
  const application = { businessName: 'Gill & Beck', addressLines: ['2 Beck Row', 'ZZ3 3AA'], phone: '01632 960300' };

  test('applied for and approved, makes its person a butcher; a refusal takes that back', async () => {
    const person = await world.signIn('customer');
    const applied = (await world.request(person.cookie).post('/api/trade/account').send(application))
      .body as TradeAccount;
    expect(applied).toMatchObject({ ...application, state: 'applied', prices: [], email: person.email });
    expect((await world.request(person.cookie).get('/api/trade/days')).status).toBe(403);

    const path = `/api/office/trade-accounts/${applied.id}/decision`;
    const wish = { version: applied.version, state: 'approved' };
    const approved = (await world.request(owner).post(path).send(wish)).body as TradeAccount;
    expect(approved).toMatchObject({ state: 'approved' });
    expect(await roleOf(person.userId)).toBe('butcher');
    expect((await world.request(person.cookie).get('/api/trade/days')).status).toBe(200);

    const stale = await world.request(owner).post(path).send({ version: applied.version, state: 'refused' });
    expect(stale.body).toMatchObject({ code: 'STATE_CHANGED' });
    expect(await roleOf(person.userId)).toBe('butcher');
    await world.request(owner).post(path).send({ version: approved.version, state: 'refused' });
    expect(await roleOf(person.userId)).toBe('customer');
  });

  test('with a telephone number in letters or an unknown field, is refused beside the field and not kept', async () => {
    const person = await world.signIn('customer');
    const bad = { ...application, phone: 'ring me', isApproved: true };
    const answer = await world.request(person.cookie).post('/api/trade/account').send(bad);
    expect(answer.status).toBe(400);
    expect(answer.body).toMatchObject({ fields: { phone: TEXT } });
    expect((await world.request(person.cookie).get('/api/trade/account')).body).toEqual({ account: null });
  });

  test('keeps a price list of its own, each product once', async () => {
    const person = await world.signIn('butcher');
    const id = await makeTradeAccount(world.db, person.userId, 'Rigg Meats');
    const path = `/api/office/trade-accounts/${id}/prices`;
    const price = { product: 'side', tenthPencePerKg: 6_100, basis: 'cold weight' };
    const twice = await world
      .request(owner)
      .put(path)
      .send({ version: 1, prices: [price, price] });
    expect(twice.body).toMatchObject({ code: 'INVALID_INPUT', fields: { 'prices.1.product': TEXT } });
    const unknown = { ...price, product: 'cut:unicorn' };
    const wrong = await world
      .request(owner)
      .put(path)
      .send({ version: 1, prices: [unknown] });
    expect(wrong.body).toMatchObject({ fields: { 'prices.0.product': 'There is no such product.' } });
    const kept = await world
      .request(owner)
      .put(path)
      .send({ version: 1, prices: [price] });
    expect(kept.body).toMatchObject({ prices: [{ ...price, name: 'Side' }] });
  });
});

async function roleOf(userId: string): Promise<string | undefined> {
  const [row] = await world.db.select({ role: user.role }).from(user).where(eq(user.id, userId));
  return row?.role ?? undefined;
}
