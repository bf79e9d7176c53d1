import { collectionTime, placeRows, writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** Confirmed by the owner once the order is packed; the calendar file travels with it. */
export function readyToCollectMail(facts: OrderFacts): WrittenMail {
  const items = facts.lines.map((line) => `${line.quantity} × ${line.name}`).join('\n');
  return writeMail(facts, `Order ${facts.orderNo} is ready: ${collectionTime(facts.collection)}`, [
    { kind: 'heading', text: 'Your beef is ready to collect' },
    {
      kind: 'text',
      text: `${facts.name}, order ${facts.orderNo} is packed and waits for you. Say its number when you come.`,
    },
    placeRows(facts),
    { kind: 'rows', rows: [['Packed', items]] },
    { kind: 'button', text: 'See your order', url: facts.url },
    {
      kind: 'text',
      text: 'Raw meat: carry it in a cool bag, go straight home, and put it in the fridge at 5 °C or below, or in the freezer, as soon as you are there. Keep it away from food that is eaten as it is, and wash your hands after touching it. Each pack has its use-by date on the label.',
    },
    { kind: 'text', text: 'The attached file puts the time into your calendar.' },
  ]);
}
