import type Stripe from 'stripe';
import { formatMoney } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { additionTooLateMail } from '#server/mail/addition-too-late.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { endAddition, listAdditionLines, lockAddition, type AdditionRow } from '#server/orders/addition-queries.ts';
import { finishChange } from '#server/orders/change-order.ts';
import { releaseLines, sell, takeLines } from '#server/orders/hold.ts';
import { wordsOf } from '#server/orders/line-words.ts';
import { addLine } from '#server/orders/order-line-queries.ts';
import { lockOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { getDay, readOrderFacts } from '#server/orders/read-order.ts';
import { hasSoldOut } from '#server/orders/stock-queries.ts';
import { enqueue } from '#server/queue.ts';
import { insertCharge, insertRefund } from './payment-queries.ts';
import { FREEZE_MS, paidOn, type PaidPage } from './paid-page.ts';

type Adding = { order: OrderRow; addition: AdditionRow };

/** Brings an addition in line with the truth about its payment page, as `settlePage` does for an order. */
export async function settleAddition(tx: Tx, deps: Deps, page: Stripe.Checkout.Session): Promise<void> {
  const { orderId, additionId } = page.metadata ?? {};
  const order = orderId ? await lockOrder(tx, { id: orderId }) : null;
  const addition = additionId ? await lockAddition(tx, additionId) : null;
  if (!order || !addition) return;
  if (page.status === 'expired') {
    if (addition.state === 'open') await releaseAddition(tx, addition);
    return;
  }
  const paid = paidOn(page);
  if (!paid) return;
  const { intentId, amountPence } = paid;
  const chargeId = await insertCharge(tx, { orderId: order.id, providerId: intentId, amountPence, reason: 'addition' });
  if (!chargeId) return;
  const adding = { order, addition };
  if (amountPence === addition.amountPence && (await isTaken(tx, deps, adding))) await join(tx, deps, adding);
  else await giveBack(tx, deps, { ...adding, paid, chargeId });
}

export async function releaseAddition(tx: Tx, addition: AdditionRow): Promise<void> {
  await releaseLines(tx, await listAdditionLines(tx, addition.id));
  await endAddition(tx, addition.id, 'ended');
}

/** What was held is sold; where the hold has ended, what is free is taken as any buyer would. False: it is not there. */
async function isTaken(tx: Tx, deps: Deps, { order, addition }: Adding): Promise<boolean> {
  const lines = await listAdditionLines(tx, addition.id);
  const isOpen = addition.state === 'open';
  if (order.state !== 'confirmed') {
    if (isOpen) await releaseAddition(tx, addition);
    return false;
  }
  if (isOpen) {
    await sell(tx, lines);
    return true;
  }
  const day = await getDay(tx, order.cuttingDayId);
  if (deps.clock.now().getTime() >= day.cutOffAt.getTime() + FREEZE_MS) return false;
  try {
    await tx.transaction((inner) => takeLines(inner, { day, lines }, 'sold'));
    return true;
  } catch (error) {
    if (error instanceof AppError) return false;
    throw error;
  }
}

async function join(tx: Tx, deps: Deps, { order, addition }: Adding): Promise<void> {
  const lines = await listAdditionLines(tx, addition.id);
  for (const { offerId, quantity, unitPricePence, unitGrams, name } of lines) {
    await addLine(tx, { orderId: order.id, offerId, quantity, unitPricePence, unitGrams, name });
  }
  await endAddition(tx, addition.id, 'paid');
  const offerIds = lines.map((line) => line.offerId);
  if (await hasSoldOut(tx, offerIds)) await enqueue(tx, 'replan-day', { dayId: order.cuttingDayId });
  const { amountPence } = addition;
  await finishChange(tx, deps, {
    order,
    set: { totalPence: order.totalPence + amountPence },
    change: {
      action: 'added to the order',
      detail: { additionId: addition.id, amountPence },
      words: `Added and paid: ${wordsOf(lines)}, for ${formatMoney(amountPence)}.`,
    },
  });
}

async function giveBack(
  tx: Tx,
  deps: Deps,
  { order, addition, paid, chargeId }: Adding & { paid: PaidPage; chargeId: string },
): Promise<void> {
  const { intentId, amountPence } = paid;
  const reason = `More that was paid too late (${intentId})`;
  const refundId = await insertRefund(tx, { orderId: order.id, reason, amountPence, chargeId });
  if (refundId) await enqueue(tx, 'settle-refund', { paymentId: refundId });
  await recordAudit(tx, {
    byUserId: null,
    action: 'gave back a late addition',
    subject: 'order',
    subjectId: order.id,
    detail: { additionId: addition.id, amountPence },
  });
  await queueMail(tx, {
    eventKey: `addition too late ${intentId}`,
    kind: 'addition too late',
    orderId: order.id,
    to: order.email,
    ...additionTooLateMail(await readOrderFacts(deps, tx, order), amountPence),
  });
}
