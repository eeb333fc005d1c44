interface QuotaPairProps {
  readonly used: number;
  readonly quota: number;
  /** One colour at any share: for a part of a whole, which nobody has to be warned of. */
  readonly plain?: boolean;
  readonly className?: string;
}

/** Used against allowed, drawn on the pair: the colour of the conductor runs as far as the quota is used. */
export function QuotaPair({ used, quota, plain = false, className = '' }: QuotaPairProps) {
  const share = quota === 0 ? 1 : Math.min(1, used / quota);
  const colour = plain ? 'text-copper' : share >= 1 ? 'text-garnet' : share >= 0.8 ? 'text-ochre' : 'text-copper';
  return (
    <div aria-hidden className={`pair relative text-rule ${className}`}>
      {share > 0 && <span className={`pair absolute -top-px left-0 ${colour}`} style={{ width: `max(2px, ${100 * share}%)` }} />}
    </div>
  );
}
