import type * as schema from './account-schema.ts';
import { endpoint } from './endpoint.ts';

export type { MyDetails, MyDetailsEdit, OrderAgain, Subscription } from './account-schema.ts';

export const getMyDetails = endpoint<typeof schema.getMyDetailsSchema>('GET', '/api/my/details', 'signed-in');
export const editMyDetails = endpoint<typeof schema.editMyDetailsSchema>('PUT', '/api/my/details', 'signed-in');
export const setMyNews = endpoint<typeof schema.setMyNewsSchema>('PUT', '/api/my/news', 'signed-in');
/** Everything that is kept about the caller, as one JSON file. */
export const getMyData = endpoint<typeof schema.getMyDataSchema>('GET', '/api/my/data.json', 'signed-in');
/** Mails the link that closes the account: whoever only holds an open browser cannot close it. */
export const askClosing = endpoint<typeof schema.askClosingSchema>('POST', '/api/my/close', ['customer']);
export const closeAccount = endpoint<typeof schema.closeAccountSchema>('POST', '/api/account/close', 'public');

export const getOrderAgain = endpoint<typeof schema.getOrderAgainSchema>('GET', '/api/orders/:token/again', 'public');

export const getSubscription = endpoint<typeof schema.getSubscriptionSchema>(
  'GET',
  '/api/unsubscribe/:token',
  'public',
);
export const unsubscribe = endpoint<typeof schema.unsubscribeSchema>('POST', '/api/unsubscribe/:token', 'public');
/** What mail programs post to by themselves (RFC 8058): the address of the page, without cookies. */
export const unsubscribeOneClick = endpoint<typeof schema.unsubscribeSchema>('POST', '/unsubscribe/:token', 'public');
