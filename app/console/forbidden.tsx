import type { Metadata } from 'next';
import { PageTitle } from '@/app/_components/page-title';
import { ButtonLink } from '@/app/_components/button';

export const metadata: Metadata = { title: 'Not for this role' };

/** Stands inside the console's frame, so the pages that the role does have stay at hand. */
export default function Forbidden() {
  return (
    <>
      <PageTitle title="Not for this role">Your role in the organization does not include this page. An owner or admin can change your role.</PageTitle>
      <ButtonLink href="/console">To your pages</ButtonLink>
    </>
  );
}
