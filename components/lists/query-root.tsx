'use client';

import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { type ReactNode, useState } from 'react';
import { AskFailed } from '@/components/lists/ask';

const TRIES = 2;

/** What the pages of a list ask of the server, kept while they are open. What cannot get better is not asked again. */
export function QueryRoot({ children }: { readonly children: ReactNode }) {
  const [client] = useState(
    () =>
      new QueryClient({
        defaultOptions: {
          queries: {
            staleTime: 60_000,
            refetchOnWindowFocus: false,
            retry: (failures, error) =>
              failures < TRIES && !(error instanceof AskFailed && error.status >= 400 && error.status < 500),
          },
        },
      }),
  );
  return <QueryClientProvider client={client}>{children}</QueryClientProvider>;
}
