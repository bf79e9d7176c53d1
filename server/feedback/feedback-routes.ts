import * as contract from '#shared/contracts/feedback.ts';
import * as schema from '#shared/contracts/feedback-schema.ts';
import type { Deps } from '#server/deps.ts';
import { route, type Api } from '#server/http/route.ts';
import { giveFeedback, listFeedback, readFeedback } from './feedback-service.ts';

export function addFeedbackRoutes(api: Api, deps: Deps): void {
  route(api, contract.getFeedback, {
    schema: schema.getFeedbackSchema,
    handle: ({ params }) => readFeedback(deps, params.token),
  });
  route(api, contract.giveFeedback, {
    schema: schema.giveFeedbackSchema,
    handle: ({ params, body }) => giveFeedback(deps, params.token, body),
  });
  route(api, contract.listFeedback, { schema: schema.listFeedbackSchema, handle: () => listFeedback(deps) });
}
