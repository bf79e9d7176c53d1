import * as contract from '#shared/contracts/account.ts';
import * as schema from '#shared/contracts/account-schema.ts';
import type { Deps } from '#server/deps.ts';
import { download, route, signedIn, type Api } from '#server/http/route.ts';
import { askClosing, closeAccount } from './close-account.ts';
import { editMyDetails, readMyDetails, setMyNews } from './details.ts';
import { exportData } from './export-data.ts';
import { readOrderAgain } from './order-again.ts';

export function addAccountRoutes(api: Api, deps: Deps): void {
  route(api, contract.getMyDetails, {
    schema: schema.getMyDetailsSchema,
    handle: (_input, caller) => readMyDetails(deps, signedIn(caller).id),
  });
  route(api, contract.editMyDetails, {
    schema: schema.editMyDetailsSchema,
    handle: ({ body }, caller) => editMyDetails(deps, signedIn(caller).id, body),
  });
  route(api, contract.setMyNews, {
    schema: schema.setMyNewsSchema,
    handle: ({ body }, caller) => setMyNews(deps, signedIn(caller), body.isGiven),
  });
  download(api, contract.getMyData, {
    schema: schema.getMyDataSchema,
    handle: async (_input, caller) => ({
      contentType: 'application/json; charset=utf-8',
      filename: 'my-data.json',
      body: await exportData(deps, signedIn(caller)),
    }),
  });
  route(api, contract.askClosing, {
    schema: schema.askClosingSchema,
    handle: (_input, caller) => askClosing(deps, signedIn(caller)),
  });
  route(api, contract.closeAccount, {
    schema: schema.closeAccountSchema,
    handle: ({ body }) => closeAccount(deps, body.token),
  });
  route(api, contract.getOrderAgain, {
    schema: schema.getOrderAgainSchema,
    handle: ({ params }) => readOrderAgain(deps, params.token),
  });
}
