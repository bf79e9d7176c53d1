import type { Request, RequestHandler, Response } from 'express';
import type { Fake } from '../fake.ts';
import type { KeptAnswer } from '../store.ts';
import { expand } from './expand.ts';
import { Fault } from './faults.ts';
import { findKeptAnswer, keepAnswer, type KeyedRequest } from './idempotency.ts';
import { Params } from './params.ts';

/** `id` is the one in the address, or empty. */
type Call = { params: Params; id: string };
export type Handler = (call: Call) => object;

type Answer = Pick<KeptAnswer, 'status' | 'body'>;

function carryOut(fake: Fake, request: Request, handler: Handler): Answer {
  const params = new Params(request.method === 'POST' ? request.body : request.query);
  try {
    const paths = params.texts('expand');
    const answer = handler({ params, id: String(request.params.id ?? '') });
    return { status: 200, body: JSON.stringify(expand(fake.store, answer, paths)) };
  } catch (error) {
    if (error instanceof Fault) return { status: error.status, body: JSON.stringify({ error: error.body }) };
    throw error;
  }
}

function readKey(request: Request): KeyedRequest | null {
  const key = request.get('idempotency-key');
  if (request.method !== 'POST' || key === undefined) return null;
  return { key, endpoint: request.baseUrl + request.path, body: request.body };
}

function send(fake: Fake, response: Response, answer: Answer): void {
  if (fake.settings.dropAnswers > 0) {
    fake.settings.dropAnswers -= 1;
    response.destroy();
    return;
  }
  response.status(answer.status).type('json').send(answer.body);
}

/** Answers one API call: replays a kept answer, or runs the handler, expands what it gives and keeps the answer. */
export function endpoint(fake: Fake, handler: Handler): RequestHandler {
  return (request, response) => {
    const keyed = readKey(request);
    if (keyed) response.set('idempotency-key', keyed.key);
    const kept = keyed && findKeptAnswer(fake.store, keyed);
    if (kept) {
      response.set({ 'idempotent-replayed': 'true', 'original-request': kept.requestId });
      send(fake, response, kept);
      return;
    }
    const answer = carryOut(fake, request, handler);
    const requestId = response.get('request-id') ?? '';
    if (keyed) keepAnswer(fake.store, keyed, { ...answer, requestId });
    send(fake, response, answer);
  };
}
