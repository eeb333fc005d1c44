/** The section rule: two hairlines. */
export function PairRule({ className = '' }: { readonly className?: string }) {
  return <div aria-hidden className={`pair text-rule ${className}`} />;
}
