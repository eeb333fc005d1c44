'use client';

import dynamic from 'next/dynamic';
import { LoadingPair } from '@/app/_components/loading-pair';

/** The viewer is large and needs a browser, so only this page fetches it, and only in the browser. */
export const Reference = dynamic(() => import('./viewer'), {
  ssr: false,
  loading: () => <LoadingPair label="Reading the API reference" className="mt-10" />,
});
