import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { AUTH_ENDPOINTS } from '#server/auth/auth.ts';
import { ROLES, type Role } from '#shared/domain/roles.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeConfirmedOrder, makeStall, type Stall } from '#tests/support/make-order.ts';
import { makeReservation } from '#tests/support/make-reservation.ts';
import { makeTradeAccount } from '#tests/support/make-selling-day.ts';

type Who = Role | 'nobody';

const EVERYONE: Who[] = ['nobody', ...ROLES];
const SIGNED_IN: Who[] = [...ROLES];
const OWNER: Who[] = ['owner'];
const FARM: Who[] = ['owner', 'packer'];
const BUTCHER: Who[] = ['butcher'];

/** Every route of the API and who may call it. A route that is missing here, or one too many, fails the test. */
const MAY_CALL: Record<string, Who[]> = {
  'GET /api/health': EVERYONE,
  'GET /api/me': EVERYONE,
  'GET /api/shop': EVERYONE,
  'GET /api/boxes/:slug': EVERYONE,
  'GET /api/cuts': EVERYONE,
  'GET /api/cutting-days/:dayId/collections': EVERYONE,
  'GET /api/trace/:code': EVERYONE,
  'POST /api/basket': EVERYONE,
  'POST /api/orders': EVERYONE,
  'GET /api/orders/:token': EVERYONE,
  'GET /api/orders/:token/calendar.ics': EVERYONE,
  'POST /api/orders/:token/leave-payment': EVERYONE,
  'POST /api/orders/:token/cancel': EVERYONE,
  'POST /api/orders/:token/slot': EVERYONE,
  'POST /api/orders/:token/swap': EVERYONE,
  'POST /api/orders/:token/additions': EVERYONE,
  'POST /api/orders/:token/leave-addition': EVERYONE,
  'GET /api/orders/:token/balance': EVERYONE,
  'POST /api/orders/:token/balance': EVERYONE,
  'POST /api/orders/:token/balance-page': EVERYONE,
  'POST /api/promo-checks': EVERYONE,
  'GET /api/delivery': EVERYONE,
  'GET /api/office/promo-codes': OWNER,
  'POST /api/office/promo-codes': OWNER,
  'POST /api/office/promo-codes/:promoId/close': OWNER,
  'GET /api/office/delivery-areas': OWNER,
  'POST /api/office/delivery-areas': OWNER,
  'PUT /api/office/delivery-areas/:areaId': OWNER,
  'GET /api/my/orders': SIGNED_IN,
  'GET /api/my/details': SIGNED_IN,
  'PUT /api/my/details': SIGNED_IN,
  'PUT /api/my/news': SIGNED_IN,
  'GET /api/my/data.json': SIGNED_IN,
  'POST /api/my/close': ['customer'],
  'POST /api/account/close': EVERYONE,
  'GET /api/orders/:token/again': EVERYONE,
  'GET /api/orders/:token/receipt.pdf': EVERYONE,
  'GET /api/orders/:token/feedback': EVERYONE,
  'PUT /api/orders/:token/feedback': EVERYONE,
  'GET /api/office/feedback': OWNER,
  'GET /api/my/standing-orders': SIGNED_IN,
  'POST /api/my/standing-orders': ['customer'],
  'PUT /api/my/standing-orders/:standingId/state': SIGNED_IN,
  'GET /api/standing-turns/:token': EVERYONE,
  'POST /api/standing-turns/:token/skip': EVERYONE,
  'POST /api/standing-turns/:token/pay': EVERYONE,
  'GET /api/boxes/:slug/photographs': EVERYONE,
  'GET /api/photographs/:hash': EVERYONE,
  'GET /api/office/box-kinds/:boxKindId/photographs': OWNER,
  'POST /api/office/box-kinds/:boxKindId/photographs': OWNER,
  'DELETE /api/office/photographs/:photographId': OWNER,
  'POST /api/waiting-list': EVERYONE,
  'GET /api/waiting-list/:token': EVERYONE,
  'POST /api/waiting-list/:token/confirm': EVERYONE,
  'POST /api/waiting-list/:token/leave': EVERYONE,
  'GET /api/office/waiting-list': OWNER,
  'GET /api/unsubscribe/:token': EVERYONE,
  'POST /api/unsubscribe/:token': EVERYONE,
  'POST /unsubscribe/:token': EVERYONE,
  'GET /api/office/customer-settings': OWNER,
  'PUT /api/office/customer-settings': OWNER,
  'GET /api/trade/account': SIGNED_IN,
  'POST /api/trade/account': ['customer', 'butcher'],
  'GET /api/trade/days': BUTCHER,
  'GET /api/trade/reservations': BUTCHER,
  'POST /api/trade/reservations': BUTCHER,
  'POST /api/trade/reservations/:reservationId/cancel': BUTCHER,
  'GET /api/office/reservations': OWNER,
  'POST /api/office/reservations/:reservationId/confirm': OWNER,
  'POST /api/office/reservations/:reservationId/refuse': OWNER,
  'POST /api/office/reservations/:reservationId/dispatch': OWNER,
  'GET /api/office/trade-accounts': OWNER,
  'POST /api/office/trade-accounts/:accountId/decision': OWNER,
  'PUT /api/office/trade-accounts/:accountId/prices': OWNER,
  'GET /api/animals': OWNER,
  'POST /api/animals': OWNER,
  'PUT /api/animals/:animalId': OWNER,
  'POST /api/animals/:animalId/medicines': OWNER,
  'GET /api/cutting-days': FARM,
  'POST /api/cutting-days': OWNER,
  'GET /api/cutting-days/:dayId': FARM,
  'POST /api/cutting-days/:dayId/close': OWNER,
  'GET /api/collection-points': OWNER,
  'POST /api/carcases': OWNER,
  'GET /api/carcases/:carcaseId': OWNER,
  'PUT /api/carcases/:carcaseId/kill-sheet': OWNER,
  'PUT /api/carcases/:carcaseId/weights': OWNER,
  'GET /api/specifications': OWNER,
  'GET /api/specifications/:specificationId': OWNER,
  'POST /api/specifications': OWNER,
  'POST /api/specifications/copies': OWNER,
  'POST /api/specifications/:specificationId/restore': OWNER,
  'PUT /api/specifications/:specificationId/retirement': OWNER,
  'GET /api/specifications/:specificationId/correction': OWNER,
  'POST /api/specifications/:specificationId/correction': OWNER,
  'GET /api/cutting-days/:dayId/comparison': OWNER,
  'PUT /api/cutting-days/:dayId/specification': OWNER,
  'GET /api/cutting-days/:dayId/allocation': OWNER,
  'POST /api/cutting-days/:dayId/plan-jobs': OWNER,
  'POST /api/cutting-days/:dayId/what-if-jobs': OWNER,
  'GET /api/plan-jobs/:jobId': OWNER,
  'GET /api/shortfalls': OWNER,
  'POST /api/shortfalls/refund': OWNER,
  'POST /api/shortfalls/swap': OWNER,
  'POST /api/plan-jobs/:jobId/cancel': OWNER,
  'POST /api/allocations/:allocationId/publish': OWNER,
  'GET /api/allocations/:allocationId/model.lp': OWNER,
  'GET /api/allocations/:allocationId/model.mps': OWNER,
  'GET /api/cutting-days/:dayId/packing': FARM,
  'POST /api/cutting-days/:dayId/packs': FARM,
  'PUT /api/packs/:packId/weight': FARM,
  'POST /api/packs/:packId/lose': FARM,
  'POST /api/cutting-days/:dayId/fill': FARM,
  'POST /api/cutting-days/:dayId/orders/:orderNo/pack-short': OWNER,
  'GET /api/cutting-days/:dayId/collection-mails': OWNER,
  'POST /api/cutting-days/:dayId/collection-mails': OWNER,
  'GET /api/mails': OWNER,
  'POST /api/mails/:mailId/resend': OWNER,
  'GET /api/cutting-days/:dayId/run-sheet': FARM,
  'POST /api/office/orders/:orderId/state': FARM,
  'GET /api/office/orders': OWNER,
  'POST /api/office/orders/:orderId/cancel': OWNER,
  'GET /api/office/failed-refunds': OWNER,
  'POST /api/office/failed-refunds/:paymentId/retry': OWNER,
  'GET /api/today': OWNER,
  'GET /api/office/box-kinds': OWNER,
  'PUT /api/office/box-kinds/:boxKindId': OWNER,
  'POST /api/office/box-kinds/:boxKindId/swaps': OWNER,
  'GET /api/price-grids': OWNER,
  'POST /api/price-grids': OWNER,
  'GET /api/cutting-days/:dayId/margin': OWNER,
  'GET /api/settings': OWNER,
  'PUT /api/settings': OWNER,
};

