'use client';

import type { Ref } from 'react';
import { FailureNotice } from '@/app/_components/failure-notice';
import { asProblem } from '@/app/_api/client';
import { LoadingPair } from '@/app/_components/loading-pair';
import { Notice } from '@/app/_components/notice';
import type { Calculation } from '@/lib/solvers/calculation';
import { AnswerView } from '../_answer/answer-view';
import { SnippetTabs } from '../_snippet/snippet-tabs';
import { BeforeFirstRun } from './before-first-run';
import { CopyLink } from './copy-link';
import type { Call } from './use-call';

/** Failures that may pass by themselves. */
const passing = [0, 429, 500, 502, 503, 504];

interface AnswerColumnProps {
  readonly ref: Ref<HTMLElement>;
  readonly calculation: Calculation;
  readonly path: string;
  readonly call: Call;
  /** What the form would send now; undefined while it cannot. */
  readonly current: unknown;
  readonly onRetry: () => void;
}

/** Right of the form, below it on a phone: the answer with everything that makes it usable elsewhere. */
export function AnswerColumn({ ref, calculation, path, call, current, onRetry }: AnswerColumnProps) {
  const { state, answered, error } = call;
  const waiting = state === 'waiting';
  const stale = answered !== null && !waiting && current !== undefined && JSON.stringify(current) !== JSON.stringify(answered.input);
  const outdated = answered !== null && (stale || state === 'refused' || current === undefined);
  const shown = answered?.input ?? current;
  return (
    <section ref={ref} aria-label="Answer" aria-busy={waiting} className="min-w-0 scroll-mt-4 space-y-7 lg:pt-1">
      {waiting && <LoadingPair label="Calculating" />}
      {state === 'refused' && <FailureNotice error={error} onRetry={passing.includes(asProblem(error).status) ? onRetry : undefined} />}
      {outdated && !waiting && (
        <div role="status">
          <Notice title="Out of date.">The form has changed since this answer. Calculate brings it up to date.</Notice>
        </div>
      )}
      {!answered && !waiting && state !== 'refused' && <BeforeFirstRun calculation={calculation} />}
      {answered && (
        <div className={waiting ? 'opacity-60 transition-opacity' : 'transition-opacity'}>
          <AnswerView calculation={calculation} answer={answered.answer} />
        </div>
      )}
      {shown !== undefined && (
        <div className="space-y-4">
          <SnippetTabs path={path} input={shown} />
          <CopyLink input={shown} />
        </div>
      )}
    </section>
  );
}
