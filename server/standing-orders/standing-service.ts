import type { MyStanding, StandingOrder, StartStanding } from '#shared/contracts/standing-orders.ts';
import { formatTime } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import { readCustomerSettings } from '#server/account/customer-settings.ts';
import type { Deps } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import type { Caller } from '#server/http/route.ts';
import { placeOrder } from '#server/orders/place-order.ts';
import { findDay, findSlot } from '#server/orders/stock-queries.ts';
import { beginPaid } from './plan-turns.ts';
import {
  deletePending,
  findBoxOffer,
  insertStanding,
  listStandingOf,
  listTurnsOf,
  lockStanding,
  updateStanding,
} from './standing-queries.ts';
import { skipTurn, viewTurn } from './turn-service.ts';

export async function readMyStanding(deps: Deps, userId: string): Promise<MyStanding> {
  await beginPaid(deps);
  const settings = await readCustomerSettings(deps.db, deps.clock.today());
  const rows = await listStandingOf(deps.db, userId);
  const turns = await listTurnsOf(
    deps.db,
    rows.map(({ standing }) => standing.id),
  );
  const standing = rows.map(({ standing: row, box, pointName }): StandingOrder => {
    const facts = turns.find(({ turn }) => turn.standingOrderId === row.id);
    const { id, quantity, everyWeeks, time, state, nextFrom } = row;
    const turn = facts ? viewTurn(deps, facts) : null;
    return { id, box, quantity, everyWeeks, pointName, time, state, nextFrom, turn };
  });
  return {
    terms: settings.standingTerms,
    reminderDays: { first: settings.standingFirstReminderDays, second: settings.standingSecondReminderDays },
    standing,
  };
}

/** Begins with an order for the chosen day, paid on the company's page; its card is kept for those to come. */
export async function startStanding(
  deps: Deps,
  caller: Caller,
  wish: StartStanding,
): Promise<{ token: string; paymentUrl: string | null }> {
  const { basketKey, slug, quantity, everyWeeks, dayId, slotId, name, phone } = wish;
  const [found, slot, day] = await Promise.all([
    findBoxOffer(deps.db, { slug, dayId }),
    findSlot(deps.db, slotId),
    findDay(deps.db, dayId),
  ]);
  if (!found || !slot || !day) {
    throw new AppError('BASKET_EXPIRED', 'This box or this time is not on sale any more. Nothing was charged.');
  }
  const { standingTerms } = await readCustomerSettings(deps.db, deps.clock.today());
  await insertStanding(deps.db, {
    ...{ userId: caller.id, basketKey, boxKindId: found.boxKindId, quantity, everyWeeks, phone },
    ...{ pointId: slot.pointId, time: formatTime(slot.startsAt), nextFrom: day.day },
    ...{ terms: standingTerms, createdAt: deps.clock.now() },
  });
  const request = {
    basket: {
      ...{ basketKey, dayId, slotId, name, phone, email: caller.email, note: '' },
      lines: [{ offerId: found.offerId, quantity }],
    },
    caller,
    keepsCard: true,
  };
  try {
    const placed = await placeOrder(deps, request);
    return { token: placed.token, paymentUrl: placed.paymentUrl };
  } catch (error) {
    await deletePending(deps.db, basketKey);
    throw error;
  }
}

/** Pausing and ending take effect at once: a box that is kept and not charged yet is skipped. */
export async function setStandingState(
  deps: Deps,
  userId: string,
  { standingId, state }: { standingId: string; state: 'active' | 'paused' | 'ended' },
): Promise<MyStanding> {
  await deps.db.transaction(async (tx) => {
    const standing = await lockStanding(tx, standingId);
    if (standing?.userId !== userId) throw new AppError('NOT_FOUND', 'There is no such standing order.');
    if (standing.state === 'ended' && state !== 'ended') {
      throw new AppError('STATE_CHANGED', 'This standing order has ended. You can start a new one.');
    }
    if (standing.state === 'pending' && state !== 'ended') {
      throw new AppError('STATE_CHANGED', 'This standing order begins once its first order is paid.');
    }
    if (standing.state === state) return;
    await updateStanding(tx, standingId, { state });
    const detail = { from: standing.state, to: state };
    await recordAudit(tx, {
      byUserId: userId,
      action: 'changed',
      subject: 'standing order',
      subjectId: standingId,
      detail,
    });
  });
  if (state !== 'active') {
    for (const facts of await listTurnsOf(deps.db, [standingId])) {
      if (viewTurn(deps, facts).canSkip) await skipTurn(deps, facts.turn.token);
    }
  }
  return readMyStanding(deps, userId);
}
