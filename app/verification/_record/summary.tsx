import Link from 'next/link';
import { Figure, Figures } from '@/app/_components/figure';
import { LocalTime } from '@/app/_components/local-time';
import { formatCount } from '@/app/_format/numbers';
import type { VerificationRecord } from '@/lib/verification/record';
import { percent } from './digits';
import { verificationHref } from './filters';
import { Spread } from './spread';

/** How the whole record stands, whatever is filtered below; in brief where a small screen is wanted for that. */
export function Summary({ record, inBrief }: { readonly record: VerificationRecord; readonly inBrief: boolean }) {
  const { checks, values, failingChecks, failingValues, worst } = record.whole;
  const holds = failingValues === 0;
  return (
    <section aria-label="How the record stands" className="flex flex-wrap items-end justify-between gap-x-12 gap-y-6 rounded-field bg-wash px-5 py-5">
      <div className="min-w-0">
        <p className={`text-figure font-semibold ${holds ? 'text-patina' : 'text-garnet'}`}>
          {holds ? (
            'All values hold'
          ) : (
            <Link href={verificationHref({ failing: true })} className="underline underline-offset-4">
              {formatCount(failingValues)} {failingValues === 1 ? 'value does' : 'values do'} not hold, in {formatCount(failingChecks)} {failingChecks === 1 ? 'check' : 'checks'}
            </Link>
          )}
        </p>
        <Figures className="mt-3">
          <Figure label="Checks" value={formatCount(checks)} />
          <Figure label="Values" value={formatCount(values)} />
          {holds && worst && <Figure label="Nearest to its limit" value={percent(worst.share)} unit="of what is allowed" />}
          <Figure label="Engine" value={record.engine} />
        </Figures>
        <p className="mt-3 text-fine text-ash">
          Computed by the process that runs since <LocalTime iso={record.startedAt} />.
        </p>
      </div>
      <div className={`w-full sm:block sm:w-[340px] ${inBrief ? 'hidden' : ''}`}>
        <Spread checks={record.checks} />
      </div>
    </section>
  );
}
