import { formatDay, formatTime } from '#shared/domain/words.ts';
import { lineRows, placeRows, writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** The day before orders close: the last good moment to change something. */
export function cutOffTomorrowMail(facts: OrderFacts): WrittenMail {
  const closes = `tomorrow at ${formatTime(facts.cutOffAt)}`;
  return writeMail(facts, `Order ${facts.orderNo}: changes close ${closes}`, [
    { kind: 'heading', text: 'Is everything as you want it?' },
    {
      kind: 'text',
      text: `${facts.name}, orders for ${formatDay(facts.day)} close ${closes}. Until then you can change or cancel order ${facts.orderNo} yourself; after that the meat is cut for you.`,
    },
    lineRows(facts),
    placeRows(facts),
    { kind: 'button', text: 'See or change the order', url: facts.url },
    { kind: 'text', text: 'If all is well, there is nothing that you need to do.' },
  ]);
}
