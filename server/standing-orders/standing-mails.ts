import { formatDay, formatDayTime, formatMoney } from '#shared/domain/words.ts';
import { lineRows, placeRows, writeMail, type OrderFacts, type WrittenMail } from '#server/mail/order-facts.ts';

export type TurnMailFacts = {
  order: OrderFacts;
  chargeAt: Date;
  /** The page of this one box: to skip it, or to pay it by hand. */
  turnUrl: string;
  accountUrl: string;
};

/** `isLast`: the second of the two reminders. */
export function standingReminderMail(
  { order, chargeAt, turnUrl, accountUrl }: TurnMailFacts,
  isLast: boolean,
): WrittenMail {
  const amount = formatMoney(order.totalPence);
  return writeMail(
    order,
    `${isLast ? 'Last reminder: your' : 'Your'} standing order for ${formatDay(order.day)}, ${amount}`,
    [
      { kind: 'heading', text: isLast ? 'Soon we charge your card' : 'Your next box is kept' },
      {
        kind: 'text',
        text: `${order.name}, your standing order has a box of ${formatDay(order.day)} kept for you. We charge ${amount} to your card ${formatDayTime(chargeAt)}. Until then you can skip this box.`,
      },
      lineRows(order),
      placeRows(order),
      { kind: 'button', text: 'See or skip this box', url: turnUrl },
      { kind: 'link', text: 'Pause or end the standing order', url: accountUrl },
    ],
  );
}

export function standingFailedMail({ order, turnUrl, accountUrl }: TurnMailFacts): WrittenMail {
  return writeMail(order, `Your card was refused for the box of ${formatDay(order.day)}`, [
    { kind: 'heading', text: 'Your card was refused' },
    {
      kind: 'text',
      text: `${order.name}, we could not charge ${formatMoney(order.totalPence)} for your standing order. Nothing was taken. The box stays kept until ${formatDayTime(order.cutOffAt)}: pay it by hand until then, or skip it.`,
    },
    lineRows(order),
    { kind: 'button', text: 'Pay it by hand', url: turnUrl },
    { kind: 'link', text: 'Pause or end the standing order', url: accountUrl },
  ]);
}
