import type { Metadata } from 'next';
import { roleHas } from '@/lib/auth/permissions';
import { requirePage } from '../_components/require-page';
import { Keys } from './_components/keys';

export const metadata: Metadata = { title: 'Keys' };

export default async function KeysPage() {
  const member = await requirePage('/console/keys');
  return <Keys canManage={roleHas(member.role, 'keys.manage')} />;
}
