import { formatMoney } from '#shared/domain/words.ts';
import { lineRows, writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** `reason` is what the farm says about it; null when the customer cancelled. */
export function orderCancelledMail(
  facts: OrderFacts,
  cancelled: { reason: string | null; refundPence: number },
): WrittenMail {
  const money =
    cancelled.refundPence > 0
      ? `${formatMoney(cancelled.refundPence)} goes back to the card that you paid with. Your bank may take some days to show it.`
      : 'Nothing is left to pay back.';
  return writeMail(facts, `Order ${facts.orderNo} is cancelled`, [
    { kind: 'heading', text: 'Order cancelled' },
    {
      kind: 'text',
      text: cancelled.reason
        ? `${facts.name}, we are sorry: we had to cancel order ${facts.orderNo}. ${cancelled.reason}`
        : `${facts.name}, order ${facts.orderNo} is cancelled, as you asked. There is nothing to collect.`,
    },
    { kind: 'text', text: money },
    lineRows(facts),
    { kind: 'button', text: 'See the order', url: facts.url },
  ]);
}
