import { formatMoney } from '#shared/domain/words.ts';
import { writeMail, type OrderFacts, type WrittenMail } from './order-facts.ts';

/** More for an order was paid after its hold had ended, when it had gone or the order could not change any more. */
export function additionTooLateMail(facts: OrderFacts, amountPence: number): WrittenMail {
  return writeMail(facts, `Sorry: what you added to order ${facts.orderNo} came too late`, [
    { kind: 'heading', text: 'Your addition came too late' },
    {
      kind: 'text',
      text: `${facts.name}, your payment for more on order ${facts.orderNo} reached us after the time to pay had run out, and it could not be added any more. We are sorry. Your order stays as it was.`,
    },
    {
      kind: 'text',
      text: `You get all of it back: ${formatMoney(amountPence)} is on its way to your card. There is nothing that you need to do.`,
    },
    { kind: 'button', text: 'See the order', url: facts.url },
  ]);
}
