import type { Metadata } from 'next';
import Link from 'next/link';
import { EmptyState } from '@/app/_components/empty-state';
import { ButtonLink } from '@/app/_components/button';
import { PageTitle } from '@/app/_components/page-title';
import { PublicFrame } from '@/app/_components/public-frame';
import { formatCount } from '@/app/_format/numbers';
import { findMethod } from '@/lib/solvers/registry';
import { verificationRecord } from '@/lib/verification/record';
import { standingOf, standingsByCalculation, type RecordedCheck } from '@/lib/verification/standing';
import { CheckList } from './_record/check-list';
import { FilterForm } from './_record/filter-form';
import { applyFilters, isNarrowed, readFilters, verificationHref, type Filters, type SearchParams } from './_record/filters';
import { Overview } from './_record/overview';
import { Reading } from './_record/reading';
import { counted } from './_record/standing-words';
import { Summary } from './_record/summary';
import './record.css';

export const metadata: Metadata = {
  title: 'Verification',
  description: 'Every published check value beside what the running engine computes for it now, with the difference and what is allowed.',
};

const checksAPage = 30;

export default async function VerificationPage({ searchParams }: { readonly searchParams: Promise<SearchParams> }) {
  const filters = readFilters(await searchParams);
  const record = await verificationRecord();
  const found = applyFilters(record.checks, filters);
  const narrowed = isNarrowed(filters);
  const isFirst = !narrowed && filters.page === 1;
  return (
    <PublicFrame>
      <PageTitle title="Verification">
        Values that were published, or found to 30 digits by another route than the engine’s, and beside each what the running engine computes for it now. Nothing here is pasted: the tests of every release read the same data.
      </PageTitle>
      <Summary record={record} inBrief={!isFirst} />
      {isFirst && (
        <>
          <Reading />
          <Overview record={record} />
        </>
      )}
      <div className="mt-10">
        <FilterForm filters={filters} />
      </div>
      {found.length === 0 ? <NothingFound narrowed={narrowed} failing={filters.failing} /> : <Found found={found} filters={filters} whole={record.checks.length} />}
    </PublicFrame>
  );
}

function Found({ found, filters, whole }: { readonly found: readonly RecordedCheck[]; readonly filters: Filters; readonly whole: number }) {
  const pages = Math.ceil(found.length / checksAPage);
  const page = Math.min(filters.page, pages);
  const from = (page - 1) * checksAPage;
  const shown = found.slice(from, from + checksAPage);
  const { values } = standingOf(found);
  const method = findMethod(filters.method);
  return (
    <>
      <p className="mt-3 text-small text-ash" role="status">
        {found.length === whole ? `All ${formatCount(whole)} checks` : `${formatCount(found.length)} of ${formatCount(whole)} checks`}, {counted(values, 'value')}
        {pages > 1 && `; here ${from + 1} to ${from + shown.length}`}.{' '}
        {method && (
          <>
            The method is{' '}
            <Link href={`/methods/${method.id}`} className="link">
              {method.title}
            </Link>
            .
          </>
        )}
      </p>
      <CheckList checks={shown} standings={standingsByCalculation(found)} />
      {pages > 1 && <Pages filters={filters} page={page} pages={pages} />}
    </>
  );
}

function Pages({ filters, page, pages }: { readonly filters: Filters; readonly page: number; readonly pages: number }) {
  return (
    <nav aria-label="Pages of checks" className="mt-8 flex flex-wrap items-center gap-x-2 gap-y-2 border-t border-rule pt-4 text-small">
      {Array.from({ length: pages }, (_, index) => index + 1).map((each) => (
        <Link
          key={each}
          href={verificationHref({ ...filters, page: each })}
          aria-label={`Page ${each}`}
          aria-current={each === page ? 'page' : undefined}
          className={`inline-flex h-row min-w-9 items-center justify-center rounded-field px-2 font-mono text-[13px] ${each === page ? 'bg-wash font-medium text-ink' : 'text-copper hover:bg-wash'}`}
        >
          {each}
        </Link>
      ))}
    </nav>
  );
}

function NothingFound({ narrowed, failing }: { readonly narrowed: boolean; readonly failing: boolean }) {
  return (
    <div className="mt-8">
      <EmptyState title={failing ? 'Every value holds' : 'No check fits'} actions={narrowed && <ButtonLink href="/verification">All checks</ButtonLink>}>
        {failing ? 'Nothing that the filters let through is beyond what is allowed.' : 'Take a filter away, or use other words: they are looked for in names, sources and quantities.'}
      </EmptyState>
    </div>
  );
}
