import { endpoint } from './endpoint.ts';
import type * as schema from './office-schema.ts';

export type { BoxKind, BoxKindEdit, Cut, Settings, TodayItem } from './office-schema.ts';

export const getMe = endpoint<typeof schema.getMeSchema>('GET', '/api/me', 'public');
export const getToday = endpoint<typeof schema.getTodaySchema>('GET', '/api/today', ['owner']);
export const listBoxKinds = endpoint<typeof schema.listBoxKindsSchema>('GET', '/api/office/box-kinds', ['owner']);
export const editBoxKind = endpoint<typeof schema.editBoxKindSchema>('PUT', '/api/office/box-kinds/:boxKindId', [
  'owner',
]);
export const addSwap = endpoint<typeof schema.addSwapSchema>('POST', '/api/office/box-kinds/:boxKindId/swaps', [
  'owner',
]);
export const getSettings = endpoint<typeof schema.getSettingsSchema>('GET', '/api/settings', ['owner']);
export const editSettings = endpoint<typeof schema.editSettingsSchema>('PUT', '/api/settings', ['owner']);
/** Answers once the database does. */
export const getHealth = endpoint<typeof schema.getHealthSchema>('GET', '/api/health', 'public');
