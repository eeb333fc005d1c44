/**
 * The one gate of the console's pages: without a session to sign-in and back here, without the page's
 * permission to a calm 403. The API asks again on every request; this only decides what is drawn.
 */
import { forbidden, redirect } from 'next/navigation';
import { currentMember, type Member } from '@/lib/auth/current-member';
import { consolePages, roleHas } from '@/lib/auth/permissions';

export type ConsolePath = (typeof consolePages)[number]['path'];

/** `here` is where sign-in leads back to when that is more than the page itself: a filter, a record. */
export async function requirePage(path: ConsolePath, here: string = path): Promise<Member> {
  const member = await currentMember();
  if (!member) redirect(`/sign-in?next=${encodeURIComponent(here)}`);
  const page = consolePages.find((candidate) => candidate.path === path);
  if (!page || !roleHas(member.role, page.permission)) forbidden();
  return member;
}
