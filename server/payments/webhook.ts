import type { RequestHandler } from 'express';
import type { Deps } from '#server/deps.ts';

/** POST /api/payments/webhook, with the raw body that the signature covers. */
export function paymentWebhook(_deps: Deps): RequestHandler {
  return (_request, response) => {
    response.sendStatus(200);
  };
}
