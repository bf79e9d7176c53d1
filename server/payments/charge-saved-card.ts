import type Stripe from 'stripe';
import type { Deps } from '#server/deps.ts';
import type { OrderRow } from '#server/orders/order-queries.ts';

export type SavedCard = { providerCustomerId: string; providerMethodId: string };

/**
 * Charges all of an order to a kept card while nobody is there. Asked twice under one key it charges once. Throws the
 * company's own error when the card refuses or its bank wants to see its holder.
 */
export function chargeSavedCard(
  deps: Deps,
  order: Pick<OrderRow, 'id' | 'orderNo' | 'version' | 'totalPence'>,
  { card, key }: { card: SavedCard; key: string },
): Promise<Stripe.PaymentIntent> {
  return deps.payments.stripe.paymentIntents.create(
    {
      ...{ amount: order.totalPence, currency: 'gbp', off_session: true, confirm: true },
      ...{ customer: card.providerCustomerId, payment_method: card.providerMethodId },
      description: `Order ${order.orderNo}`,
      metadata: { orderId: order.id, attempt: String(order.version) },
    },
    { idempotencyKey: key },
  );
}
