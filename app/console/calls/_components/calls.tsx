'use client';

import { useSearchParams } from 'next/navigation';
import { useMemo, useState } from 'react';
import useSWR from 'swr';
import { asProblem } from '@/app/_api/client';
import { Button, ButtonLink } from '@/app/_components/button';
import { EmptyState } from '@/app/_components/empty-state';
import { FailureNotice } from '@/app/_components/failure-notice';
import { LoadingPair } from '@/app/_components/loading-pair';
import { PageTitle } from '@/app/_components/page-title';
import { firstCall } from '@/app/console/_components/first-call';
import type { Call } from './call';
import { callsPath, filtersOf, queryOf, type CallFilters } from './call-filters';
import { CallTable } from './call-table';
import { FilterBar } from './filter-bar';

interface CallsProps {
  /** False for a role that sees only the calls it made itself. */
  readonly readsAll: boolean;
  readonly readsKeys: boolean;
}

interface CallPage {
  readonly data: readonly Call[];
  readonly next_cursor: string | null;
}

export function Calls({ readsAll, readsKeys }: CallsProps) {
  const parameters = useSearchParams();
  const query = parameters.toString();
  const filters = useMemo(() => filtersOf(new URLSearchParams(query)), [query]);
  const cursor = parameters.get('cursor');
  // "Last hour" counts from when the page was opened or the filter chosen, so that its pages fit together.
  const [openedAt, setOpenedAt] = useState(presentMoment);
  const path = callsPath(filters, cursor, openedAt);
  // Newest page: new calls appear by themselves. An older page does not move under the reader.
  const { data, error, mutate, isLoading } = useSWR<CallPage>(path, { refreshInterval: cursor ? 0 : 15_000, keepPreviousData: true });
  /** Which page each older one was reached from. */
  const [newerThan, setNewerThan] = useState<ReadonlyMap<string, string | null>>(new Map());

  function show(filters: CallFilters, cursor: string | null = null) {
    if (cursor === null) setOpenedAt(presentMoment());
    const next = queryOf(filters, cursor);
    window.history.pushState(null, '', next ? `?${next}` : window.location.pathname);
  }

  function showOlder(next: string) {
    setNewerThan((pages) => new Map(pages).set(next, cursor));
    show(filters, next);
    window.scrollTo({ top: 0 });
  }

  const known = cursor !== null && newerThan.has(cursor);
  const filtered = queryOf(filters) !== '';
  return (
    <>
      <PageTitle title="Calls">
        {readsAll
          ? 'Every call answered for this organization, newest first. Pick one to see its request, its answer and what it rests on.'
          : 'The calls you made on the Bench, newest first. Pick one to see its request, its answer and what it rests on.'}
      </PageTitle>
      <FilterBar filters={filters} readsKeys={readsKeys} onChange={(changed) => show({ ...filters, ...changed })} />
      {error && (
        <div className="mb-5">
          <FailureNotice error={error} onRetry={() => void mutate()} />
          {asProblem(error).status === 400 && cursor && (
            <Button variant="ghost" className="mt-3" onClick={() => show(filters)}>
              Start at the newest
            </Button>
          )}
        </div>
      )}
      {!data && !error && <LoadingPair label="Reading the call log" />}
      {data && !error && data.data.length > 0 && (
        <div className={isLoading ? 'opacity-60' : ''} aria-busy={isLoading}>
          <CallTable calls={data.data} />
        </div>
      )}
      {data && !error && data.data.length === 0 && <NoCalls filtered={filtered || cursor !== null} onClear={() => show(filtersOf(new URLSearchParams()))} />}
      {data && (cursor !== null || data.next_cursor !== null) && (
        <nav aria-label="Pages" className="mt-4 flex gap-3">
          {cursor !== null && (
            <Button variant="ghost" onClick={() => show(filters, known ? newerThan.get(cursor) : null)}>
              {known ? 'Newer' : 'Newest'}
            </Button>
          )}
          {data.next_cursor !== null && (
            <Button variant="ghost" onClick={() => showOlder(data.next_cursor!)}>
              Older
            </Button>
          )}
        </nav>
      )}
    </>
  );
}

function presentMoment(): number {
  return Date.now();
}

function NoCalls({ filtered, onClear }: { readonly filtered: boolean; readonly onClear: () => void }) {
  if (filtered) {
    return (
      <EmptyState title="No call matches" actions={<Button variant="ghost" onClick={onClear}>Show all calls</Button>}>
        Nothing in the log fits these filters. Widen the time or drop a filter.
      </EmptyState>
    );
  }
  return (
    <EmptyState
      title="No call yet"
      command={firstCall(window.location.origin, ['lines:run'])}
      actions={<ButtonLink href="/console/bench">To the Bench</ButtonLink>}
    >
      The first call appears here as soon as it is answered. Make it on the Bench, or with a key:
    </EmptyState>
  );
}
