import { randomUUID } from 'node:crypto';
import type { RequestHandler } from 'express';
import { AppError } from '#shared/errors.ts';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/** A browser names the page that sends a change; only our own may. Callers without that header are no browser. */
export const sameOrigin: RequestHandler = (request, _response, next) => {
  const origin = request.headers.origin;
  if (SAFE.has(request.method) || !origin) return next();
  const host = URL.canParse(origin) ? new URL(origin).host : '';
  if (host !== request.headers.host) throw new AppError('FORBIDDEN', 'This came from another site. Nothing was done.');
  next();
};

export const requestId: RequestHandler = (request, response, next) => {
  request.id = randomUUID();
  response.setHeader('X-Request-Id', request.id);
  next();
};

/** Paths that cannot be decoded and `//host` addresses are answered before anything reads them. */
export const sanePath: RequestHandler = (request, _response, next) => {
  if (request.path.startsWith('//')) throw new AppError('NOT_FOUND', 'There is no such page.');
  decodeURIComponent(request.path);
  next();
};

/** better-auth counts attempts by address: the header is written here, so that no caller can forge it. */
export const clientAddress: RequestHandler = (request, _response, next) => {
  request.headers['x-client-address'] = request.ip ?? 'unknown';
  next();
};

const LOOPBACK = new Set(['localhost', '127.0.0.1', '[::1]']);

/** This machine goes by several names, but cookies and sign-in by one: a page asked for by another is looked up there. */
export function oneLoopbackName(origin: string): RequestHandler {
  const ours = new URL(origin);
  return (request, response, next) => {
    const host = `http://${request.headers.host ?? ''}`;
    const asked = URL.canParse(host) ? new URL(host) : ours;
    const isOtherName = LOOPBACK.has(asked.hostname) && LOOPBACK.has(ours.hostname) && asked.port === ours.port;
    if (!isOtherName || asked.hostname === ours.hostname) return next();
    response.redirect(307, ours.origin + request.originalUrl);
  };
}
