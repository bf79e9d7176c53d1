import { getSubscription, unsubscribe, unsubscribeOneClick } from '#shared/contracts/account.ts';
import { getSubscriptionSchema, unsubscribeSchema } from '#shared/contracts/account-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, type Api } from '#server/http/route.ts';
import { endSubscription, readSubscription } from './consent.ts';

export function addUnsubscribeRoutes(api: Api, deps: Deps): void {
  route(api, getSubscription, {
    schema: getSubscriptionSchema,
    handle: ({ params }) => readSubscription(deps, params.token),
  });
  for (const endpoint of [unsubscribe, unsubscribeOneClick]) {
    route(api, endpoint, { schema: unsubscribeSchema, handle: ({ params }) => endSubscription(deps, params.token) });
  }
}
