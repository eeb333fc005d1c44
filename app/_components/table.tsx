import type { ComponentProps, ReactNode } from 'react';

/**
 * The table of records: dense rows, hairlines, a header that stays. `TableFrame` scrolls sideways
 * when the columns do not fit; pass `tall` for a long table to scroll within itself, else the header
 * sticks to the window.
 */
export function TableFrame({ label, tall = false, className = '', children }: { readonly label: string; readonly tall?: boolean; readonly className?: string; readonly children: ReactNode }) {
  // A region that scrolls must be reachable by keyboard.
  return (
    <div role="region" aria-label={label} tabIndex={0} className={`relative -mx-1 overflow-x-auto px-1 ${tall ? 'max-h-96 overflow-y-auto' : 'lg:overflow-visible'} ${className}`}>
      {children}
    </div>
  );
}

export function Table({ className = '', ...rest }: ComponentProps<'table'>) {
  return <table {...rest} className={`w-full border-separate border-spacing-0 text-[14px] ${className}`} />;
}

interface CellProps {
  /** Right-aligned, mono, tabular: digits stand under digits. */
  readonly numeric?: boolean;
}

export function HeaderCell({ numeric = false, className = '', ...rest }: ComponentProps<'th'> & CellProps) {
  return (
    <th
      scope="col"
      {...rest}
      className={`sticky top-0 z-[1] h-8 border-b border-rule bg-paper pl-4 text-fine font-[550] whitespace-nowrap text-ash first:pl-0 ${numeric ? 'text-right' : 'text-left'} ${className}`}
    />
  );
}

export function Row({ className = '', ...rest }: ComponentProps<'tr'>) {
  return <tr {...rest} className={`hover:[&>td]:bg-wash ${className}`} />;
}

export function Cell({ numeric = false, mono = false, className = '', ...rest }: ComponentProps<'td'> & CellProps & { readonly mono?: boolean }) {
  return (
    <td
      {...rest}
      className={`h-row border-b border-rule pl-4 first:pl-0 ${numeric ? 'text-right whitespace-nowrap' : ''} ${numeric || mono ? 'font-mono text-[13px]' : ''} ${className}`}
    />
  );
}
