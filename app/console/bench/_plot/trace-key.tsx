import { lineStyles } from './line-styles';

/** The names of the traces beside a piece of each line. */
export function TraceKey({ labels }: { readonly labels: readonly string[] }) {
  return (
    <ul className="flex flex-wrap gap-x-5 gap-y-0.5 text-fine">
      {labels.map((label, index) => (
        <li key={label} className="flex items-center gap-2" style={{ color: lineStyles[index].colour }}>
          <svg width="26" height="8" aria-hidden>
            <line x1="0" x2="26" y1="4" y2="4" stroke="currentColor" strokeWidth="1.9" strokeDasharray={lineStyles[index].dash} />
          </svg>
          {label}
        </li>
      ))}
    </ul>
  );
}
