import Link from 'next/link';
import type { ComponentProps } from 'react';

type Variant = 'primary' | 'ghost' | 'destructive' | 'ghost-destructive';

const looks: Record<Variant, string> = {
  primary: 'border-copper bg-copper text-paper font-semibold enabled:hover:brightness-110',
  ghost: 'border-edge bg-transparent text-ink font-medium enabled:hover:bg-wash',
  'ghost-destructive': 'border-edge bg-transparent text-garnet font-medium enabled:hover:bg-wash',
  destructive: 'border-garnet bg-garnet text-paper font-semibold enabled:hover:brightness-110',
};

function look(variant: Variant, className: string): string {
  return `inline-flex h-row items-center justify-center gap-2 rounded-field border px-4 text-[14.5px] whitespace-nowrap select-none disabled:opacity-55 ${looks[variant]} ${className}`;
}

interface ButtonProps extends ComponentProps<'button'> {
  readonly variant?: Variant;
  /** True while the work it started runs: it cannot be pressed twice, and says so. */
  readonly busy?: boolean;
}

export function Button({ variant = 'primary', busy = false, className = '', disabled, children, ...rest }: ButtonProps) {
  return (
    <button type="button" {...rest} disabled={disabled || busy} aria-busy={busy || undefined} className={look(variant, className)}>
      {children}
    </button>
  );
}

interface ButtonLinkProps extends ComponentProps<typeof Link> {
  readonly variant?: Variant;
}

/** Looks like a button, goes somewhere: a link to the keyboard and to assistive technology. */
export function ButtonLink({ variant = 'ghost', className = '', ...rest }: ButtonLinkProps) {
  return <Link {...rest} className={look(variant, className).replaceAll('enabled:hover', 'hover')} />;
}