/** The endpoints of better-auth that the app uses; all its others must be closed. */
const AUTH_MAY_CALL: Record<string, Who[]> = {
  '/sign-up/email': EVERYONE,
  '/sign-in/email': EVERYONE,
  '/sign-out': EVERYONE,
  '/get-session': EVERYONE,
  '/verify-email': EVERYONE,
  '/send-verification-email': EVERYONE,
  '/request-password-reset': EVERYONE,
  '/reset-password/:token': EVERYONE,
  '/reset-password': EVERYONE,
  '/change-password': SIGNED_IN,
};

let world: World;
let stall: Stall;
const cookies = new Map<Who, string>();

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world);
  for (const role of ROLES) {
    const { userId, cookie } = await world.signIn(role);
    cookies.set(role, cookie);
    if (role === 'butcher') await makeTradeAccount(world.db, userId);
  }
});
afterAll(() => world.stop());

function fill(path: string): string {
  return path.replaceAll(/:[a-zA-Z]+/g, () => randomUUID());
}

type Method = 'get' | 'post' | 'put' | 'delete';

async function knock(who: Who, method: string, path: string): Promise<number> {
  const call = world.request(cookies.get(who))[method.toLowerCase() as Method](fill(path)).redirects(0);
  if (method === 'GET') return (await call).status;
  const body = path.endsWith('/change-password')
    ? { currentPassword: 'not this one', newPassword: 'nor that one' }
    : {};
  return (await call.set('Origin', world.origin).send(body)).status;
}

