import { endpoint } from './endpoint.ts';
import type * as schema from './promo-schema.ts';

export type { NewPromoCode, PromoCode } from './promo-schema.ts';

export const checkPromo = endpoint<typeof schema.checkPromoSchema>('POST', '/api/promo-checks', 'public');
export const listPromoCodes = endpoint<typeof schema.listPromoCodesSchema>('GET', '/api/office/promo-codes', ['owner']);
export const makePromoCode = endpoint<typeof schema.makePromoCodeSchema>('POST', '/api/office/promo-codes', ['owner']);
export const closePromoCode = endpoint<typeof schema.closePromoCodeSchema>(
  'POST',
  '/api/office/promo-codes/:promoId/close',
  ['owner'],
);
