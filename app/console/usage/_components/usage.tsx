'use client';

import { useSearchParams } from 'next/navigation';
import { useMemo } from 'react';
import useSWR from 'swr';
import { FailureNotice } from '@/app/_components/failure-notice';
import { LoadingPair } from '@/app/_components/loading-pair';
import { PageTitle } from '@/app/_components/page-title';
import { formatUtc } from '@/app/_format/times';
import { Choice } from './choice';
import { History } from './history';
import { QuotaTable } from './quota-table';
import { spans, sums, usagePath, viewOf, type UsageData, type UsageView } from './usage-view';

export function Usage() {
  const query = useSearchParams().toString();
  const { view, path } = useMemo(() => {
    const view = viewOf(new URLSearchParams(query));
    return { view, path: usagePath(view, new Date()) };
  }, [query]);
  const { data, error, mutate, isLoading } = useSWR<UsageData>(path, { keepPreviousData: true });

  function show(changed: Partial<UsageView>) {
    window.history.pushState(null, '', `?${new URLSearchParams({ ...view, ...changed })}`);
  }

  return (
    <>
      <PageTitle title="Usage">Units used against quota this month, from the rows that enforce it, and what was asked for over time.</PageTitle>
      {error && <FailureNotice error={error} onRetry={() => void mutate()} className="mb-5" />}
      {!data && !error && <LoadingPair label="Reading the usage" />}
      {data && (
        <>
          <section aria-labelledby="this-month">
            <h2 id="this-month" className="text-heading font-semibold">
              This month
            </h2>
            <p className="mb-3 text-small text-ash">
              Counts start again at <time dateTime={data.period.end}>{formatUtc(data.period.end).replace(':00.000', '')}</time>.
            </p>
            <QuotaTable organization={data.organization} keys={data.keys} />
          </section>
          <section aria-labelledby="history" className="mt-10">
            <div className="mb-4 flex flex-wrap items-baseline justify-between gap-x-8 gap-y-2">
              <h2 id="history" className="text-heading font-semibold">
                Over time
              </h2>
              <div className="flex flex-wrap gap-x-7 gap-y-2">
                <Choice label="Range" value={view.days} options={spans.map((span) => [span, `${span} days`])} onChange={(days) => show({ days })} />
                <Choice label="Summed by" value={view.by} options={Object.entries(sums) as [UsageView['by'], string][]} onChange={(by) => show({ by })} />
              </div>
            </div>
            <div className={isLoading ? 'opacity-60' : ''} aria-busy={isLoading}>
              <History by={data.by} rows={data.history} />
            </div>
          </section>
        </>
      )}
    </>
  );
}
