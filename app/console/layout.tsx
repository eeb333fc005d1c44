/** The console's frame: one line of words at the top, the page, one line at the foot. */
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { PairRule } from '@/app/_components/pair-rule';
import { SkipLink } from '@/app/_components/skip-link';
import { Mark } from '@/app/_components/mark';
import { asTheme, themeCookie } from '@/app/_components/theme';
import { ThemeSwitch } from '@/app/_components/theme-switch';
import { currentMember } from '@/lib/auth/current-member';
import { consolePages, roleHas } from '@/lib/auth/permissions';
import { engineVersion } from '@/lib/solvers/engine';
import { ConsoleNavigation } from './_components/console-navigation';
import { DataSource } from './_components/data-source';
import { SignOut } from './_components/sign-out';

export default async function ConsoleLayout({ children }: { readonly children: ReactNode }) {
  const member = await currentMember();
  // Each page leads to sign-in itself, since only it knows where to come back to.
  if (!member) return children;
  const theme = asTheme((await cookies()).get(themeCookie)?.value);
  const pages = consolePages.filter((page) => roleHas(member.role, page.permission));
  return (
    <div className="mx-auto flex min-h-dvh max-w-page flex-col px-5 sm:px-7">
      <SkipLink />
      <header className="flex flex-wrap items-baseline gap-x-7 gap-y-1.5 pt-5 lg:flex-nowrap">
        <Mark href="/console" />
        <ConsoleNavigation pages={pages.map(({ path, title }) => ({ path, title }))} />
        <div className="ml-auto flex min-w-0 items-baseline gap-x-5 text-small text-ash">
          <span className="hidden min-w-0 truncate sm:inline" title={`${member.name}, ${member.email}`}>
            {member.organization.name} · {member.role}
          </span>
          <ThemeSwitch initial={theme} />
          <SignOut />
        </div>
      </header>
      <PairRule />
      <main id="content" className="flex-1">
        <DataSource>{children}</DataSource>
      </main>
      <footer className="flex flex-wrap gap-x-1.5 pt-10 pb-6 text-fine text-ash">
        <span>Engine {engineVersion} · all times local, UTC on hover</span>
        <span className="sm:hidden">
          · {member.organization.name} · {member.role}
        </span>
      </footer>
    </div>
  );
}
