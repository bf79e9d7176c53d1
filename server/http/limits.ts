import { rateLimit } from 'express-rate-limit';
import type { RequestHandler } from 'express';
import { AppError } from '#shared/errors.ts';

/** Posts that anybody can send without signing in, and that hold stock, ask the payment company or write a mail. */
export const COSTLY_POSTS = [
  '/api/orders',
  '/api/orders/:token/additions',
  '/api/orders/:token/balance',
  '/api/orders/:token/balance-page',
  '/api/promo-checks',
  '/api/waiting-list',
  '/api/account/close',
];

/** So many of them a minute from one address. People do not come near it; a script that tries codes or holds stock does. */
export function limitCostly(perMinute: number): RequestHandler {
  return rateLimit({
    windowMs: 60_000,
    limit: perMinute,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    // Express reads the address behind our own proxy alone ('trust proxy' is loopback).
    validate: { xForwardedForHeader: false },
    handler: (_request, _response, next) => {
      next(
        new AppError(
          'TOO_MANY_REQUESTS',
          'This is more than we take from one connection in a minute. Nothing was ordered or charged, and your basket is kept; please wait a minute and press again.',
        ),
      );
    },
  });
}
