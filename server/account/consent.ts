import { randomBytes } from 'node:crypto';
import type { Subscription } from '#shared/contracts/account.ts';
import { CONSENT_VERSION, type ConsentSource } from '#shared/domain/consent.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { dropQueuedMarketing, findContact, insertConsent, turnContact } from './consent-queries.ts';

type Word = { email: string; isGiven: boolean; source: ConsentSource };

/** Writes down a yes or a no to marketing mail; the same word said twice is written once. */
export async function recordConsent(tx: Tx, deps: Deps, word: Word): Promise<void> {
  const email = word.email.toLowerCase();
  const token = randomBytes(24).toString('base64url');
  const contactId = await turnContact(tx, { email, token, isSubscribed: word.isGiven });
  if (!contactId) return;
  const { isGiven, source } = word;
  await insertConsent(tx, {
    ...{ contactId, isGiven, source },
    wordingVersion: CONSENT_VERSION,
    createdAt: deps.clock.now(),
  });
  if (!isGiven) await dropQueuedMarketing(tx, email);
}

/** The page that a marketing mail leads to, and the address that mail programs post to. */
export function unsubscribeUrl(deps: Deps, token: string): string {
  return `${deps.origin}/unsubscribe/${token}`;
}

export async function readSubscription(deps: Deps, token: string): Promise<Subscription> {
  const contact = await findContact(deps.db, { token });
  if (!contact) throw new AppError('NOT_FOUND', 'This link is not known here. Please open it from the mail once more.');
  return { email: withoutMiddle(contact.email), isSubscribed: contact.isSubscribed };
}

/** One request by the private link is enough, and may be repeated. */
export async function endSubscription(deps: Deps, token: string): Promise<Subscription> {
  await deps.db.transaction(async (tx) => {
    const contact = await findContact(tx, { token });
    if (contact) await recordConsent(tx, deps, { email: contact.email, isGiven: false, source: 'unsubscribe link' });
  });
  return readSubscription(deps, token);
}

/** `a…@example.com`: known to whom it belongs, of no use to anybody else. */
function withoutMiddle(email: string): string {
  const at = email.lastIndexOf('@');
  return `${email.slice(0, 1)}…${email.slice(at)}`;
}
