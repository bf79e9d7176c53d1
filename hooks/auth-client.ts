import { createAuthClient } from 'better-auth/react';

/** Signing in and out, and passwords. Loaded only by the screens that need it. */
export const authClient = createAuthClient({ basePath: '/api/auth' });
