import type { StandingTurn } from '#shared/contracts/standing-orders.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { cancelOrder } from '#server/orders/cancel-order.ts';
import { listLines, lockOrder, updateOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { placeOrder } from '#server/orders/place-order.ts';
import { releaseHold } from '#server/payments/settle-page.ts';
import { finish } from './finish-turn.ts';
import { findTurn, lockTurn, type TurnFacts } from './standing-queries.ts';

export function viewTurn(deps: Deps, { turn, standing, order, box, day, cutOffAt }: TurnFacts): StandingTurn {
  const now = deps.clock.now();
  const { state, token, chargeAt } = turn;
  return {
    ...{ token, state, box, day },
    orderToken: order.token,
    quantity: standing.quantity,
    totalPence: order.totalPence,
    chargeAt: chargeAt.toISOString(),
    cutOffAt: cutOffAt.toISOString(),
    canSkip: (state === 'planned' && now < chargeAt) || (state === 'failed' && now < cutOffAt),
  };
}

async function getTurn(deps: Deps, token: string): Promise<TurnFacts> {
  const facts = await findTurn(deps.db, { token });
  if (!facts) throw new AppError('NOT_FOUND', 'This link is not known here. Please open it from the mail once more.');
  return facts;
}

export async function readTurn(deps: Deps, token: string): Promise<StandingTurn> {
  return viewTurn(deps, await getTurn(deps, token));
}

/** Skips one box until its charge; the standing order goes on with the next. Pressed again, it changes nothing. */
export async function skipTurn(deps: Deps, token: string): Promise<StandingTurn> {
  const facts = await getTurn(deps, token);
  if (facts.turn.state === 'skipped') return viewTurn(deps, facts);
  if (!viewTurn(deps, facts).canSkip) {
    throw new AppError(
      'CUTOFF_PASSED',
      `This box could be skipped until ${formatDayTime(facts.turn.chargeAt)}. Nothing was changed; the order's own page may still let you cancel it.`,
    );
  }
  await dropOrder(deps, facts.order);
  await deps.db.transaction(async (tx) => {
    const turn = await lockTurn(tx, facts.turn.id);
    if (turn && (turn.state === 'planned' || turn.state === 'failed')) {
      await finish(tx, { turnId: turn.id, state: 'skipped' });
    }
  });
  return readTurn(deps, token);
}

/** Frees what the order of a turn holds. One that is on its way to payment by hand is cancelled like any other. */
export async function dropOrder(deps: Deps, order: OrderRow): Promise<void> {
  if (order.sessionId) {
    await cancelOrder(deps, order.token);
    return;
  }
  await deps.db.transaction(async (tx) => {
    const current = await lockOrder(tx, { id: order.id });
    if (current?.state !== 'awaiting payment') return;
    const released = current.isHeld ? await releaseHold(tx, current) : current;
    await updateOrder(tx, order.id, { state: 'cancelled', version: released.version + 1 });
  });
}

/** The payment company's page for a box whose card was refused; the card that pays it is kept for the next ones. */
export async function payTurn(deps: Deps, token: string): Promise<{ paymentUrl: string | null }> {
  const { turn, order } = await getTurn(deps, token);
  if (turn.state !== 'failed' || order.state !== 'awaiting payment') {
    throw new AppError('STATE_CHANGED', 'There is nothing to pay by hand for this box. Nothing was charged.');
  }
  const lines = await listLines(deps.db, order.id);
  const { basketKey, slotId, name, email, phone, note } = order;
  const placed = await placeOrder(deps, {
    basket: {
      ...{ basketKey, slotId, name, email, phone, note, dayId: order.cuttingDayId },
      lines: lines.map(({ offerId, quantity }) => ({ offerId, quantity })),
    },
    caller: null,
  });
  return { paymentUrl: placed.paymentUrl };
}
