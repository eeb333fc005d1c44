import Link from 'next/link';

/** The name behind the pair of conductors. */
export function Mark({ href = '/' }: { readonly href?: string }) {
  return (
    <Link href={href} className="inline-flex items-center gap-2.5 text-heading font-[650] tracking-[-0.01em] text-ink">
      <span aria-hidden className="inline-block h-[6px] w-[26px] border-y-[1.5px] border-copper" />
      Linewright
    </Link>
  );
}
