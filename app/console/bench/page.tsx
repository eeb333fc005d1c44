import type { Metadata } from 'next';
import Link from 'next/link';
import { PageTitle } from '@/app/_components/page-title';
import { groups, type Group } from '@/lib/solvers/calculation';
import { calculations } from '@/lib/solvers/registry';
import { requirePage } from '../_components/require-page';

export const metadata: Metadata = { title: 'Bench' };

const groupTitles: Record<Group, { readonly title: string; readonly about: string }> = {
  lines: { title: 'Lines', about: 'What a line is: its constants, its impedance, and whether it has to be taken for a line at all.' },
  terminations: { title: 'Terminations', about: 'A line with something at its end: what the near end sees, and what arrives.' },
  networks: { title: 'Networks', about: 'Lines and parts in a chain, and the parameters that describe them.' },
};

export default async function BenchPage() {
  await requirePage('/console/bench');
  const shown = groups.filter((group) => calculations.some((calculation) => calculation.group === group));
  return (
    <>
      <PageTitle title="Bench">One number or one plot, now. Every calculation opens with a worked example, and leaves as a link or a script.</PageTitle>
      <div className="space-y-9">
        {shown.map((group) => (
          <section key={group} aria-labelledby={`group-${group}`} className="grid gap-x-10 gap-y-3 border-t border-rule pt-4 lg:grid-cols-[15rem_minmax(0,1fr)]">
            <div>
              <h2 id={`group-${group}`} className="text-heading font-semibold">
                {groupTitles[group].title}
              </h2>
              <p className="mt-1 text-small text-ash">{groupTitles[group].about}</p>
            </div>
            <ul className="-mt-2.5 min-w-0">
              {calculations
                .filter((calculation) => calculation.group === group)
                .map(({ id, title, summary }) => (
                  <li key={id} className="border-b border-rule last:border-b-0">
                    <Link href={`/console/bench/${group}/${id}`} className="group -mx-3 block px-3 py-2.5 -outline-offset-2 hover:bg-wash">
                      <span className="font-[550] group-hover:text-copper">{title}</span>
                      <span className="block max-w-measure text-small text-ash">{summary}</span>
                    </Link>
                  </li>
                ))}
            </ul>
          </section>
        ))}
      </div>
    </>
  );
}
