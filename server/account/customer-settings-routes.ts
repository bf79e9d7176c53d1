import { editCustomerSettings as edit, getCustomerSettings } from '#shared/contracts/customers.ts';
import { editCustomerSettingsSchema, getCustomerSettingsSchema } from '#shared/contracts/customers-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { editCustomerSettings, readCustomerSettings } from './customer-settings.ts';

export function addCustomerSettingsRoutes(api: Api, deps: Deps): void {
  route(api, getCustomerSettings, {
    schema: getCustomerSettingsSchema,
    handle: () => readCustomerSettings(deps.db, deps.clock.today()),
  });
  route(api, edit, {
    schema: editCustomerSettingsSchema,
    handle: ({ body }, caller) => editCustomerSettings(deps, signedIn(caller).id, body),
  });
}
