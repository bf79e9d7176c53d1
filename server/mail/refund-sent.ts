import { formatMoney } from '#shared/domain/words.ts';
import { writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** Sent once the payment company has taken the refund. */
export function refundSentMail(facts: OrderFacts, refund: { amountPence: number; reason: string }): WrittenMail {
  return writeMail(facts, `${formatMoney(refund.amountPence)} refunded for order ${facts.orderNo}`, [
    { kind: 'heading', text: `${formatMoney(refund.amountPence)} is on its way back` },
    {
      kind: 'text',
      text: `${facts.name}, we have sent ${formatMoney(refund.amountPence)} back to the card that you paid order ${facts.orderNo} with. Your bank may take some days to show it.`,
    },
    { kind: 'rows', rows: [['For', refund.reason]] },
    { kind: 'button', text: 'See the order', url: facts.url },
  ]);
}
