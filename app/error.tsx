'use client';

import { Button, ButtonLink } from './_components/button';
import { PageTitle } from './_components/page-title';

interface ErrorPageProps {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}

export default function ErrorPage({ error, reset }: ErrorPageProps) {
  return (
    <div className="mx-auto max-w-page px-5 pt-5 sm:px-7">
      <PageTitle title="This page could not be drawn">
        Either the service cannot reach its database or the page has a fault. Nothing you sent was lost halfway: a call is recorded or it did not happen.
      </PageTitle>
      <div className="flex flex-wrap items-center gap-3">
        <Button onClick={reset}>Try again</Button>
        <ButtonLink href="/">Front page</ButtonLink>
        {error.digest && <span className="font-mono text-fine text-ash">fault {error.digest}</span>}
      </div>
    </div>
  );
}
