import { endpoint } from './endpoint.ts';
import type * as schema from './margin-schema.ts';

export type {
  Basis,
  BoxPrices,
  CarcaseMargin,
  Costs,
  DayMargin,
  Deadweight,
  JointShare,
  Margin,
  MarginRow,
  PriceGrid,
  PriceGridEdit,
} from './margin-schema.ts';

export const getPriceGrids = endpoint<typeof schema.getPriceGridsSchema>('GET', '/api/price-grids', ['owner']);
/** Makes a new edition; earlier ones stay as they were. */
export const savePriceGrid = endpoint<typeof schema.savePriceGridSchema>('POST', '/api/price-grids', ['owner']);
/** Contribution, deadweight value and gain of a cutting day, as planned or as sold. */
export const getDayMargin = endpoint<typeof schema.getDayMarginSchema>('GET', '/api/cutting-days/:dayId/margin', [
  'owner',
]);
