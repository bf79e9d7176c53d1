import { formatGrams, formatMoney } from '#shared/domain/words.ts';
import { writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

export type SettledWeights = {
  amountPence: number;
  items: { name: string; grams: number; paidPence: number; pricePence: number }[];
  packs: { code: string; cut: string; grams: number }[];
  traceUrl: (code: string) => string;
};

/** The real weights of an order, the difference that goes back, and where each pack comes from. */
export function weightsSettledMail(facts: OrderFacts, settled: SettledWeights): WrittenMail {
  const amount = formatMoney(settled.amountPence);
  const light = settled.items.filter((item) => item.pricePence < item.paidPence);
  return writeMail(facts, `${amount} back on order ${facts.orderNo}: your beef is weighed`, [
    { kind: 'heading', text: `${amount} goes back to you` },
    {
      kind: 'text',
      text: `${facts.name}, order ${facts.orderNo} is packed. It weighs less than you paid for, so ${amount} goes back to the card that you paid with. Your bank may take some days to show it.`,
    },
    {
      kind: 'rows',
      rows: light.map((item): [string, string] => [
        item.name,
        `${formatGrams(item.grams)}: ${formatMoney(item.pricePence)} instead of ${formatMoney(item.paidPence)}`,
      ]),
    },
    { kind: 'text', text: 'What is packed for you. Each code opens the page of the animal that it came from.' },
    {
      kind: 'rows',
      rows: settled.packs.map((pack): [string, string] => [
        pack.cut,
        `${formatGrams(pack.grams)}\n${pack.code}\n${settled.traceUrl(pack.code)}`,
      ]),
    },
    { kind: 'button', text: 'See the order', url: facts.url },
  ]);
}
