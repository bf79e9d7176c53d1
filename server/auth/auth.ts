import { betterAuth } from 'better-auth';
import { drizzleAdapter } from 'better-auth/adapters/drizzle';
import { APIError, createAuthMiddleware } from 'better-auth/api';
import { admin } from 'better-auth/plugins';
import { createAccessControl } from 'better-auth/plugins/access';
import * as tables from '#db/schema/auth.ts';
import type { Db } from '#db/client.ts';

/** better-auth's own endpoints that the app uses; every other one is closed. Beside each: who may call it. */
export const AUTH_ENDPOINTS = {
  '/sign-up/email': 'public',
  '/sign-in/email': 'public',
  '/sign-out': 'public',
  '/get-session': 'public',
  '/verify-email': 'public',
  '/send-verification-email': 'public',
  '/request-password-reset': 'public',
  '/reset-password/:token': 'public',
  '/reset-password': 'public',
  '/change-password': 'signed-in',
} as const;

const ac = createAccessControl({ farm: ['use'] });
const roles = {
  customer: ac.newRole({ farm: [] }),
  butcher: ac.newRole({ farm: [] }),
  packer: ac.newRole({ farm: [] }),
  owner: ac.newRole({ farm: ['use'] }),
};

export type AuthMail = { to: string; name: string; url: string };

export type AuthOptions = {
  db: Db;
  secret: string;
  origin: string;
  sendVerification: (mail: AuthMail) => Promise<void>;
  sendPasswordReset: (mail: AuthMail) => Promise<void>;
  /** Off in tests, which sign in faster than people do. */
  isRateLimited: boolean;
};

export type Auth = ReturnType<typeof initAuth>;

export function initAuth(options: AuthOptions) {
  return betterAuth({
    database: drizzleAdapter(options.db, { provider: 'pg', schema: tables }),
    secret: options.secret,
    baseURL: options.origin,
    basePath: '/api/auth',
    trustedOrigins: [options.origin],
    emailAndPassword: {
      enabled: true,
      requireEmailVerification: true,
      minPasswordLength: 10,
      revokeSessionsOnPasswordReset: true,
      sendResetPassword: ({ user, url }) => options.sendPasswordReset({ to: user.email, name: user.name, url }),
    },
    emailVerification: {
      sendOnSignUp: true,
      sendOnSignIn: true,
      autoSignInAfterVerification: true,
      sendVerificationEmail: ({ user, url }) => options.sendVerification({ to: user.email, name: user.name, url }),
    },
    plugins: [admin({ ac, roles, defaultRole: 'customer', adminRoles: ['owner'] })],
    rateLimit: { enabled: options.isRateLimited, storage: 'database', window: 60, max: 60 },
    disabledPaths: closedPaths(),
    hooks: { before: closeTheRest },
    advanced: {
      database: { generateId: 'uuid' },
      // Both checks are off by default when NODE_ENV is `test`: the tests must meet the same door as a browser.
      disableOriginCheck: false,
      disableCSRFCheck: false,
      ipAddress: { ipAddressHeaders: ['x-client-address'] },
    },
  });
}

/** Closed paths are compared letter by letter, which misses those with a parameter: whatever is not in the table ends here. */
const closeTheRest = createAuthMiddleware(({ path }) => {
  if (path && !(path in AUTH_ENDPOINTS)) throw new APIError('NOT_FOUND');
  return Promise.resolve();
});

/** The endpoints of better-auth 1.7 and its admin plugin that the app does not use; a test walks them all. */
function closedPaths(): string[] {
  const core = [
    '/sign-in/social',
    '/change-email',
    '/update-user',
    '/update-session',
    '/delete-user',
    '/delete-user/callback',
  ];
  const sessions = [
    '/list-sessions',
    '/revoke-session',
    '/revoke-sessions',
    '/revoke-other-sessions',
    '/verify-password',
  ];
  const accounts = [
    '/link-social',
    '/list-accounts',
    '/unlink-account',
    '/refresh-token',
    '/get-access-token',
    '/account-info',
    '/set-password',
  ];
  const admins = [
    'set-role',
    'get-user',
    'create-user',
    'update-user',
    'list-users',
    'list-user-sessions',
    'unban-user',
    'ban-user',
    'impersonate-user',
    'stop-impersonating',
    'revoke-user-session',
    'revoke-user-sessions',
    'remove-user',
    'set-user-password',
    'has-permission',
  ].map((name) => `/admin/${name}`);
  return [...core, ...sessions, ...accounts, ...admins, '/ok', '/error', '/callback/:id'];
}
