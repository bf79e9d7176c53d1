import { formatMoney } from '#shared/domain/words.ts';
import { lineRows, placeRows, writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** Sent when a part of a paid order cannot be filled and its money goes back. */
export function shortfallRefundedMail(facts: OrderFacts, short: { what: string; amountPence: number }): WrittenMail {
  return writeMail(facts, `Part of order ${facts.orderNo} cannot be filled`, [
    { kind: 'heading', text: 'We have less beef than we had reckoned' },
    {
      kind: 'text',
      text: `${facts.name}, the animals came out lighter than we had reckoned: ${short.what} of order ${facts.orderNo} cannot be filled. We are sorry. ${formatMoney(short.amountPence)} goes back to the card that you paid with.`,
    },
    { kind: 'text', text: 'The rest of your order stays as it is:' },
    lineRows(facts),
    placeRows(facts),
    { kind: 'button', text: 'See your order', url: facts.url },
  ]);
}
