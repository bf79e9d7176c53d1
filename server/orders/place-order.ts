import { randomBytes } from 'node:crypto';
import type { Answer } from '#shared/contracts/endpoint.ts';
import type { Checkout } from '#shared/contracts/orders.ts';
import type { placeOrderSchema } from '#shared/contracts/orders-schema.ts';
import { AppError } from '#shared/errors.ts';
import { recordConsent } from '#server/account/consent.ts';
import type { Deps } from '#server/deps.ts';
import type { Caller } from '#server/http/route.ts';
import { asPaymentsDown, createPaymentPage, endPaymentPage, isRefusedEmail } from '#server/payments/payment-page.ts';
import { endUnknownPage, releaseUnpaged } from '#server/payments/payment-service.ts';
import { releaseHold, settlePage } from '#server/payments/settle-page.ts';
import { detailsOf, getPlaceInTime, holdBasket, isSame } from './hold-basket.ts';
import {
  findOrder,
  insertOrder,
  listLines,
  lockOrder,
  storeSession,
  updateOrder,
  type OrderRow,
} from './order-queries.ts';

type Placed = Answer<typeof placeOrderSchema>;
/** `keepsCard`: a standing order begins with this one. */
type Request = { basket: Checkout; caller: Caller | null; keepsCard?: boolean };

/** Presses that cross each other look again; more than this many would be no person. */
const MOST_LOOKS = 5;
const NO_PAGE_YET_MS = 45_000;

/**
 * Holds a basket and makes the page where it is paid. The browser's basket key stands for the order: a second press, a
 * second tab or a lost answer finds the first order and its page again.
 */
export async function placeOrder(deps: Deps, request: Request): Promise<Placed> {
  for (let look = 0; look < MOST_LOOKS; look += 1) {
    const known = await findOrder(deps.db, { basketKey: request.basket.basketKey });
    const placed = known ? await resume(deps, known, request) : await start(deps, request);
    if (placed) return placed;
  }
  throw new AppError(
    'STATE_CHANGED',
    'This basket is being paid in another tab. Nothing was charged; look there first.',
  );
}

/** Null: another press came first. */
async function start(deps: Deps, { basket, caller, keepsCard = false }: Request): Promise<Placed | null> {
  const order = await deps.db.transaction(async (tx) => {
    const place = await getPlaceInTime(tx, deps, basket);
    const order = await insertOrder(tx, {
      token: randomBytes(24).toString('base64url'),
      basketKey: basket.basketKey,
      userId: caller?.id ?? null,
      keepsCard,
      ...detailsOf(basket),
      slotId: place.slotId,
      // The sum is known once the lines are taken, a moment later and in the same transaction.
      totalPence: 1,
      reachedPaymentAt: deps.clock.now(),
    });
    if (order && basket.wantsNews) await recordConsent(tx, deps, { ...basket, isGiven: true, source: 'checkout' });
    return order && holdBasket(tx, deps, { order, basket, place });
  });
  return order && openPage(deps, order);
}

/** An order that has been to payment before. Null: it has moved on meanwhile, look again. */
async function resume(deps: Deps, known: OrderRow, request: Request): Promise<Placed | null> {
  if (known.state === 'cancelled') {
    throw new AppError(
      'BASKET_EXPIRED',
      'The order of this basket was cancelled. Nothing was charged now; please fill a new basket.',
    );
  }
  if (known.state !== 'awaiting payment') return answer(known);
  if (known.isHeld) {
    if (isAlive(deps, known) && (await isSame(deps, known, request.basket))) return openPage(deps, known);
    const closed = await closePage(deps, known);
    if (closed.state !== 'awaiting payment') return answer(closed);
  }
  const order = await holdAgain(deps, known, request);
  return order && openPage(deps, order);
}

/** Without a page yet, an attempt is young enough for one: the company takes no page with less than 30 minutes to go. */
function isAlive(deps: Deps, order: OrderRow): boolean {
  const end = order.sessionExpiresAt?.getTime() ?? order.reachedPaymentAt.getTime() + NO_PAGE_YET_MS;
  return deps.clock.now().getTime() < end;
}

/** What was held before is given back and the new basket taken, in one go. */
async function holdAgain(deps: Deps, known: OrderRow, { basket, caller }: Request): Promise<OrderRow | null> {
  return deps.db.transaction(async (tx) => {
    const order = await lockOrder(tx, { id: known.id });
    if (!order || order.version !== known.version || order.state !== 'awaiting payment' || order.isHeld) return null;
    const place = await getPlaceInTime(tx, deps, basket);
    const again = await updateOrder(tx, order.id, {
      ...detailsOf(basket),
      slotId: place.slotId,
      userId: caller?.id ?? order.userId,
      isHeld: true,
      version: order.version + 1,
      reachedPaymentAt: deps.clock.now(),
      ...{ sessionId: null, sessionUrl: null, sessionExpiresAt: null },
    });
    if (basket.wantsNews) await recordConsent(tx, deps, { ...basket, isGiven: true, source: 'checkout' });
    return holdBasket(tx, deps, { order: again, basket, place });
  });
}

/** Outside any transaction: the stock is held, and the page is asked for under the attempt's own key. */
async function openPage(deps: Deps, order: OrderRow): Promise<Placed> {
  if (order.sessionId && order.sessionUrl) return answer(order);
  const attempt = { orderId: order.id, version: order.version };
  const page = await makePage(deps, order);
  const isKept = await storeSession(deps.db, attempt, {
    id: page.id,
    url: page.url,
    expiresAt: new Date(page.expires_at * 1000),
  });
  if (isKept) return answer({ ...order, sessionUrl: page.url });
  // Given back or changed in another tab while the page was made: nobody may pay on it.
  await endPaymentPage(deps, page.id);
  throw new AppError('STATE_CHANGED', 'This basket changed in another tab. Nothing was charged; please try again.');
}

async function makePage(deps: Deps, order: OrderRow) {
  try {
    return await createPaymentPage(deps, { ...order, lines: await listLines(deps.db, order.id) });
  } catch (error) {
    await releaseUnpaged(deps, order);
    if (isRefusedEmail(error)) {
      throw new AppError(
        'INVALID_INPUT',
        'The payment company does not take this e-mail address. Nothing was charged.',
        {
          fields: { email: 'Please check this address.' },
        },
      );
    }
    throw asPaymentsDown(error, 'Nothing was charged and your basket is kept; please try again in a minute.');
  }
}

function answer(order: OrderRow): Placed {
  const { orderNo, token, state } = order;
  return { orderNo, token, state, paymentUrl: state === 'awaiting payment' ? order.sessionUrl : null };
}

/**
 * Ends the payment page of an open checkout and gives back what it held; a page that was paid meanwhile confirms the
 * order instead. The order comes back as it stands then.
 */
export async function closePage(deps: Deps, order: OrderRow): Promise<OrderRow> {
  if (!order.isHeld) return order;
  try {
    if (!order.sessionId) {
      await endUnknownPage(deps, order);
      return (await findOrder(deps.db, { id: order.id })) ?? order;
    }
    const page = await endPaymentPage(deps, order.sessionId);
    return await deps.db.transaction(async (tx) => {
      await settlePage(tx, deps, page);
      const settled = await lockOrder(tx, { id: order.id });
      if (!settled) throw new Error(`The order ${order.id} has gone.`);
      const isEnded = page.status === 'expired' && settled.version === order.version;
      return settled.isHeld && isEnded ? releaseHold(tx, settled) : settled;
    });
  } catch (error) {
    throw asPaymentsDown(error, 'Your order is kept as it is; please try again in a minute.');
  }
}
