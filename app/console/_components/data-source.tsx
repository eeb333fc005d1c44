'use client';

import type { ReactNode } from 'react';
import { SWRConfig } from 'swr';
import { asProblem, fetcher } from '@/app/_api/client';

/** How the console's pages read: from /api/v1, again when the window is looked at again. */
export function DataSource({ children }: { readonly children: ReactNode }) {
  return (
    <SWRConfig
      value={{
        fetcher,
        // A refusal stays a refusal; only what may pass by itself is tried again.
        shouldRetryOnError: (error: unknown) => [0, 500, 502, 503, 504].includes(asProblem(error).status),
        errorRetryInterval: 4000,
      }}
    >
      {children}
    </SWRConfig>
  );
}
