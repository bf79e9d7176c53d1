import * as collections from '#shared/contracts/collections.ts';
import * as schema from '#shared/contracts/packs-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, signedIn, type Api } from '#server/http/route.ts';
import { confirmCollectionMails, readCollectionMails } from './collection-mails.ts';
import { markOrder, readRunSheet } from './run-sheet.ts';
import { readMails, resendMail } from './sent-mails.ts';

export function addCollectionRoutes(api: Api, deps: Deps): void {
  route(api, collections.listCollectionMails, {
    schema: schema.listCollectionMailsSchema,
    handle: ({ params }) => readCollectionMails(deps, params.dayId),
  });
  route(api, collections.confirmCollectionMails, {
    schema: schema.confirmCollectionMailsSchema,
    handle: ({ params, body }, caller) =>
      confirmCollectionMails(deps, { dayId: params.dayId, orderIds: body.orderIds, byUserId: signedIn(caller).id }),
  });
  route(api, collections.listMails, { schema: schema.listMailsSchema, handle: () => readMails(deps) });
  route(api, collections.resendMail, {
    schema: schema.resendMailSchema,
    handle: ({ params }, caller) => resendMail(deps, params.mailId, signedIn(caller).id),
  });
  route(api, collections.getRunSheet, {
    schema: schema.getRunSheetSchema,
    handle: ({ params }) => readRunSheet(deps, params.dayId),
  });
  route(api, collections.markOrder, {
    schema: schema.markOrderSchema,
    handle: ({ params, body }, caller) =>
      markOrder(deps, { orderId: params.orderId, ...body, byUserId: signedIn(caller).id }),
  });
}
