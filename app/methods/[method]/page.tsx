import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { PageTitle } from '@/app/_components/page-title';
import { PublicFrame } from '@/app/_components/public-frame';
import { Cell, HeaderCell, Row, Table } from '@/app/_components/table';
import { sentence } from '@/app/_format/sentence';
import { verificationHref } from '@/app/verification/_record/filters';
import { calculationPath, type Method } from '@/lib/solvers/calculation';
import { findMethod } from '@/lib/solvers/registry';
import { verificationRecord } from '@/lib/verification/record';
import { Formula, Symbol } from '../_method/formula';
import { Measured } from '../_method/measured';
import { calculationsWith, lineKindsWith } from '../_method/where-used';
import 'katex/dist/katex.min.css';
import '../method.css';

interface MethodPageProps {
  readonly params: Promise<{ readonly method: string }>;
}

export async function generateMetadata({ params }: MethodPageProps): Promise<Metadata> {
  const method = findMethod((await params).method);
  return method ? { title: method.title, description: sentence(method.source) } : { title: 'Nothing here' };
}

/** What a method is: its formulas, where it is published, where it holds, and what the checks found of it. */
export default async function MethodPage({ params }: MethodPageProps) {
  const method = findMethod((await params).method);
  if (!method) notFound();
  const record = await verificationRecord();
  const { id, title, formulas, source, range, accuracy } = method;
  return (
    <PublicFrame>
      <PageTitle title={title}>
        <span className="font-mono text-[13px]">{id}</span>
      </PageTitle>
      <section aria-label="Formulas" className="rounded-field bg-wash px-5 py-4">
        {formulas.map((formula, index) => (
          <Formula key={formula} latex={formula} label={formulas.length > 1 ? `Formula ${index + 1} of ${formulas.length}` : 'Formula'} />
        ))}
      </section>
      <div className="mt-8 grid gap-x-12 gap-y-9 lg:grid-cols-2">
        <div className="min-w-0">
          <dl className="grid gap-x-6 sm:grid-cols-[5.5rem_minmax(0,1fr)] sm:gap-y-3.5">
            <Fact name="Source">{sentence(source)}</Fact>
            <Fact name="Range">{sentence(range)}</Fact>
            <Fact name="Accuracy">{sentence(accuracy)}</Fact>
            <Fact name="Used in">
              <WhereUsed method={method} />
            </Fact>
          </dl>
        </div>
        <Symbols method={method} />
      </div>
      <Measured id={id} checks={record.checks.filter(({ methods }) => methods.includes(id))} />
      <p className="mt-9 flex flex-wrap gap-x-6 text-small">
        <Link href="/methods" className="link">
          All methods
        </Link>
        <a href={`/api/v1/methods/${id}`} className="link">
          The same as JSON
        </a>
      </p>
    </PublicFrame>
  );
}

function Fact({ name, children }: { readonly name: string; readonly children: ReactNode }) {
  return (
    <>
      <dt className="text-ash">{name}</dt>
      <dd className="mb-3 wrap-anywhere sm:mb-0">{children}</dd>
    </>
  );
}

function WhereUsed({ method }: { readonly method: Method }) {
  const kinds = lineKindsWith(method);
  return (
    <ul className="space-y-0.5">
      {kinds.length > 0 && <li>Lines of the kind {kinds.map((kind) => kind.toLowerCase()).join(', ')}</li>}
      {calculationsWith(method).map((calculation) => (
        <li key={calculation.id}>
          <Link href={verificationHref({ calculation: calculationPath(calculation), method: method.id })} className="link">
            {calculation.title}
          </Link>
        </li>
      ))}
    </ul>
  );
}

function Symbols({ method: { symbols } }: { readonly method: Method }) {
  return (
    <section aria-labelledby="symbols" className="min-w-0">
      <h2 id="symbols" className="sr-only">
        Symbols
      </h2>
      <Table>
        <thead>
          <tr>
            <HeaderCell className="w-24">Symbol</HeaderCell>
            <HeaderCell>Meaning</HeaderCell>
            <HeaderCell>Unit</HeaderCell>
          </tr>
        </thead>
        <tbody>
          {symbols.map(({ symbol, meaning, unit }) => (
            <Row key={symbol}>
              <Cell className="py-1 pr-2">
                <Symbol latex={symbol} />
              </Cell>
              <Cell className="py-1">{meaning}</Cell>
              <Cell mono className="py-1 text-ash">
                {unit ?? ''}
              </Cell>
            </Row>
          ))}
        </tbody>
      </Table>
    </section>
  );
}

