import type { Metadata } from 'next';
import Link from 'next/link';
import { PageTitle } from '@/app/_components/page-title';
import { PublicFrame } from '@/app/_components/public-frame';
import { Cell, HeaderCell, Row, Table, TableFrame } from '@/app/_components/table';
import { problemKinds } from '@/lib/problems/problems';

export const metadata: Metadata = { title: 'Problems' };

export default function ProblemsPage() {
  return (
    <PublicFrame>
      <PageTitle title="Problems">
        Every kind of refusal that the API can answer with. An answer’s <Code>type</Code> leads here, and its <Code>code</Code> is the word that programs compare.
      </PageTitle>
      <TableFrame label="Kinds of problem">
        <Table>
          <thead>
            <tr>
              <HeaderCell numeric className="w-14">
                Status
              </HeaderCell>
              <HeaderCell>Problem</HeaderCell>
              <HeaderCell className="hidden sm:table-cell">Code</HeaderCell>
            </tr>
          </thead>
          <tbody>
            {Object.entries(problemKinds).map(([slug, { status, title }]) => (
              <Row key={slug} className="relative">
                <Cell numeric className="text-ash">
                  {status}
                </Cell>
                <Cell className="py-1.5">
                  <Link href={`/problems/${slug}`} className="-outline-offset-2 after:absolute after:inset-0">
                    {title}
                  </Link>
                </Cell>
                <Cell mono className="hidden text-ash sm:table-cell">
                  {slug}
                </Cell>
              </Row>
            ))}
          </tbody>
        </Table>
      </TableFrame>
    </PublicFrame>
  );
}

function Code({ children }: { readonly children: string }) {
  return <code className="font-mono text-[13.5px]">{children}</code>;
}
