import { formatTime } from '#shared/domain/words.ts';
import { collectionTime, placeRows, writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** Sent when an order is put on the van. */
export function outForDeliveryMail(facts: OrderFacts): WrittenMail {
  const items = facts.lines.map((line) => `${line.quantity} × ${line.name}`).join('\n');
  return writeMail(facts, `Order ${facts.orderNo} is on the van: ${collectionTime(facts.collection)}`, [
    { kind: 'heading', text: 'Your beef is on its way' },
    {
      kind: 'text',
      text: `${facts.name}, order ${facts.orderNo} is packed and on the van. We expect to be with you by ${formatTime(facts.collection.endsAt)}.`,
    },
    placeRows(facts),
    { kind: 'rows', rows: [['Packed', items]] },
    { kind: 'button', text: 'See your order', url: facts.url },
    {
      kind: 'text',
      text: 'Raw meat: put it in the fridge at 5 °C or below, or in the freezer, as soon as it is with you. Keep it away from food that is eaten as it is, and wash your hands after touching it. Each pack has its use-by date on the label.',
    },
  ]);
}
