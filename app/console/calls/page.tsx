import type { Metadata } from 'next';
import { roleHas } from '@/lib/auth/permissions';
import { requirePage } from '../_components/require-page';
import { Calls } from './_components/calls';

export const metadata: Metadata = { title: 'Calls' };

interface CallsPageProps {
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function CallsPage({ searchParams }: CallsPageProps) {
  // A shared link with filters must survive signing in.
  const filters = Object.entries(await searchParams).flatMap(([name, value]) => (typeof value === 'string' ? [[name, value]] : []));
  const query = new URLSearchParams(filters).toString();
  const member = await requirePage('/console/calls', query ? `/console/calls?${query}` : undefined);
  return <Calls readsAll={roleHas(member.role, 'calls.read_all')} readsKeys={roleHas(member.role, 'keys.read')} />;
}
