import { endpoint } from './endpoint.ts';
import type * as schema from './order-changes-schema.ts';

/** What a customer may change of a paid order until the cut-off, by its private link. */
export const changeSlot = endpoint<typeof schema.changeSlotSchema>('POST', '/api/orders/:token/slot', 'public');
export const swapBox = endpoint<typeof schema.swapBoxSchema>('POST', '/api/orders/:token/swap', 'public');
export const addToOrder = endpoint<typeof schema.addToOrderSchema>('POST', '/api/orders/:token/additions', 'public');
export const leaveAddition = endpoint<typeof schema.leaveAdditionSchema>(
  'POST',
  '/api/orders/:token/leave-addition',
  'public',
);

export const getBalance = endpoint<typeof schema.getBalanceSchema>('GET', '/api/orders/:token/balance', 'public');
/** The card that was kept, confirmed by its owner in the browser. */
export const startBalance = endpoint<typeof schema.startBalanceSchema>('POST', '/api/orders/:token/balance', 'public');
/** Another card, on the payment company's page. */
export const openBalancePage = endpoint<typeof schema.openBalancePageSchema>(
  'POST',
  '/api/orders/:token/balance-page',
  'public',
);
