import { endpoint } from './endpoint.ts';
import type * as schema from './packs-schema.ts';

export const listCollectionMails = endpoint<typeof schema.listCollectionMailsSchema>(
  'GET',
  '/api/cutting-days/:dayId/collection-mails',
  ['owner'],
);
export const confirmCollectionMails = endpoint<typeof schema.confirmCollectionMailsSchema>(
  'POST',
  '/api/cutting-days/:dayId/collection-mails',
  ['owner'],
);
export const listMails = endpoint<typeof schema.listMailsSchema>('GET', '/api/mails', ['owner']);
export const resendMail = endpoint<typeof schema.resendMailSchema>('POST', '/api/mails/:mailId/resend', ['owner']);
export const getRunSheet = endpoint<typeof schema.getRunSheetSchema>('GET', '/api/cutting-days/:dayId/run-sheet', [
  'owner',
  'packer',
]);
export const markOrder = endpoint<typeof schema.markOrderSchema>('POST', '/api/office/orders/:orderId/state', [
  'owner',
  'packer',
]);
