import { endpoint } from './endpoint.ts';
import type * as schema from './packs-schema.ts';

export type { CollectionMail, Fill, Mail, Pack, PackingDay, RunSheet } from './packs-schema.ts';

export const getPackingDay = endpoint<typeof schema.getPackingDaySchema>('GET', '/api/cutting-days/:dayId/packing', [
  'owner',
  'packer',
]);
export const addPacks = endpoint<typeof schema.addPacksSchema>('POST', '/api/cutting-days/:dayId/packs', [
  'owner',
  'packer',
]);
export const reweighPack = endpoint<typeof schema.reweighPackSchema>('PUT', '/api/packs/:packId/weight', [
  'owner',
  'packer',
]);
export const losePack = endpoint<typeof schema.losePackSchema>('POST', '/api/packs/:packId/lose', ['owner', 'packer']);
export const fillOrders = endpoint<typeof schema.fillOrdersSchema>('POST', '/api/cutting-days/:dayId/fill', [
  'owner',
  'packer',
]);
/** Sends an order that cannot be filled with what there is, and pays back what is missing. */
export const packShort = endpoint<typeof schema.packShortSchema>(
  'POST',
  '/api/cutting-days/:dayId/orders/:orderNo/pack-short',
  ['owner'],
);
