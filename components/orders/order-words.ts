import type { Order } from '#shared/contracts/orders.ts';
import { formatDay, formatMoney, formatTime, londonDayAndTime } from '#shared/domain/words.ts';

/** How an order stands, for its head: what is so, and what comes next. */
export type Standing = { title: string; lead: string; kind: 'free' | 'held' | 'sold' | 'quiet'; badge: string };

/** `Fri 11 Dec, 15:00–16:00`. */
export function whenWords({ startsAt, endsAt }: Order['collection']): string {
  return `${formatDay(londonDayAndTime(startsAt).day)}, ${formatTime(startsAt)}–${formatTime(endsAt)}`;
}

export function standingOf(order: Order, hasLeft: boolean): Standing {
  const when = order.isDelivered
    ? `We bring it ${whenWords(order.collection)}.`
    : `Collect it ${whenWords(order.collection)}, ${order.collection.name}.`;
  const paid = order.deposit && order.deposit.rest !== 'paid' ? 'The deposit is paid and it is' : 'Paid and';
  switch (order.state) {
    case 'awaiting payment':
      return waitingFor(order, hasLeft);
    case 'confirmed':
      return {
        title: 'It is yours.',
        lead: `${paid} kept for you. ${when}`,
        kind: 'free',
        badge: 'Confirmed',
      };
    case 'packed':
      return { title: 'Packed and weighed.', lead: when, kind: 'free', badge: 'Packed' };
    case 'ready':
      return order.isDelivered
        ? { title: 'On its way.', lead: when, kind: 'free', badge: 'On the van' }
        : { title: 'Ready for you.', lead: when, kind: 'free', badge: 'Ready' };
    case 'collected':
      return {
        title: 'Collected. Eat well.',
        lead: 'Thank you for buying from the farm.',
        kind: 'sold',
        badge: 'Collected',
      };
    case 'delivered':
      return {
        title: 'Delivered. Eat well.',
        lead: 'Thank you for buying from the farm.',
        kind: 'sold',
        badge: 'Delivered',
      };
    case 'cancelled':
      return { title: 'Cancelled.', lead: refundWords(order), kind: 'quiet', badge: 'Cancelled' };
    case 'missed':
      return {
        title: 'We missed you.',
        lead: 'Your order was not fetched. Please ring or write to us and we will find another time.',
        kind: 'held',
        badge: 'Missed',
      };
  }
}

function waitingFor(order: Order, hasLeft: boolean): Standing {
  if (!order.paymentUrl) {
    return {
      title: 'Not paid.',
      lead: 'The payment page was closed, so nothing is held and nothing was charged. Your basket is as you left it.',
      kind: 'quiet',
      badge: 'Not paid',
    };
  }
  const until = order.paymentExpiresAt ? ` until ${formatTime(order.paymentExpiresAt)}` : '';
  if (hasLeft) {
    return {
      title: 'Not paid yet.',
      lead: `You came back without paying. What you chose is held for you${until}.`,
      kind: 'held',
      badge: 'Held',
    };
  }
  return {
    title: 'Waiting for the payment.',
    lead: `As soon as the payment company tells us, this page says so; it looks again by itself. What you chose is held${until}.`,
    kind: 'held',
    badge: 'Held',
  };
}

function refundWords({ paymentState, refundedPence, totalPence, deposit }: Order): string {
  if (refundedPence > 0) return `${formatMoney(refundedPence)} went back to the card that paid.`;
  if (paymentState === 'unpaid') return 'Nothing was charged.';
  const paidPence = deposit && deposit.rest !== 'paid' ? totalPence - deposit.restPence : totalPence;
  return `${formatMoney(paidPence)} is on its way back to the card that paid. Banks take a few days to show it.`;
}
