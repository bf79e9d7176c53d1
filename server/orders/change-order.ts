import { formatDayTime } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { orderChangedMail } from '#server/mail/order-changed.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { lockOrder, updateOrder, type NewOrderRow, type OrderRow } from './order-queries.ts';
import { getDay, noSuchOrder, orderCalendar, readOrderFacts } from './read-order.ts';

/** The order's row, held until the change is done. Only a paid order whose cut-off is still to come can be changed. */
export async function lockChangeable(tx: Tx, deps: Deps, token: string): Promise<OrderRow> {
  const order = await lockOrder(tx, { token });
  if (!order) throw noSuchOrder();
  if (order.state !== 'confirmed') {
    throw new AppError(
      'STATE_CHANGED',
      `Order ${order.orderNo} is ${order.state} and cannot be changed here. Nothing was changed.`,
    );
  }
  const day = await getDay(tx, order.cuttingDayId);
  if (deps.clock.now() >= day.cutOffAt) {
    throw new AppError(
      'CUTOFF_PASSED',
      `Orders could be changed until ${formatDayTime(day.cutOffAt)}, and the cutting has been planned since. Nothing was changed; ring the farm if something has to be different.`,
    );
  }
  return order;
}

/** What was done, for the audit trail, and the sentence in which the customer reads it. */
export type Change = {
  action: string;
  detail: Record<string, unknown>;
  words: string;
  /** Set where the farm changed it, and not the customer. */
  byUserId?: string | undefined;
};

/** Writes the change down, raises the order's version and tells the customer, with a new calendar file. */
export async function finishChange(
  tx: Tx,
  deps: Deps,
  { order, set, change }: { order: OrderRow; set: Partial<NewOrderRow>; change: Change },
): Promise<OrderRow> {
  const changed = await updateOrder(tx, order.id, { ...set, version: order.version + 1 });
  await recordAudit(tx, {
    byUserId: change.byUserId ?? null,
    action: change.action,
    subject: 'order',
    subjectId: order.id,
    detail: change.detail,
  });
  const facts = await readOrderFacts(deps, tx, changed);
  await queueMail(tx, {
    eventKey: `order changed ${order.id} ${changed.version}`,
    kind: 'order changed',
    orderId: order.id,
    to: order.email,
    ...orderChangedMail(facts, change.words, change.byUserId === undefined ? 'customer' : 'farm'),
    attachments: [
      {
        filename: `collect-order-${order.orderNo}.ics`,
        contentType: 'text/calendar; charset=utf-8; method=PUBLISH',
        content: orderCalendar(facts, changed, deps.clock.now()),
      },
    ],
  });
  return changed;
}
