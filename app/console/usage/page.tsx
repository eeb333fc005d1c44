import type { Metadata } from 'next';
import { requirePage } from '../_components/require-page';
import { Usage } from './_components/usage';

export const metadata: Metadata = { title: 'Usage' };

export default async function UsagePage() {
  await requirePage('/console/usage');
  return <Usage />;
}
