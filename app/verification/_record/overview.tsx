import Link from 'next/link';
import { Cell, HeaderCell, Row, Table, TableFrame } from '@/app/_components/table';
import { formatCount } from '@/app/_format/numbers';
import { calculationPath } from '@/lib/solvers/calculation';
import { calculations } from '@/lib/solvers/registry';
import type { VerificationRecord } from '@/lib/verification/record';
import { brief, percent } from './digits';
import { verificationHref } from './filters';
import { Verdict } from './standing-words';

/** A row a calculation, and the value of each that comes nearest to what is allowed. */
export function Overview({ record }: { readonly record: VerificationRecord }) {
  return (
    <section aria-labelledby="by-calculation" className="mt-10">
      <h2 id="by-calculation" className="mb-2 text-heading font-semibold">
        By calculation
      </h2>
      <TableFrame label="Checks by calculation">
        <Table>
          <thead>
            <tr>
              <HeaderCell>Calculation</HeaderCell>
              <HeaderCell numeric className="hidden sm:table-cell">
                Checks
              </HeaderCell>
              <HeaderCell numeric>Values</HeaderCell>
              <HeaderCell className="hidden lg:table-cell">Nearest to its limit</HeaderCell>
              <HeaderCell numeric className="hidden md:table-cell">
                Difference
              </HeaderCell>
              <HeaderCell numeric className="hidden md:table-cell">
                Of what is allowed
              </HeaderCell>
              <HeaderCell>Stands</HeaderCell>
            </tr>
          </thead>
          <tbody>
            {calculations.map((calculation) => {
              const path = calculationPath(calculation);
              const standing = record.byCalculation.get(path);
              if (!standing) return null;
              const { checks, values, worst } = standing;
              return (
                <Row key={path} className="relative">
                  <Cell className="py-1.5">
                    <Link href={verificationHref({ calculation: path })} className="-outline-offset-2 after:absolute after:inset-0">
                      {calculation.title}
                    </Link>
                  </Cell>
                  <Cell numeric className="hidden sm:table-cell">
                    {formatCount(checks)}
                  </Cell>
                  <Cell numeric>{formatCount(values)}</Cell>
                  <Cell className="hidden max-w-0 truncate text-small text-ash lg:table-cell lg:w-[36%]">{worst?.recorded.check.name}</Cell>
                  <Cell numeric className="hidden md:table-cell">
                    {worst?.comparison.difference != null ? brief(worst.comparison.difference) : ''}
                  </Cell>
                  <Cell numeric className="hidden md:table-cell">
                    {worst ? percent(worst.share) : ''}
                  </Cell>
                  <Cell className="text-small whitespace-nowrap">
                    <Verdict standing={standing} />
                  </Cell>
                </Row>
              );
            })}
          </tbody>
        </Table>
      </TableFrame>
    </section>
  );
}
