import { endpoint } from './endpoint.ts';
import type * as schema from './shortfalls-schema.ts';

export type { HitOrder, ShortProduct } from './shortfalls-schema.ts';

/** What is sold beyond what the newest plan of its day makes, and whose orders are hit. */
export const listShortfalls = endpoint<typeof schema.listShortfallsSchema>('GET', '/api/shortfalls', ['owner']);
export const refundShortfall = endpoint<typeof schema.refundShortfallSchema>('POST', '/api/shortfalls/refund', [
  'owner',
]);
export const swapShortfall = endpoint<typeof schema.swapShortfallSchema>('POST', '/api/shortfalls/swap', ['owner']);
