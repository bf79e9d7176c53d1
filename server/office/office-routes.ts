import * as contract from '#shared/contracts/office.ts';
import * as schema from '#shared/contracts/office-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { addSwap, editBoxKind, listBoxKinds } from './box-kind-service.ts';
import { editSettings, getSettings } from './settings-service.ts';
import { getToday } from './today-service.ts';

export function addOfficeRoutes(api: Api, deps: Deps): void {
  route(api, contract.getMe, {
    schema: schema.getMeSchema,
    handle: (_input, caller) => Promise.resolve({ user: caller }),
  });
  route(api, contract.getToday, { schema: schema.getTodaySchema, handle: () => getToday(deps) });
  route(api, contract.listBoxKinds, { schema: schema.listBoxKindsSchema, handle: () => listBoxKinds(deps) });
  route(api, contract.editBoxKind, {
    schema: schema.editBoxKindSchema,
    handle: ({ params, body }, caller) =>
      editBoxKind(deps, signedIn(caller).id, { boxKindId: params.boxKindId, edit: body }),
  });
  route(api, contract.addSwap, {
    schema: schema.addSwapSchema,
    handle: ({ params, body }, caller) => addSwap(deps, signedIn(caller).id, { ...params, ...body }),
  });
  route(api, contract.getSettings, { schema: schema.getSettingsSchema, handle: () => getSettings(deps) });
  route(api, contract.editSettings, {
    schema: schema.editSettingsSchema,
    handle: ({ body }, caller) => editSettings(deps, signedIn(caller).id, body),
  });
}
