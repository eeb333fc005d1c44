import { cookies } from 'next/headers';
import Link from 'next/link';
import type { ReactNode } from 'react';
import { engineVersion } from '@/lib/solvers/engine';
import { Mark } from './mark';
import { PairRule } from './pair-rule';
import { SkipLink } from './skip-link';
import { asTheme, themeCookie } from './theme';
import { ThemeSwitch } from './theme-switch';

const places = [
  { href: '/reference', title: 'Reference' },
  { href: '/methods', title: 'Methods' },
  { href: '/verification', title: 'Verification' },
  { href: '/problems', title: 'Problems' },
] as const;

interface PublicFrameProps {
  /** False on the sign-in page itself. */
  readonly signIn?: boolean;
  readonly children: ReactNode;
}

/** Header, column and footer of the pages that need no session. */
export async function PublicFrame({ signIn = true, children }: PublicFrameProps) {
  const theme = asTheme((await cookies()).get(themeCookie)?.value);
  return (
    <div className="mx-auto flex min-h-dvh max-w-page flex-col px-5 sm:px-7">
      <SkipLink />
      <header className="flex flex-wrap items-baseline gap-x-7 gap-y-1.5 pt-5 pb-3">
        <Mark />
        <nav aria-label="Site" className="order-last flex w-full flex-wrap gap-x-[22px] text-ash sm:order-none sm:w-auto">
          {places.map(({ href, title }) => (
            <Link key={href} href={href} className="hover:text-ink">
              {title}
            </Link>
          ))}
        </nav>
        <div className="ml-auto flex items-baseline gap-5 text-small">
          <ThemeSwitch initial={theme} />
          {signIn && (
            <Link href="/sign-in" className="link">
              Sign in
            </Link>
          )}
        </div>
      </header>
      <PairRule />
      <main id="content" className="flex-1">
        {children}
      </main>
      <footer className="flex flex-wrap items-baseline justify-between gap-x-7 gap-y-1.5 pt-12 pb-6 text-fine text-ash">
        <span>Engine {engineVersion}</span>
        <nav aria-label="Site, at the foot" className="flex flex-wrap gap-x-5">
          {places.map(({ href, title }) => (
            <Link key={href} href={href} className="hover:text-ink">
              {title}
            </Link>
          ))}
        </nav>
      </footer>
    </div>
  );
}
