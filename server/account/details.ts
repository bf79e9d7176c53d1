import type { MyDetails, MyDetailsEdit } from '#shared/contracts/account.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { findProfile, saveProfile } from './account-queries.ts';
import { recordConsent } from './consent.ts';
import { findContact, listConsents } from './consent-queries.ts';

export async function readMyDetails(deps: Deps, userId: string): Promise<MyDetails> {
  const person = await findProfile(deps.db, userId);
  if (!person) throw new AppError('NOT_FOUND', 'This account is closed.');
  const email = person.email.toLowerCase();
  const contact = await findContact(deps.db, { email });
  const [last] = await listConsents(deps.db, email);
  return {
    name: person.name,
    email: person.email,
    phone: person.phone ?? '',
    news: { isGiven: contact?.isSubscribed ?? false, since: last?.createdAt.toISOString() ?? null },
  };
}

export async function editMyDetails(deps: Deps, userId: string, edit: MyDetailsEdit): Promise<MyDetails> {
  await deps.db.transaction((tx) => saveProfile(tx, userId, edit));
  return readMyDetails(deps, userId);
}

export async function setMyNews(
  deps: Deps,
  person: { id: string; email: string },
  isGiven: boolean,
): Promise<MyDetails> {
  await deps.db.transaction((tx) => recordConsent(tx, deps, { email: person.email, isGiven, source: 'account' }));
  return readMyDetails(deps, person.id);
}
