import Stripe from 'stripe';
import { readCustomerSettings } from '#server/account/customer-settings.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { lockOrder } from '#server/orders/order-queries.ts';
import { readOrderFacts } from '#server/orders/read-order.ts';
import { chargeSavedCard } from '#server/payments/charge-saved-card.ts';
import { isOutage } from '#server/payments/payment-page.ts';
import { settlePayment } from '#server/payments/settle-page.ts';
import { beginPaid, planTurns } from './plan-turns.ts';
import { standingFailedMail, standingReminderMail, type TurnMailFacts } from './standing-mails.ts';
import { finish } from './finish-turn.ts';
import { findTurn, listTurns, lockTurn, setTurnState, updateStanding, type TurnFacts } from './standing-queries.ts';
import { dropOrder } from './turn-service.ts';

const DAY_MS = 86_400_000;

/** The worker's task, often: begin, plan, remind twice, charge. Each step looks again, so that a second run does nothing. */
export async function runStandingOrders(deps: Deps): Promise<void> {
  await beginPaid(deps);
  await planTurns(deps);
  await remind(deps);
  const now = deps.clock.now();
  for (const facts of await listTurns(deps.db, { states: ['planned'], chargedBefore: now })) await charge(deps, facts);
  for (const facts of await listTurns(deps.db, { states: ['failed'], chargedBefore: now }))
    await endFailed(deps, facts);
}

async function remind(deps: Deps): Promise<void> {
  const now = deps.clock.now();
  const settings = await readCustomerSettings(deps.db, deps.clock.today());
  const first = new Date(now.getTime() + settings.standingFirstReminderDays * DAY_MS);
  const second = new Date(now.getTime() + settings.standingSecondReminderDays * DAY_MS);
  for (const facts of await listTurns(deps.db, { states: ['planned'], chargedBefore: first })) {
    if (facts.turn.chargeAt <= now) continue;
    const isLast = facts.turn.chargeAt <= second;
    await deps.db.transaction(async (tx) => {
      if ((await lockTurn(tx, facts.turn.id))?.state !== 'planned') return;
      const mail = standingReminderMail(await mailFacts(tx, deps, facts), isLast);
      await queueMail(tx, {
        eventKey: `standing order ${isLast ? 'second' : 'first'} reminder ${facts.turn.id}`,
        kind: 'standing order reminder',
        orderId: facts.order.id,
        to: facts.order.email,
        ...mail,
      });
    });
  }
}

async function mailFacts(tx: Tx, deps: Deps, { turn, order }: TurnFacts): Promise<TurnMailFacts> {
  return {
    order: await readOrderFacts(deps, tx, order),
    chargeAt: turn.chargeAt,
    turnUrl: `${deps.origin}/standing/${turn.token}`,
    accountUrl: `${deps.origin}/account/standing`,
  };
}

/** Charges the kept card once; a refusal keeps the box and asks its buyer to pay by hand. An outage is tried again. */
async function charge(deps: Deps, { turn, standing, order }: TurnFacts): Promise<void> {
  const { providerCustomerId, providerMethodId } = standing;
  if (!providerCustomerId || !providerMethodId || order.state !== 'awaiting payment') return;
  const card = { providerCustomerId, providerMethodId };
  try {
    const intent = await chargeSavedCard(deps, order, { card, key: `standing turn ${turn.id}` });
    await deps.db.transaction(async (tx) => {
      const row = await lockTurn(tx, turn.id);
      const current = await lockOrder(tx, { id: order.id });
      if (!row || !current || intent.status !== 'succeeded') return;
      const isCurrent = current.version === order.version;
      const paid = { intentId: intent.id, amountPence: intent.amount, card };
      await settlePayment(tx, deps, { ...paid, order: current, isCurrent });
      if (row.state === 'planned') await finish(tx, { turnId: turn.id, state: 'paid' });
    });
  } catch (error) {
    if (!(error instanceof Stripe.errors.StripeError) || isOutage(error)) throw error;
    await deps.db.transaction(async (tx) => {
      if ((await lockTurn(tx, turn.id))?.state !== 'planned') return;
      await setTurnState(tx, turn.id, 'failed');
      const facts = await findTurn(tx, { id: turn.id });
      if (!facts) return;
      await queueMail(tx, {
        eventKey: `standing order refused ${turn.id}`,
        kind: 'standing order refused',
        orderId: order.id,
        to: order.email,
        ...standingFailedMail(await mailFacts(tx, deps, facts)),
      });
    });
  }
}

/** A refused box that was paid by hand meanwhile is paid, with the new card kept; at the cut-off it goes back on the counter. */
async function endFailed(deps: Deps, { turn, standing, order, cutOffAt }: TurnFacts): Promise<void> {
  const isOver = deps.clock.now() >= cutOffAt || order.state === 'cancelled';
  const isPaid = order.state !== 'awaiting payment' && order.state !== 'cancelled';
  if (!isPaid && !isOver) return;
  if (isOver && !isPaid) await dropOrder(deps, order);
  await deps.db.transaction(async (tx) => {
    if ((await lockTurn(tx, turn.id))?.state !== 'failed') return;
    await finish(tx, { turnId: turn.id, state: isPaid ? 'paid' : 'skipped' });
    const { providerCustomerId, providerMethodId } = order;
    if (isPaid && providerCustomerId && providerMethodId) {
      await updateStanding(tx, standing.id, { providerCustomerId, providerMethodId });
    }
  });
}
