import { useMutation, useQueryClient } from '@tanstack/react-query';
import { getMe } from '#shared/contracts/office.ts';
import type { Role } from '#shared/domain/roles.ts';
import { call } from './api.ts';
import { meQuery } from './me.ts';

/** A refusal of the sign-in library in our words, beside its field where it has one. */
export class AccountRefusal extends Error {
  readonly field: 'email' | 'password' | undefined;
  readonly code: string;

  constructor(code: string, { message, field }: Sentence) {
    super(message);
    this.name = 'AccountRefusal';
    this.code = code;
    this.field = field;
  }
}

type Sentence = { message: string; field?: 'email' | 'password' };

const sentences: Record<string, Sentence> = {
  INVALID_EMAIL_OR_PASSWORD: {
    message: 'E-mail and password do not belong together. Check both, or choose a new password.',
  },
  EMAIL_NOT_VERIFIED: {
    message:
      'This address is not confirmed yet. We have just sent the mail again: press the button in it, then sign in.',
  },
  USER_ALREADY_EXISTS: { message: 'There is an account with this address already. Sign in instead.', field: 'email' },
  USER_ALREADY_EXISTS_USE_ANOTHER_EMAIL: {
    message: 'There is an account with this address already. Sign in instead.',
    field: 'email',
  },
  INVALID_EMAIL: { message: 'Give an e-mail address such as name@example.com.', field: 'email' },
  PASSWORD_TOO_SHORT: { message: 'Take at least ten characters.', field: 'password' },
  PASSWORD_TOO_LONG: { message: 'This password is too long.', field: 'password' },
  INVALID_TOKEN: { message: 'This link was used before or is older than an hour. Ask for a new one.' },
};

const unknown: Sentence = { message: 'That did not work, and nothing was changed. Please try again in a minute.' };
const tooOften: Sentence = { message: 'That was too often in a short time. Wait a minute, then try again.' };
const noLine: Sentence = { message: 'There is no connection just now. Nothing was changed.' };

type LibraryAnswer = { error: { code?: string | undefined; status: number } | null };

function refuse({ error }: LibraryAnswer): void {
  if (!error) return;
  const code = error.code ?? '';
  throw new AccountRefusal(code, sentences[code] ?? (error.status === 429 ? tooOften : unknown));
}

/** The sign-in library is large: it comes when a form is sent, not with the page. */
async function client() {
  try {
    return (await import('./auth-client.ts')).authClient;
  } catch {
    throw new AccountRefusal('', noLine);
  }
}

/** Where the buttons in the mails of the sign-in library lead back to. */
const CONFIRMED = '/account?confirmed=1';
const NEW_PASSWORD = '/account/new-password';

export type SignIn = { email: string; password: string };
export type SignUp = SignIn & { name: string };

export function useSignIn() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: async ({ email, password }: SignIn): Promise<Role> => {
      const answer = await (await client()).signIn.email({ email: email.trim(), password, callbackURL: CONFIRMED });
      refuse(answer);
      const me = await call(getMe, {});
      // Set, not only asked again: the next screen would still read that nobody is signed in, and lead back here.
      queries.setQueryData(meQuery().queryKey, me);
      return me.user?.role ?? 'customer';
    },
  });
}

export function useSignUp() {
  return useMutation({
    mutationFn: async ({ name, email, password }: SignUp) => {
      refuse(
        await (
          await client()
        ).signUp.email({ name: name.trim(), email: email.trim(), password, callbackURL: CONFIRMED }),
      );
    },
  });
}

export function useAskReset() {
  return useMutation({
    mutationFn: async ({ email }: { email: string }) => {
      refuse(await (await client()).requestPasswordReset({ email: email.trim(), redirectTo: NEW_PASSWORD }));
    },
  });
}

export function useNewPassword(token: string) {
  return useMutation({
    mutationFn: async ({ password }: { password: string }) => {
      refuse(await (await client()).resetPassword({ newPassword: password, token }));
    },
  });
}

/** What a form shows of a refusal. */
export function accountRefusalOf(error: Error | null): { message: string; field?: string | undefined } | undefined {
  if (!error) return undefined;
  return { message: error.message, field: error instanceof AccountRefusal ? error.field : undefined };
}

/** Where to go after signing in: only ever to a place of this site. */
export function placeAfterSignIn(next: string | undefined, role: Role): string {
  if (next && /^\/(?![/\\])/.test(next)) return next;
  return role === 'butcher' ? '/trade' : role === 'customer' ? '/account' : '/office';
}
