import { timingSafeEqual, createHash } from 'node:crypto';
import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Fake } from '../fake.ts';
import { newId } from '../ids.ts';
import { Fault, invalidRequest } from './faults.ts';

export const nameRequest: RequestHandler = (request, response, next) => {
  response.set('request-id', newId('req'));
  const version = request.get('stripe-version');
  if (version !== undefined) response.set('stripe-version', version);
  next();
};

/** Plays an outage, as /control asks. */
export function outage(fake: Fake): RequestHandler {
  return (_request, response, next) => {
    if (fake.settings.down === 'drop') {
      response.destroy();
      return;
    }
    if (fake.settings.failNext > 0) {
      fake.settings.failNext -= 1;
      throw new Fault(500, { type: 'api_error', message: 'An unknown error occurred.' });
    }
    if (fake.settings.down) throw new Fault(503, { type: 'api_error', message: 'The API is down for the moment.' });
    next();
  };
}

function readKey(header: string | undefined): string | null {
  const [scheme, value = ''] = (header ?? '').split(' ');
  if (scheme?.toLowerCase() === 'bearer') return value;
  if (scheme?.toLowerCase() === 'basic') return Buffer.from(value, 'base64').toString().split(':')[0] ?? '';
  return null;
}

function isSame(one: string, other: string): boolean {
  const digest = (text: string) => createHash('sha256').update(text).digest();
  return timingSafeEqual(digest(one), digest(other));
}

export function requireSecretKey(fake: Fake): RequestHandler {
  return (request, _response, next) => {
    const key = readKey(request.get('authorization'));
    if (key !== null && isSame(key, fake.secretKey)) {
      next();
      return;
    }
    const message =
      key === null
        ? 'You did not provide an API key. Send it as a bearer token in the Authorization header.'
        : `Invalid API Key provided: ${key.slice(0, 8)}****${key.length > 16 ? key.slice(-4) : ''}`;
    throw new Fault(401, { type: 'invalid_request_error', message });
  };
}

export const unknownAddress: RequestHandler = (request) => {
  const message = `Unrecognized request URL (${request.method}: ${request.originalUrl.split('?')[0]}).`;
  throw new Fault(404, { type: 'invalid_request_error', message });
};

function toFault(error: unknown): Fault | null {
  if (error instanceof Fault) return error;
  const isBodyFault = error instanceof Error && 'type' in error && 'status' in error && error.status !== 500;
  return isBodyFault ? invalidRequest(`The request body cannot be read: ${error.message}`) : null;
}

// eslint-disable-next-line max-params -- Express knows an error handler by its four parameters.
export const answerFault: ErrorRequestHandler = (error: unknown, _request, response, next) => {
  const fault = toFault(error);
  if (fault) response.status(fault.status).json({ error: fault.body });
  else next(error);
};
