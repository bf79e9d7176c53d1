import { formatDayTime } from '#shared/domain/words.ts';
import { collectionTime, lineRows, placeRows, writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** Sent once the payment has arrived. */
export function orderConfirmedMail(facts: OrderFacts): WrittenMail {
  const hasLoose = facts.lines.some((line) => line.kind === 'loose');
  return writeMail(facts, `Order ${facts.orderNo} is confirmed`, [
    { kind: 'heading', text: 'Your beef is set aside' },
    {
      kind: 'text',
      text: `Thank you, ${facts.name}. Order ${facts.orderNo} is paid and yours. ${facts.isDelivered ? 'We bring it' : 'Collect it'} ${collectionTime(facts.collection)}.`,
    },
    lineRows(facts),
    ...(hasLoose
      ? [
          {
            kind: 'text' as const,
            text: 'Loose packs are paid at their upper weight. Once yours are weighed, the difference goes back to your card.',
          },
        ]
      : []),
    placeRows(facts),
    { kind: 'button', text: 'See your order', url: facts.url },
    {
      kind: 'text',
      text: `This link is yours alone: it opens the order without a password. You can cancel there until ${formatDayTime(facts.cutOffAt)}, and the money goes back to your card.`,
    },
  ]);
}
