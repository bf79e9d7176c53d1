import { formatGrams, formatMoney } from '#shared/domain/words.ts';
import { writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

export type TakenBalance = {
  amountPence: number;
  depositPence: number;
  packs: { code: string; cut: string; grams: number }[];
  traceUrl: (code: string) => string;
};

/** The rest of a deposit order is paid, what it weighs less already off, and where each pack comes from. */
export function balanceTakenMail(facts: OrderFacts, taken: TakenBalance): WrittenMail {
  const { amountPence, depositPence } = taken;
  const lighterPence = facts.totalPence - depositPence - amountPence;
  return writeMail(facts, `Order ${facts.orderNo} is paid up: ${formatMoney(amountPence)} taken`, [
    { kind: 'heading', text: 'The rest is paid' },
    {
      kind: 'text',
      text: `${facts.name}, order ${facts.orderNo} is packed, and its rest of ${formatMoney(amountPence)} is paid.`,
    },
    {
      kind: 'sums',
      rows: [
        ['Ordered', formatMoney(facts.totalPence)],
        ...(lighterPence > 0 ? [['Lighter than ordered', formatMoney(-lighterPence)] as [string, string]] : []),
        ['Deposit', formatMoney(-depositPence)],
        ['Paid now', formatMoney(amountPence)],
      ],
    },
    { kind: 'text', text: 'What is packed for you. Each code opens the page of the animal that it came from.' },
    {
      kind: 'rows',
      rows: taken.packs.map((pack): [string, string] => [
        pack.cut,
        `${formatGrams(pack.grams)}\n${pack.code}\n${taken.traceUrl(pack.code)}`,
      ]),
    },
    { kind: 'button', text: 'See the order', url: facts.url },
  ]);
}
