import { formatMoney } from '#shared/domain/words.ts';
import { writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** The rest of a deposit order could not be taken from the card that was kept. */
export function balanceFailedMail(facts: OrderFacts, due: { amountPence: number; payUrl: string }): WrittenMail {
  const amount = formatMoney(due.amountPence);
  return writeMail(facts, `${amount} is still open for order ${facts.orderNo}`, [
    { kind: 'heading', text: `${amount} is still to be paid` },
    {
      kind: 'text',
      text: `${facts.name}, order ${facts.orderNo} is packed, and its rest of ${amount} could not be taken from the card that you paid the deposit with: your bank refused it or wants to ask you first. Nothing was charged.`,
    },
    {
      kind: 'text',
      text: 'Your order stays packed for you. Please pay the rest before you collect it or the van comes.',
    },
    { kind: 'button', text: `Pay ${amount}`, url: due.payUrl },
  ]);
}
