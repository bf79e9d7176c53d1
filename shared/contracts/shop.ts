import { endpoint } from './endpoint.ts';
import type * as schema from './shop-schema.ts';

export type {
  Box,
  BoxCard,
  CollectionPoint,
  Cooking,
  CuttingDaySummary,
  DayOffer,
  LooseCut,
  ShopHome,
  Trace,
} from './shop-schema.ts';

export const getShopHome = endpoint<typeof schema.getShopHomeSchema>('GET', '/api/shop', 'public');
export const getBox = endpoint<typeof schema.getBoxSchema>('GET', '/api/boxes/:slug', 'public');
export const listCuts = endpoint<typeof schema.listCutsSchema>('GET', '/api/cuts', 'public');
export const listCollections = endpoint<typeof schema.listCollectionsSchema>(
  'GET',
  '/api/cutting-days/:dayId/collections',
  'public',
);
export const getTrace = endpoint<typeof schema.getTraceSchema>('GET', '/api/trace/:code', 'public');
