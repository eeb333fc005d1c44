'use client';

import Link from 'next/link';
import { isProblemSlug } from '@/lib/problems/problems';
import { asProblem } from '../_api/client';
import { Notice } from './notice';

interface FailureNoticeProps {
  readonly error: unknown;
  /** Given where trying again can help. */
  readonly onRetry?: () => void;
  readonly className?: string;
}

/** What the API refused, in its own words, with the page that says what to do and the id to quote. */
export function FailureNotice({ error, onRetry, className }: FailureNoticeProps) {
  const problem = asProblem(error);
  const passing = problem.status === 0 || problem.status === 429 || problem.status === 503;
  return (
    <Notice tone={passing ? 'warning' : 'error'} title={problem.detail ? `${problem.title}:` : `${problem.title}.`} className={className}>
      {problem.detail && `${problem.detail}. `}
      {isProblemSlug(problem.code) && (
        <Link href={`/problems/${problem.code}`} className="link">
          What to do
        </Link>
      )}
      {onRetry && (
        <button type="button" onClick={onRetry} className="link ml-3">
          Try again
        </button>
      )}
      {problem.request_id && <span className="block font-mono text-fine text-ash">{problem.request_id}</span>}
    </Notice>
  );
}
