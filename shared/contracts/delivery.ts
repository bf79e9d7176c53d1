import { endpoint } from './endpoint.ts';
import type * as schema from './delivery-schema.ts';

export type { DeliveryArea, DeliveryAreaEdit } from './delivery-schema.ts';

export const askDelivery = endpoint<typeof schema.askDeliverySchema>('GET', '/api/delivery', 'public');
export const listDeliveryAreas = endpoint<typeof schema.listDeliveryAreasSchema>('GET', '/api/office/delivery-areas', [
  'owner',
]);
export const addDeliveryArea = endpoint<typeof schema.addDeliveryAreaSchema>('POST', '/api/office/delivery-areas', [
  'owner',
]);
export const editDeliveryArea = endpoint<typeof schema.editDeliveryAreaSchema>(
  'PUT',
  '/api/office/delivery-areas/:areaId',
  ['owner'],
);
