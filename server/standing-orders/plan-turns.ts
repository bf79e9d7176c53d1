import { randomBytes, randomUUID } from 'node:crypto';
import { addDays } from '#shared/domain/day.ts';
import { formatTime } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import { readCustomerSettings } from '#server/account/customer-settings.ts';
import type { Deps } from '#server/deps.ts';
import { detailsOf, getPlaceInTime, holdBasket } from '#server/orders/hold-basket.ts';
import { insertOrder } from '#server/orders/order-queries.ts';
import {
  insertTurn,
  listCandidates,
  listPending,
  listRoomyTimes,
  listUnplanned,
  lockStanding,
  updateStanding,
} from './standing-queries.ts';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
/** A first order that was not paid within a day begins nothing. */
const PENDING_MS = DAY_MS;

/** A standing order begins once its first order is paid and the card of it is kept. */
export async function beginPaid(deps: Deps): Promise<void> {
  const now = deps.clock.now();
  for (const { standing, order, day } of await listPending(deps.db)) {
    const { providerCustomerId, providerMethodId } = order;
    const isPaid = order.state !== 'awaiting payment' && order.state !== 'cancelled';
    const isGivenUp = !order.isHeld && !isPaid && now.getTime() - standing.createdAt.getTime() > PENDING_MS;
    await deps.db.transaction(async (tx) => {
      const row = await lockStanding(tx, standing.id);
      if (row?.state !== 'pending') return;
      if (isPaid && providerCustomerId && providerMethodId) {
        const nextFrom = addDays(day, 7 * row.everyWeeks);
        await updateStanding(tx, row.id, { state: 'active', nextFrom, providerCustomerId, providerMethodId });
      } else if (isGivenUp || order.state === 'cancelled') {
        await updateStanding(tx, row.id, { state: 'ended' });
      }
    });
  }
}

/**
 * Puts the next box of each standing order on the next cutting day that is due: an order that holds its stock and its
 * time, and waits for its charge. A day that leaves no room for both reminders is passed over.
 */
export async function planTurns(deps: Deps): Promise<void> {
  const settings = await readCustomerSettings(deps.db, deps.clock.today());
  const leadMs = settings.standingChargeHours * HOUR_MS + settings.standingSecondReminderDays * DAY_MS + DAY_MS;
  const closesAfter = new Date(deps.clock.now().getTime() + leadMs);
  for (const due of await listUnplanned(deps.db)) {
    for (const candidate of await listCandidates(deps.db, due.standing, closesAfter)) {
      const chargeAt = new Date(candidate.cutOffAt.getTime() - settings.standingChargeHours * HOUR_MS);
      if (await planOn(deps, due, { ...candidate, chargeAt })) break;
    }
  }
}

type Due = Awaited<ReturnType<typeof listUnplanned>>[number];
type Candidate = Awaited<ReturnType<typeof listCandidates>>[number] & { chargeAt: Date };

/** False: somebody was quicker, or no time has room; the next day is looked at. */
async function planOn(deps: Deps, { standing, name, email }: Due, candidate: Candidate): Promise<boolean> {
  const { dayId, offerId, chargeAt } = candidate;
  const times = await listRoomyTimes(deps.db, { dayId, pointId: standing.pointId });
  const slot = times.find(({ startsAt }) => formatTime(startsAt) >= standing.time) ?? times.at(-1);
  if (!slot) return false;
  const basket = {
    ...{ basketKey: randomUUID(), dayId, slotId: slot.id, name, email, phone: standing.phone },
    lines: [{ offerId, quantity: standing.quantity }],
    note: '',
  };
  try {
    return await deps.db.transaction(async (tx) => {
      const row = await lockStanding(tx, standing.id);
      if (row?.state !== 'active') return false;
      const place = await getPlaceInTime(tx, deps, basket);
      const order = await insertOrder(tx, {
        ...detailsOf(basket),
        ...{ token: newToken(), basketKey: basket.basketKey, userId: standing.userId, slotId: slot.id },
        ...{ keepsCard: true, totalPence: 1, reachedPaymentAt: deps.clock.now() },
      });
      if (!order) return false;
      await holdBasket(tx, deps, { order, basket, place });
      const turn = { standingOrderId: standing.id, cuttingDayId: dayId, orderId: order.id };
      // Another run planned this day at the same moment: this one takes nothing.
      if (!(await insertTurn(tx, { ...turn, token: newToken(), chargeAt }))) throw new AppError('STATE_CHANGED', '');
      return true;
    });
  } catch (error) {
    if (error instanceof AppError) return false;
    throw error;
  }
}

function newToken(): string {
  return randomBytes(24).toString('base64url');
}
