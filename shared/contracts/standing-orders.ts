import { endpoint } from './endpoint.ts';
import type * as schema from './standing-orders-schema.ts';

export type { MyStanding, StandingOrder, StandingTurn, StartStanding } from './standing-orders-schema.ts';

export const listMyStanding = endpoint<typeof schema.listMyStandingSchema>(
  'GET',
  '/api/my/standing-orders',
  'signed-in',
);
export const startStanding = endpoint<typeof schema.startStandingSchema>('POST', '/api/my/standing-orders', [
  'customer',
]);
export const setStandingState = endpoint<typeof schema.setStandingStateSchema>(
  'PUT',
  '/api/my/standing-orders/:standingId/state',
  'signed-in',
);
export const getTurn = endpoint<typeof schema.getTurnSchema>('GET', '/api/standing-turns/:token', 'public');
export const skipTurn = endpoint<typeof schema.skipTurnSchema>('POST', '/api/standing-turns/:token/skip', 'public');
/** For a box whose card was refused: a page where it is paid by hand. */
export const payTurn = endpoint<typeof schema.payTurnSchema>('POST', '/api/standing-turns/:token/pay', 'public');
