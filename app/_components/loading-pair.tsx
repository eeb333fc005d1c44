/** Work under way: a pulse runs along the pair. Without motion it breathes where it stands. */
export function LoadingPair({ label, className = '' }: { readonly label: string; readonly className?: string }) {
  return (
    <div role="status" data-loading className={className}>
      <div aria-hidden className="relative h-[5px] overflow-hidden">
        <span className="absolute inset-0 border-y border-rule" />
        <span className="absolute inset-x-0 top-0 h-px overflow-hidden">
          <span className="pulse-along block h-full w-1/4" />
        </span>
        <span className="absolute inset-x-0 bottom-0 h-px overflow-hidden">
          <span className="pulse-along block h-full w-1/4" />
        </span>
      </div>
      <p className="mt-2 text-fine text-ash">{label}</p>
    </div>
  );
}
