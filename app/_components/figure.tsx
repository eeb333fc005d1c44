import type { ReactNode } from 'react';

/** A row of figures: the answer at a glance. */
export function Figures({ children, className = '' }: { readonly children: ReactNode; readonly className?: string }) {
  return <dl className={`flex flex-wrap gap-x-9 gap-y-3 ${className}`}>{children}</dl>;
}

interface FigureProps {
  readonly label: ReactNode;
  readonly value: ReactNode;
  readonly unit?: ReactNode;
  /** The exact value, shown on hover. */
  readonly exact?: string;
  /** Words take as many lines as they need; a number stays on one. */
  readonly inWords?: boolean;
}

export function Figure({ label, value, unit, exact, inWords = false }: FigureProps) {
  return (
    <div className="min-w-0" title={exact}>
      <dt className="text-fine text-ash">{label}</dt>
      <dd className={inWords ? 'text-body font-medium' : 'font-mono text-figure font-medium whitespace-nowrap'}>
        {value}
        {unit && <small className="ml-2 text-fine font-normal text-ash">{unit}</small>}
      </dd>
    </div>
  );
}
