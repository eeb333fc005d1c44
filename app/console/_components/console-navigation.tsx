'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';

interface ConsoleNavigationProps {
  readonly pages: readonly { readonly path: string; readonly title: string }[];
}

/** Beside the name where there is room for both, else on the line below. Over the present page's word the rule beneath turns to copper. */
export function ConsoleNavigation({ pages }: ConsoleNavigationProps) {
  const pathname = usePathname();
  return (
    <nav aria-label="Console" className="order-last flex w-full gap-[22px] lg:order-none lg:w-auto">
      {pages.map(({ path, title }) => {
        const here = pathname === path || pathname.startsWith(`${path}/`);
        return (
          <Link
            key={path}
            href={path}
            aria-current={here ? 'page' : undefined}
            className={`relative pb-2.5 ${here ? 'text-ink' : 'text-ash hover:text-ink'}`}
          >
            {title}
            {here && <span aria-hidden className="pair absolute inset-x-0 -bottom-[5px] bg-paper text-copper" />}
          </Link>
        );
      })}
    </nav>
  );
}
