import { createHash } from 'node:crypto';
import type { KeptAnswer, Store } from '../store.ts';
import { Fault, invalidRequest } from './faults.ts';
import { canonicalText, toJson } from './json.ts';

const longestKey = 255;

export type KeyedRequest = { key: string; endpoint: string; body: unknown };

function fingerprint(body: unknown): string {
  return createHash('sha256')
    .update(canonicalText(toJson(body)))
    .digest('hex');
}

/** The answer that this key has had before. The same key for anything else is refused. */
export function findKeptAnswer(store: Store, { key, endpoint, body }: KeyedRequest): KeptAnswer | undefined {
  if (key.length > longestKey) throw invalidRequest(`Idempotency keys have up to ${longestKey} characters`);
  const kept = store.answers.get(key);
  if (!kept) return undefined;
  const refuse = (message: string) => new Fault(400, { type: 'idempotency_error', message });
  if (kept.endpoint !== endpoint) {
    throw refuse(
      `Keys for idempotent requests can only be used for the same endpoint they were first used for ('${kept.endpoint}' vs '${endpoint}'). Try using a key other than '${key}' if you meant to execute a different request.`,
    );
  }
  if (kept.fingerprint !== fingerprint(body)) {
    throw refuse(
      `Keys for idempotent requests can only be used with the same parameters they were first used with. Try using a key other than '${key}' if you meant to execute a different request.`,
    );
  }
  return kept;
}

type Given = Pick<KeptAnswer, 'status' | 'body' | 'requestId'>;

/** Keeps what was carried out: successes and declines. A request that was refused before may be sent again. */
export function keepAnswer(store: Store, request: KeyedRequest, answer: Given): void {
  if (answer.status !== 200 && answer.status !== 402) return;
  store.answers.set(request.key, { endpoint: request.endpoint, fingerprint: fingerprint(request.body), ...answer });
  store.changed();
}
