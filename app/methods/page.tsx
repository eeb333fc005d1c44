import type { Metadata } from 'next';
import Link from 'next/link';
import { PageTitle } from '@/app/_components/page-title';
import { PairRule } from '@/app/_components/pair-rule';
import { PublicFrame } from '@/app/_components/public-frame';
import { sentence } from '@/app/_format/sentence';
import { Verdict, counted } from '@/app/verification/_record/standing-words';
import type { Method } from '@/lib/solvers/calculation';
import { methods } from '@/lib/solvers/registry';
import { verificationRecord } from '@/lib/verification/record';
import type { Standing } from '@/lib/verification/standing';
import { methodsByShelf, shelfTitles } from './_method/where-used';

export const metadata: Metadata = {
  title: 'Methods',
  description: 'Every method that a number may rest on, with its published source, range and accuracy.',
};

export default async function MethodsPage() {
  const { byMethod } = await verificationRecord();
  return (
    <PublicFrame>
      <PageTitle title="Methods">
        The {methods.length} methods that a number may rest on: where each is published, where it holds and how far off it may be. Every answer names the ones it used.
      </PageTitle>
      {methodsByShelf().map(([shelf, those]) => (
        <section key={shelf} aria-labelledby={shelf.replace(' ', '-')} className="mt-9">
          <PairRule />
          <div className="mt-4 mb-1">
            <h2 id={shelf.replace(' ', '-')} className="text-heading font-semibold">
              {shelfTitles[shelf].title}
            </h2>
            <p className="max-w-measure text-small text-ash">{shelfTitles[shelf].about}</p>
          </div>
          <ul>
            {those.map((method) => (
              <Entry key={method.id} method={method} standing={byMethod.get(method.id)} />
            ))}
          </ul>
        </section>
      ))}
    </PublicFrame>
  );
}

function Entry({ method: { id, title, source, range, accuracy }, standing }: { readonly method: Method; readonly standing?: Standing }) {
  return (
    <li className="grid gap-x-10 gap-y-1.5 border-b border-rule py-4 text-small last:border-b-0 lg:grid-cols-[minmax(0,5fr)_minmax(0,6fr)]">
      <div>
        <h3 className="text-body font-[550]">
          <Link href={`/methods/${id}`} className="hover:text-copper hover:underline hover:decoration-1 hover:underline-offset-3">
            {title}
          </Link>
        </h3>
        <p className="mt-0.5 wrap-anywhere text-ash">{sentence(source)}</p>
      </div>
      <dl className="grid grid-cols-[5.5rem_minmax(0,1fr)] gap-x-4 gap-y-0.5 lg:mt-px">
        <dt className="text-ash">Range</dt>
        <dd>{sentence(range)}</dd>
        <dt className="text-ash">Accuracy</dt>
        <dd>{sentence(accuracy)}</dd>
        {standing && (
          <>
            <dt className="text-ash">Proof</dt>
            <dd>
              {counted(standing.checks, 'check')}, <Verdict standing={standing} />
            </dd>
          </>
        )}
      </dl>
    </li>
  );
}
