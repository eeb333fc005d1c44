import Link from 'next/link';
import { Cell, HeaderCell, Row, Table } from '@/app/_components/table';
import { formatCount } from '@/app/_format/numbers';
import { brief } from '@/app/verification/_record/digits';
import { verificationHref } from '@/app/verification/_record/filters';
import { counted, StandingWords } from '@/app/verification/_record/standing-words';
import { bandsOf, standingOf, type RecordedCheck } from '@/lib/verification/standing';

/** What the checks found: references of 30 digits and tables of three apart, for they say different things. */
export function Measured({ id, checks }: { readonly id: string; readonly checks: readonly RecordedCheck[] }) {
  const bands = bandsOf(checks);
  return (
    <section aria-labelledby="measured" className="mt-10">
      <h2 id="measured" className="text-heading font-semibold">
        Measured on this engine
      </h2>
      {checks.length === 0 ? (
        <p className="mt-1 max-w-measure text-ash">No check of the record rests on this method by name.</p>
      ) : (
        <>
          <p className="mt-1 mb-3 max-w-measure text-ash">
            <StandingWords standing={standingOf(checks)} />.{' '}
            <Link href={verificationHref({ method: id })} className="link">
              See {checks.length === 1 ? 'it' : `the ${counted(checks.length, 'check')}`}
            </Link>
          </p>
          {bands.length > 0 && (
            <div className="max-w-[40rem]">
              <Table>
                <thead>
                  <tr>
                    <HeaderCell>Allowed difference</HeaderCell>
                    <HeaderCell numeric>Checks</HeaderCell>
                    <HeaderCell numeric>Values</HeaderCell>
                    <HeaderCell numeric>Worst found</HeaderCell>
                  </tr>
                </thead>
                <tbody>
                  {bands.map(({ allowed, checks: count, values, worstDifference }) => (
                    <Row key={allowed ?? 'limits'}>
                      <Cell>{allowed === null ? 'a limit, to be kept' : <>up to <span className="font-mono text-[13px]">{brief(allowed)}</span></>}</Cell>
                      <Cell numeric>{formatCount(count)}</Cell>
                      <Cell numeric>{formatCount(values)}</Cell>
                      <Cell numeric>{allowed === null && worstDifference === 0 ? 'kept' : brief(worstDifference)}</Cell>
                    </Row>
                  ))}
                </tbody>
              </Table>
            </div>
          )}
        </>
      )}
    </section>
  );
}