test('each route answers 401 to nobody and 403 to a role exactly where the table says so', async () => {
  const routes = world.endpoints.map(({ method, path }) => `${method} ${path}`);
  expect([...routes].sort()).toEqual(Object.keys(MAY_CALL).sort());
  const wrong: string[] = [];
  for (const [route, allowed] of Object.entries(MAY_CALL)) {
    const [method = '', path = ''] = route.split(' ');
    for (const who of EVERYONE) {
      const status = await knock(who, method, path);
      const isRefused = status === 401 || status === 403;
      const expected = who === 'nobody' ? 401 : 403;
      const isRight = allowed.includes(who) ? !isRefused && status < 500 : status === expected;
      if (!isRight) wrong.push(`${route} as ${who}: ${status}`);
    }
  }
  expect(wrong).toEqual([]);
});

type AuthEndpoint = { path?: string; options?: { method?: string | string[] } };

test('the sign-in library answers only at the endpoints that the app uses', async () => {
  expect(Object.keys(AUTH_ENDPOINTS).sort()).toEqual(Object.keys(AUTH_MAY_CALL).sort());
  const wrong: string[] = [];
  const seen = new Set<string>();
  for (const { path, options } of Object.values(world.deps.auth.api as Record<string, AuthEndpoint>)) {
    if (!path) continue;
    seen.add(path);
    const allowed = AUTH_MAY_CALL[path];
    for (const method of [options?.method ?? 'GET'].flat()) {
      // The last to knock signs nobody out who is still to come.
      const callers: Who[] = path === '/sign-out' ? ['nobody'] : EVERYONE;
      for (const who of callers) {
        const status = await knock(who, method, `/api/auth${path}`);
        const isOpen = status !== 404 && status < 500;
        const isRight = !allowed ? status === 404 : allowed.includes(who) ? isOpen && status !== 401 : status === 401;
        if (!isRight) wrong.push(`${method} ${path} as ${who}: ${status}`);
      }
    }
  }
  expect(wrong).toEqual([]);
  expect(Object.keys(AUTH_MAY_CALL).filter((path) => !seen.has(path))).toEqual([]);
});

