import type * as schema from './customers-schema.ts';
import { endpoint } from './endpoint.ts';

export type { CustomerSettings } from './customers-schema.ts';

export const getCustomerSettings = endpoint<typeof schema.getCustomerSettingsSchema>(
  'GET',
  '/api/office/customer-settings',
  ['owner'],
);
export const editCustomerSettings = endpoint<typeof schema.editCustomerSettingsSchema>(
  'PUT',
  '/api/office/customer-settings',
  ['owner'],
);
