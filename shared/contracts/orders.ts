import { endpoint } from './endpoint.ts';
import type * as schema from './orders-schema.ts';

export type { BasketLine, Checkout, FailedRefund, Order, OrderSummary, PricedLine } from './orders-schema.ts';

export const priceBasket = endpoint<typeof schema.priceBasketSchema>('POST', '/api/basket', 'public');
export const placeOrder = endpoint<typeof schema.placeOrderSchema>('POST', '/api/orders', 'public');
export const getOrder = endpoint<typeof schema.getOrderSchema>('GET', '/api/orders/:token', 'public');
/** Coming back from the payment page without paying: closes that page and frees what was held. */
export const leavePayment = endpoint<typeof schema.leavePaymentSchema>(
  'POST',
  '/api/orders/:token/leave-payment',
  'public',
);
export const cancelOrder = endpoint<typeof schema.cancelOrderSchema>('POST', '/api/orders/:token/cancel', 'public');
export const listMyOrders = endpoint<typeof schema.listMyOrdersSchema>('GET', '/api/my/orders', 'signed-in');
export const listOrders = endpoint<typeof schema.listOrdersSchema>('GET', '/api/office/orders', ['owner']);
export const listFailedRefunds = endpoint<typeof schema.listFailedRefundsSchema>('GET', '/api/office/failed-refunds', [
  'owner',
]);
/** Asks the payment company once more; the list comes back as it is then. */
export const retryRefund = endpoint<typeof schema.retryRefundSchema>(
  'POST',
  '/api/office/failed-refunds/:paymentId/retry',
  ['owner'],
);
export const cancelOrderByOwner = endpoint<typeof schema.cancelOrderByOwnerSchema>(
  'POST',
  '/api/office/orders/:orderId/cancel',
  ['owner'],
);
