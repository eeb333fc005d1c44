import type { Metadata } from 'next';
import { ButtonLink } from './_components/button';
import { PageTitle } from './_components/page-title';
import { PublicFrame } from './_components/public-frame';

export const metadata: Metadata = { title: 'Nothing here' };

export default function NotFound() {
  return (
    <PublicFrame>
      <PageTitle title="There is nothing here">The address leads to no page. Check it for a missing character, or start again from one of these.</PageTitle>
      <div className="flex flex-wrap gap-3">
        <ButtonLink href="/">Front page</ButtonLink>
        <ButtonLink href="/reference">API reference</ButtonLink>
        <ButtonLink href="/console">Console</ButtonLink>
      </div>
    </PublicFrame>
  );
}
