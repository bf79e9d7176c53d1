import { endpoint } from './endpoint.ts';
import type * as schema from './trade-schema.ts';

export type {
  NewReservation,
  Reservation,
  ReservationLineRequest,
  TradeAccount,
  TradeCarcase,
  TradeDay,
  TradePrice,
} from './trade-schema.ts';

export const getTradeAccount = endpoint<typeof schema.getTradeAccountSchema>('GET', '/api/trade/account', 'signed-in');
export const applyForTrade = endpoint<typeof schema.applyForTradeSchema>('POST', '/api/trade/account', [
  'customer',
  'butcher',
]);
export const listTradeDays = endpoint<typeof schema.listTradeDaysSchema>('GET', '/api/trade/days', ['butcher']);
/** Works the reservation in by allocating again; it is confirmed, or waits as asked when the owner wants to see it first. */
export const reserve = endpoint<typeof schema.reserveSchema>('POST', '/api/trade/reservations', ['butcher']);
export const listMyReservations = endpoint<typeof schema.listMyReservationsSchema>('GET', '/api/trade/reservations', [
  'butcher',
]);
export const cancelReservation = endpoint<typeof schema.cancelReservationSchema>(
  'POST',
  '/api/trade/reservations/:reservationId/cancel',
  ['butcher'],
);
export const listReservations = endpoint<typeof schema.listReservationsSchema>('GET', '/api/office/reservations', [
  'owner',
]);
export const confirmReservation = endpoint<typeof schema.confirmReservationSchema>(
  'POST',
  '/api/office/reservations/:reservationId/confirm',
  ['owner'],
);
export const refuseReservation = endpoint<typeof schema.refuseReservationSchema>(
  'POST',
  '/api/office/reservations/:reservationId/refuse',
  ['owner'],
);
/** The beef leaves for the butcher: scale weights and packs go into the ledger, and the price is what they weigh. */
export const dispatchReservation = endpoint<typeof schema.dispatchReservationSchema>(
  'POST',
  '/api/office/reservations/:reservationId/dispatch',
  ['owner'],
);
export const listTradeAccounts = endpoint<typeof schema.listTradeAccountsSchema>('GET', '/api/office/trade-accounts', [
  'owner',
]);
export const decideTradeAccount = endpoint<typeof schema.decideTradeAccountSchema>(
  'POST',
  '/api/office/trade-accounts/:accountId/decision',
  ['owner'],
);
export const setTradePrices = endpoint<typeof schema.setTradePricesSchema>(
  'PUT',
  '/api/office/trade-accounts/:accountId/prices',
  ['owner'],
);
