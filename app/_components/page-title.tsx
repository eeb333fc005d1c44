import type { ReactNode } from 'react';

interface PageTitleProps {
  readonly title: ReactNode;
  /** One or two sentences: what the page is for. */
  readonly children?: ReactNode;
  /** Buttons at the right end; below the text on a phone. */
  readonly actions?: ReactNode;
}

export function PageTitle({ title, children, actions }: PageTitleProps) {
  return (
    <div className="mt-8 mb-6 flex flex-wrap items-end justify-between gap-x-8 gap-y-4">
      <div className="min-w-0">
        <h1 className="text-title font-semibold tracking-[-0.015em] text-balance wrap-anywhere">{title}</h1>
        {children && <p className="mt-1 max-w-measure text-ash">{children}</p>}
      </div>
      {actions && <div className="flex flex-none flex-wrap gap-3">{actions}</div>}
    </div>
  );
}
