import { redirect } from 'next/navigation';
import { currentMember } from '@/lib/auth/current-member';
import { consolePages, roleHas } from '@/lib/auth/permissions';

/** Leads to the first page that the role may open. */
export default async function ConsolePage() {
  const member = await currentMember();
  if (!member) redirect('/sign-in');
  const first = consolePages.find((page) => roleHas(member.role, page.permission));
  redirect(first?.path ?? '/console/usage');
}
