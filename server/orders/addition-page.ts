import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import {
  asPaymentsDown,
  createAdditionPage,
  endPaymentPage,
  getPaymentPage,
  isOutage,
} from '#server/payments/payment-page.ts';
import { releaseAddition } from '#server/payments/settle-addition.ts';
import { settlePage } from '#server/payments/settle-page.ts';
import {
  findOpenAddition,
  listAdditionLines,
  lockAddition,
  storeAdditionPage,
  type AdditionRow,
} from './addition-queries.ts';
import { findOrder, lockOrder } from './order-queries.ts';
import { noSuchOrder } from './read-order.ts';

/** Outside any transaction: the stock is held, and the page is asked for under the addition's own key. */
export async function openAdditionPage(deps: Deps, addition: AdditionRow): Promise<void> {
  if (addition.sessionId) return;
  try {
    await keepPage(deps, addition);
  } catch (error) {
    if (error instanceof AppError) throw error;
    await releaseUnpaged(deps, addition);
    throw asPaymentsDown(error, 'Nothing was charged and your order is as it was; please try again in a minute.');
  }
}

async function keepPage(deps: Deps, addition: AdditionRow) {
  const order = await findOrder(deps.db, { id: addition.orderId });
  if (!order) throw noSuchOrder();
  const lines = await listAdditionLines(deps.db, addition.id);
  const page = await createAdditionPage(deps, { ...addition, order, lines });
  const stored = { id: page.id, url: page.url, expiresAt: new Date(page.expires_at * 1000) };
  if (await storeAdditionPage(deps.db, addition.id, stored)) return page;
  // Given up in another tab while the page was made: nobody may pay on it.
  await endPaymentPage(deps, page.id);
  throw new AppError('STATE_CHANGED', 'This was given up in another tab. Nothing was charged; please try again.');
}

/**
 * Ends the page of an open addition and gives back what it held; one that was paid meanwhile joins the order instead.
 */
export async function closeAddition(deps: Deps, orderId: string): Promise<void> {
  const addition = await findOpenAddition(deps.db, orderId);
  if (!addition) return;
  try {
    await endAdditionPage(deps, addition);
  } catch (error) {
    throw asPaymentsDown(error, 'Your order is kept as it is; please try again in a minute.');
  }
}

async function endAdditionPage(deps: Deps, addition: AdditionRow): Promise<void> {
  const sessionId = addition.sessionId ?? (await findUnknownPage(deps, addition));
  if (!sessionId) return;
  const page = await endPaymentPage(deps, sessionId);
  await deps.db.transaction((tx) => settlePage(tx, deps, page));
}

/** The process died between the hold and the page: the idempotency key finds the page if there is one. */
async function findUnknownPage(deps: Deps, addition: AdditionRow): Promise<string | null> {
  try {
    return (await keepPage(deps, addition)).id;
  } catch (error) {
    if (isOutage(error)) throw error;
    // Refused: with so little time left no page can be made any more, and none was made before.
    await releaseUnpaged(deps, addition);
    return null;
  }
}

async function releaseUnpaged(deps: Deps, { id, orderId }: AdditionRow): Promise<void> {
  await deps.db.transaction(async (tx) => {
    await lockOrder(tx, { id: orderId });
    const addition = await lockAddition(tx, id);
    if (addition?.state === 'open' && !addition.sessionId) await releaseAddition(tx, addition);
  });
}

/** Asks the payment company how an addition stands whose word may have been lost. */
export async function sweepAddition(deps: Deps, addition: AdditionRow): Promise<void> {
  if (!addition.sessionId) {
    await endAdditionPage(deps, addition);
    return;
  }
  const page = await getPaymentPage(deps, addition.sessionId);
  await deps.db.transaction((tx) => settlePage(tx, deps, page));
}
