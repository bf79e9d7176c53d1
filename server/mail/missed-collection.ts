import { collectionTime, writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** Nobody came: where the beef is now is a person's answer, so the mail asks to talk. */
export function missedCollectionMail(facts: OrderFacts): WrittenMail {
  const items = facts.lines.map((line) => `${line.quantity} × ${line.name}`).join('\n');
  return writeMail(facts, `Order ${facts.orderNo} was not collected`, [
    { kind: 'heading', text: 'We missed you' },
    {
      kind: 'text',
      text: `${facts.name}, order ${facts.orderNo} was packed for you, and nobody came ${collectionTime(facts.collection)}, ${facts.collection.name}.`,
    },
    { kind: 'rows', rows: [['Packed', items]] },
    {
      kind: 'text',
      text: `Fresh beef keeps only until the use-by dates on its labels. Please ring ${facts.farm.phone} or answer this mail soon, so that we can agree what happens with it.`,
    },
    { kind: 'button', text: 'See the order', url: facts.url },
  ]);
}
