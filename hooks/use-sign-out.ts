import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';

/** Ends the session and forgets what it fetched; then a fresh page, so that nothing of it stays in the window. */
export function useSignOut() {
  const client = useQueryClient();
  const [isLeaving, setLeaving] = useState(false);
  const signOut = async () => {
    setLeaving(true);
    const { authClient } = await import('./auth-client.ts');
    await authClient.signOut();
    client.clear();
    window.location.assign('/');
  };
  return { signOut: () => void signOut(), isLeaving };
}
