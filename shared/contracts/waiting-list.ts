import { endpoint } from './endpoint.ts';
import type * as schema from './waiting-list-schema.ts';

export type { JoinWaitingList, WaitingPlace } from './waiting-list-schema.ts';

export const joinWaitingList = endpoint<typeof schema.joinWaitingListSchema>('POST', '/api/waiting-list', 'public');
export const getWaitingPlace = endpoint<typeof schema.getWaitingPlaceSchema>(
  'GET',
  '/api/waiting-list/:token',
  'public',
);
export const confirmWaitingPlace = endpoint<typeof schema.confirmWaitingPlaceSchema>(
  'POST',
  '/api/waiting-list/:token/confirm',
  'public',
);
export const leaveWaitingPlace = endpoint<typeof schema.leaveWaitingPlaceSchema>(
  'POST',
  '/api/waiting-list/:token/leave',
  'public',
);
export const listWaiting = endpoint<typeof schema.listWaitingSchema>('GET', '/api/office/waiting-list', ['owner']);
