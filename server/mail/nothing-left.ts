import { formatDay, formatMoney } from '#shared/domain/words.ts';
import { lineRows, writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** A payment that arrived after its hold had ended, when what it paid for was gone. */
export function nothingLeftMail(facts: OrderFacts, amountPence: number): WrittenMail {
  return writeMail(facts, `Sorry: order ${facts.orderNo} came too late`, [
    { kind: 'heading', text: 'Your payment came too late' },
    {
      kind: 'text',
      text: `${facts.name}, your payment for order ${facts.orderNo} reached us after the time to pay had run out, and what you chose for ${formatDay(facts.day)} had gone to others by then. We are sorry.`,
    },
    {
      kind: 'text',
      text: `You get all of it back: ${formatMoney(amountPence)} is on its way to your card. There is nothing that you need to do, and nothing to collect.`,
    },
    lineRows(facts),
    { kind: 'button', text: 'See the order', url: facts.url },
  ]);
}
