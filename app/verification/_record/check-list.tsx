import Link from 'next/link';
import { PairRule } from '@/app/_components/pair-rule';
import { encodeInput } from '@/app/console/bench/_link/input-in-link';
import { findCalculation } from '@/lib/solvers/registry';
import type { RecordedCheck, Standing } from '@/lib/verification/standing';
import { StandingWords } from './standing-words';
import { columns, Values } from './values';
import { verificationHref } from './filters';

interface CheckListProps {
  /** Of one page, in the order of the record. */
  readonly checks: readonly RecordedCheck[];
  /** Of each calculation as far as the filters let it be seen, whatever page is open. */
  readonly standings: ReadonlyMap<string, Standing>;
}

/** By calculation, then by source, so that a source which many checks share is said once. */
export async function CheckList({ checks, standings }: CheckListProps) {
  const fragments = new Map(await Promise.all(checks.map(async (recorded) => [recorded, await encodeInput(recorded.check.input)] as const)));
  return runsOf(checks, ({ check }) => check.calculation).map((those) => {
    const path = those[0].check.calculation;
    const [group, id] = path.split('/');
    const standing = standings.get(path);
    return (
      <section key={path} aria-labelledby={id} className="mt-11">
        <PairRule />
        <div className="mt-4 mb-3 flex flex-wrap items-baseline justify-between gap-x-8 gap-y-1">
          <h2 id={id} className="text-heading font-semibold">
            <Link href={verificationHref({ calculation: path })} className="hover:text-copper">
              {findCalculation(group, id)?.title ?? path}
            </Link>
            <span className="block font-mono text-[12.5px] font-normal text-ash sm:ml-3 sm:inline">{path}</span>
          </h2>
          {standing && (
            <p className="text-small text-ash">
              <StandingWords standing={standing} />
            </p>
          )}
        </div>
        <ColumnNames />
        {runsOf(those, ({ check }) => check.source).map((sameSource, index) => (
          <SourceGroup key={index} checks={sameSource} fragments={fragments} />
        ))}
      </section>
    );
  });
}

/** What stands at the head of every column, once; each table names its columns to those who do not see this. */
function ColumnNames() {
  return (
    <div aria-hidden className="column-names sticky top-0 z-header hidden border-b border-rule bg-paper py-1.5 text-fine font-[550] text-ash lg:grid">
      {columns.map((title, index) => (
        <span key={title} className={index === 1 || index === 2 ? 'pl-[7px]' : ''}>
          {title}
        </span>
      ))}
    </div>
  );
}

function SourceGroup({ checks, fragments }: { readonly checks: readonly RecordedCheck[]; readonly fragments: ReadonlyMap<RecordedCheck, string> }) {
  const { source } = checks[0].check;
  return (
    <div className="border-b border-rule pt-3 pb-4 last:border-b-0">
      <p className="max-w-[92ch] text-fine wrap-anywhere text-ash">{source.charAt(0).toUpperCase() + source.slice(1)}</p>
      {checks.map((recorded, index) => (
        <OneCheck key={index} recorded={recorded} fragment={fragments.get(recorded) ?? ''} />
      ))}
    </div>
  );
}

function OneCheck({ recorded, fragment }: { readonly recorded: RecordedCheck; readonly fragment: string }) {
  const { check, comparisons, failure } = recorded;
  return (
    <article className="mt-3">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6">
        <h3 className="text-small font-[550] wrap-anywhere">{check.name}</h3>
        {/* No prefetch: dozens of them stand on a page. */}
        <Link href={`/console/bench/${check.calculation}#${fragment}`} prefetch={false} className="text-fine text-ash hover:text-copper hover:underline">
          Open on the Bench<span className="sr-only">: {check.name}</span>
        </Link>
      </div>
      {failure && <p className="border-l-[3px] border-garnet pl-3 text-small wrap-anywhere text-garnet">No answer: {failure}.</p>}
      <Values check={check} comparisons={comparisons} refused={failure !== undefined} />
    </article>
  );
}

/** Neighbours that have the same name for something, together. */
function runsOf(checks: readonly RecordedCheck[], nameOf: (recorded: RecordedCheck) => string): RecordedCheck[][] {
  const runs: RecordedCheck[][] = [];
  for (const recorded of checks) {
    const run = runs.at(-1);
    if (run && nameOf(run[0]) === nameOf(recorded)) run.push(recorded);
    else runs.push([recorded]);
  }
  return runs;
}