describe('people who hold the same role', () => {
  test('as customers, see their own orders only', async () => {
    const ada = await world.signIn('customer');
    const bess = await world.signIn('customer');
    const order = await makeConfirmedOrder(world, stall, { email: ada.email }, ada.cookie);
    const seen = (await world.request(ada.cookie).get('/api/my/orders')).body as { orders: { orderNo: number }[] };
    expect(seen.orders.map((each) => each.orderNo)).toEqual([order.orderNo]);
    expect((await world.request(bess.cookie).get('/api/my/orders')).body).toEqual({ orders: [] });
    const byOwner = await world.request(bess.cookie).post(`/api/office/orders/${order.id}/cancel`).send({});
    expect(byOwner.status).toBe(403);
  });

  test('with the link of an order, open exactly that order', async () => {
    const one = await makeConfirmedOrder(world, stall);
    const other = await makeConfirmedOrder(world, stall);
    expect((await world.request().get(`/api/orders/${one.token}`)).body).toMatchObject({ orderNo: one.orderNo });
    expect((await world.request().get(`/api/orders/${other.token}`)).body).toMatchObject({ orderNo: other.orderNo });
    const changed = `${one.token.slice(0, -1)}${one.token.endsWith('A') ? 'B' : 'A'}`;
    for (const guess of [changed, one.id, String(one.orderNo), one.token.toLowerCase() + one.token, '%00']) {
      const answer = await world.request().get(`/api/orders/${guess}`);
      expect(answer.status, guess).toBe(404);
    }
    expect(one.token.length).toBeGreaterThanOrEqual(22);
  });

  test('as butchers, see and cancel their own reservations only', async () => {
    const [first, second] = [await world.signIn('butcher'), await world.signIn('butcher')];
    const accountId = await makeTradeAccount(world.db, first.userId, 'Fellside Butchers');
    await makeTradeAccount(world.db, second.userId, 'Gill & Beck');
    const own = await makeReservation(world.db, { accountId, cuttingDayId: stall.day.id, state: 'asked' });
    const list = async (cookie: string) => (await world.request(cookie).get('/api/trade/reservations')).body as unknown;
    expect(await list(first.cookie)).toMatchObject({ reservations: [{ id: own.id }] });
    expect(await list(second.cookie)).toEqual({ reservations: [] });
    const path = `/api/trade/reservations/${own.id}/cancel`;
    expect((await world.request(second.cookie).post(path).send({ version: own.version })).status).toBe(404);
    expect(await list(first.cookie)).toMatchObject({ reservations: [{ state: 'asked' }] });
    const account = await world.request(second.cookie).get('/api/trade/account');
    expect(account.body).toMatchObject({ account: { businessName: 'Gill & Beck' } });
  });

  test('as a butcher whose account is not approved, may not see the coming days', async () => {
    const { cookie } = await world.signIn('butcher');
    const answer = await world.request(cookie).get('/api/trade/days');
    expect(answer.status).toBe(403);
    expect(answer.body).toMatchObject({ code: 'FORBIDDEN' });
  });
});
