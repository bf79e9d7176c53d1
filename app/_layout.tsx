import { QueryClientProvider } from '@tanstack/react-query';
import { Slot, type ErrorBoundaryProps } from 'expo-router';
import { useState } from 'react';
import { PageBroken } from '#components/shop/page-broken.tsx';
import { createQueryClient } from '#hooks/query-client.ts';

export default function RootLayout() {
  const [queryClient] = useState(createQueryClient);
  return (
    <QueryClientProvider client={queryClient}>
      <Slot />
    </QueryClientProvider>
  );
}

/** The router keeps what a page brought along, a failure included: only a fresh page asks again. */
export function ErrorBoundary(_props: ErrorBoundaryProps) {
  return <PageBroken onRetry={() => window.location.reload()} />;
}
