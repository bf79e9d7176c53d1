import type { RequestHandler } from 'express';
import type { Deps } from '#server/deps.ts';

/** POST /api/mail/inbound: delivery-status mails as the mail server hands them on. */
export function inboundMail(_deps: Deps): RequestHandler {
  return (_request, response) => {
    response.sendStatus(204);
  };
}
