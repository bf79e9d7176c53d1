import { createAuthClient } from 'better-auth/react';

/**
 * Signing in and out, and passwords. Loaded only by the screens that need it. Its plug-in that follows the server's
 * `url` is off: that address is for the button in a mail, and the screen alone knows where its reader was going.
 */
export const authClient = createAuthClient({ basePath: '/api/auth', disableDefaultFetchPlugins: true });
