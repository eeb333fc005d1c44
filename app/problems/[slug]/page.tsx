import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { CodeBlock } from '@/app/_components/code-block';
import { PageTitle } from '@/app/_components/page-title';
import { PublicFrame } from '@/app/_components/public-frame';
import { isProblemSlug, problemKind } from '@/lib/problems/problems';

interface ProblemPageProps {
  readonly params: Promise<{ readonly slug: string }>;
}

export async function generateMetadata({ params }: ProblemPageProps): Promise<Metadata> {
  const { slug } = await params;
  return { title: isProblemSlug(slug) ? problemKind(slug).title : 'Nothing here' };
}

/** Where the `type` of a problem answer leads: what it means and what to do about it. */
export default async function ProblemPage({ params }: ProblemPageProps) {
  const { slug } = await params;
  if (!isProblemSlug(slug)) notFound();
  const { status, title, meaning, remedy } = problemKind(slug);
  return (
    <PublicFrame>
      <PageTitle title={title}>
        <span className="font-mono text-[13.5px]">
          {status} {slug}
        </span>
      </PageTitle>
      <dl className="grid max-w-[46rem] gap-x-8 gap-y-1 sm:grid-cols-[7rem_1fr] sm:gap-y-4">
        <dt className="text-ash">Meaning</dt>
        <dd className="mb-3 sm:mb-0">{meaning}</dd>
        <dt className="text-ash">What to do</dt>
        <dd>{remedy}</dd>
      </dl>
      <h2 className="mt-9 mb-2 text-heading font-semibold">What the answer looks like</h2>
      <CodeBlock code={exampleOf(slug, status, title)} label="example answer" className="max-w-[46rem]" />
      <p className="mt-6 text-small">
        <Link href="/problems" className="link">
          All problems
        </Link>
      </p>
    </PublicFrame>
  );
}

function exampleOf(code: string, status: number, title: string): string {
  const errors = code === 'invalid-input' ? { errors: [{ pointer: '/length_m', code: 'too_small', detail: 'length_m must be greater than 0; got -0.3' }] } : {};
  return `HTTP/1.1 ${status}\nContent-Type: application/problem+json\n\n${JSON.stringify({ type: `/problems/${code}`, title, status, code, ...errors, request_id: 'req_01JE0T3M9ZC7V5Q2R8W4XKDNBH' }, null, 2)}`;
}
