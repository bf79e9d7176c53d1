import type { CollectionMail } from '#shared/contracts/packs.ts';
import { canMoveOrder } from '#shared/domain/order-state.ts';
import { AppError } from '#shared/errors.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { queueMail, type Letter } from '#server/mail/outbox.ts';
import { readyToCollectMail } from '#server/mail/ready-to-collect.ts';
import { lockOrder, updateOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { orderCalendar, readOrderFacts } from '#server/orders/read-order.ts';
import { findDay } from '#server/orders/stock-queries.ts';
import { listCollected, listMailsByEvent, type CollectedRow } from './collection-queries.ts';

type DayMails = { day: string; mails: CollectionMail[] };

const eventOf = (orderId: string) => `ready to collect ${orderId}`;

/** Every collection mail of a day as it would go out, or as it went. */
export async function readCollectionMails(deps: Deps, dayId: string): Promise<DayMails> {
  const day = await findDay(deps.db, dayId);
  if (!day) throw noSuchDay();
  // Who gets the van is told when it sets out.
  const rows = (await listCollected(deps.db, { dayId })).filter(({ order }) => order.deliveryAddress === null);
  const sent = new Map(
    (
      await listMailsByEvent(
        deps.db,
        rows.map(({ order }) => eventOf(order.id)),
      )
    ).map((mail) => [mail.eventKey, mail]),
  );
  const mails = await Promise.all(rows.map((row) => describe(deps, row, sent.get(eventOf(row.order.id)))));
  return { day: day.day, mails };
}

type SentMail = Awaited<ReturnType<typeof listMailsByEvent>>[number];

async function describe(deps: Deps, row: CollectedRow, sent: SentMail | undefined): Promise<CollectionMail> {
  const { order, pointName, startsAt, endsAt } = row;
  const written = sent ?? (await writeLetter(deps, deps.db, order));
  return {
    orderId: order.id,
    orderNo: order.orderNo,
    name: order.name,
    email: order.email,
    pointName,
    startsAt: startsAt.toISOString(),
    endsAt: endsAt.toISOString(),
    holdBack: sent ? null : holdBackOf(order),
    subject: written.subject,
    text: written.text,
    html: written.html,
    mail: sent
      ? {
          id: sent.id,
          state: sent.state,
          attempts: sent.attempts,
          lastError: sent.lastError,
          sentAt: sent.sentAt?.toISOString() ?? null,
        }
      : null,
  };
}

/** Why an order's mail must wait. Nobody is called for a box that is not filled. */
function holdBackOf(order: OrderRow): string | null {
  if (order.deliveryAddress) return 'The van brings it.';
  if (order.state === 'packed' || order.state === 'ready') return null;
  if (order.state === 'confirmed') return 'Not all of it is packed yet.';
  return `It is ${order.state} already.`;
}

async function writeLetter(deps: Deps, db: Db | Tx, order: OrderRow): Promise<Letter> {
  const facts = await readOrderFacts(deps, db, order);
  return {
    eventKey: eventOf(order.id),
    kind: 'ready to collect',
    orderId: order.id,
    to: order.email,
    ...readyToCollectMail(facts),
    attachments: [
      {
        filename: `collect-order-${order.orderNo}.ics`,
        contentType: 'text/calendar; charset=utf-8; method=PUBLISH',
        content: orderCalendar(facts, order, deps.clock.now()),
      },
    ],
  };
}

/**
 * Sends the chosen mails in one go, all or none, and calls their orders ready. A mail that has gone out before is not
 * sent a second time.
 */
export async function confirmCollectionMails(
  deps: Deps,
  confirmed: { dayId: string; orderIds: readonly string[]; byUserId: string },
): Promise<DayMails> {
  await deps.db.transaction(async (tx) => {
    if (!(await lockCuttingDay(tx, confirmed.dayId))) throw noSuchDay();
    for (const orderId of [...new Set(confirmed.orderIds)].sort()) {
      const order = await lockOrder(tx, { id: orderId });
      if (order?.cuttingDayId !== confirmed.dayId) {
        throw new AppError('NOT_FOUND', 'One of these orders is none of this day. No mail was sent.');
      }
      await confirmOne(tx, deps, { order, byUserId: confirmed.byUserId });
    }
  });
  return readCollectionMails(deps, confirmed.dayId);
}

async function confirmOne(
  tx: Tx,
  deps: Deps,
  { order, byUserId }: { order: OrderRow; byUserId: string },
): Promise<void> {
  const [sent] = await listMailsByEvent(tx, [eventOf(order.id)]);
  if (sent) return;
  const reason = holdBackOf(order);
  if (reason) {
    throw new AppError('NOT_FILLABLE', `Order ${order.orderNo} must wait: ${reason} No mail was sent.`, {
      figures: { orderNo: order.orderNo },
    });
  }
  const ready = canMoveOrder(order.state, 'ready')
    ? await updateOrder(tx, order.id, { state: 'ready', version: order.version + 1 })
    : order;
  await queueMail(tx, await writeLetter(deps, tx, ready));
  await recordAudit(tx, { byUserId, action: 'called to collect', subject: 'order', subjectId: order.id });
}

function noSuchDay(): AppError {
  return new AppError('NOT_FOUND', 'There is no such cutting day.');
}
