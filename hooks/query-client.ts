import { QueryClient } from '@tanstack/react-query';
import { ConnectionLost } from './api.ts';

/** How long figures count as fresh. */
export const STALE = {
  /** What is left of a day: others are buying too. */
  stock: 10_000,
  /** Things that one person edits. */
  office: 30_000,
} as const;

export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: { staleTime: STALE.office, retry: (count, error) => error instanceof ConnectionLost && count < 3 },
    },
  });
}
