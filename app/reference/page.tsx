import type { Metadata } from 'next';
import { PublicFrame } from '@/app/_components/public-frame';
import { Reference } from './reference';

export const metadata: Metadata = { title: 'API reference' };

export default function ReferencePage() {
  return (
    <PublicFrame>
      <h1 className="sr-only">API reference</h1>
      <Reference />
    </PublicFrame>
  );
}
