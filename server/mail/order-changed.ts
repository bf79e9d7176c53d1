import { formatDayTime } from '#shared/domain/words.ts';
import { lineRows, placeRows, writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** Sent after each change of a paid order; `change` says in a sentence what is different now. */
export function orderChangedMail(facts: OrderFacts, change: string, by: 'customer' | 'farm' = 'customer'): WrittenMail {
  return writeMail(facts, `Order ${facts.orderNo} has changed`, [
    { kind: 'heading', text: 'Your order, as it is now' },
    { kind: 'text', text: `${facts.name}, ${openingWords(facts.orderNo, by)} ${change}` },
    lineRows(facts),
    placeRows(facts),
    { kind: 'button', text: 'See your order', url: facts.url },
    {
      kind: 'text',
      text: `You can change it again until ${formatDayTime(facts.cutOffAt)}. The attached file brings your calendar up to date.`,
    },
  ]);
}

function openingWords(orderNo: number, by: 'customer' | 'farm'): string {
  if (by === 'customer') return `order ${orderNo} has been changed as you asked.`;
  return `we have less of some cuts than we had reckoned, and had to change order ${orderNo}. We are sorry.`;
}
