import { createHash, timingSafeEqual } from 'node:crypto';
import type { RequestHandler } from 'express';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { readDeliveryReport } from './delivery-report.ts';
import { findMailByMessageId, markBounced } from './mail-queries.ts';

/**
 * POST /api/mail/inbound: delivery-status mails as the mail server hands them on, under a token that it shares with us.
 * A mail that is no report, or a report on no mail of ours, is taken and put aside.
 */
export function inboundMail(deps: Deps): RequestHandler {
  return async (request, response) => {
    if (!isToken(request.headers.authorization, deps.mailInboundToken)) {
      throw new AppError('UNAUTHENTICATED', 'The token of the mail server is missing or wrong.');
    }
    const body: unknown = request.body;
    const report = Buffer.isBuffer(body) ? await readDeliveryReport(body) : null;
    const mail = report && (await findMailByMessageId(deps.db, report.messageId));
    if (mail) {
      const address = mail.toAddress.toLowerCase();
      const failure = report.failures.find((each) => each.address.toLowerCase() === address);
      if (failure) await markBounced(deps.db, mail.id, failure.reason);
    }
    response.sendStatus(204);
  };
}

function isToken(header: string | undefined, token: string): boolean {
  const digest = (text: string) => createHash('sha256').update(text).digest();
  return timingSafeEqual(digest(header ?? ''), digest(`Bearer ${token}`));
}
