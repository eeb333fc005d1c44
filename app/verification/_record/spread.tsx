import { shareOf, type RecordedCheck } from '@/lib/verification/standing';

/** Half a decade each, from a millionth of what is allowed up to all of it. */
const binsADecade = 2;
const decades = 6;
const binWidth = 22;
const height = 64;

/** How much of its allowed difference each value uses, as a histogram over powers of ten. */
export function Spread({ checks }: { readonly checks: readonly RecordedCheck[] }) {
  const bins = binned(checks);
  const most = Math.max(1, ...bins);
  const width = bins.length * binWidth;
  const limit = width - binWidth - 1;
  return (
    <figure className="min-w-0">
      <svg viewBox={`0 0 ${width} ${height + 20}`} className="block h-auto w-full max-w-[340px]" role="img" aria-label="Histogram: how much of the allowed difference each value uses">
        {bins.map((count, index) => {
          if (count === 0) return null;
          // A bin with one value must be seen beside one with a thousand.
          const size = Math.max(1.5, (Math.sqrt(count) / Math.sqrt(most)) * height);
          return <rect key={index} x={index * binWidth + 1} y={height - size} width={binWidth - 2} height={size} className={index === bins.length - 1 ? 'fill-garnet' : 'fill-patina'} />;
        })}
        <line x1={0} x2={width} y1={height + 0.5} y2={height + 0.5} className="stroke-edge" />
        <line x1={limit} x2={limit} y1={0} y2={height + 5} className="stroke-ink" strokeDasharray="2 3" />
        {[
          [0, 'none', 'start'],
          [binWidth * 7, '0.1 %', 'middle'],
          [limit, 'all of it', 'end'],
        ].map(([x, text, anchor]) => (
          <text key={text} x={x} y={height + 16} textAnchor={anchor as 'start'} className="fill-ash text-[11px]">
            {text}
          </text>
        ))}
      </svg>
      <figcaption className="mt-1 text-fine text-ash">Values by how much of their allowed difference they use</figcaption>
    </figure>
  );
}

/** First those that use next to nothing, last those that use more than all. */
function binned(checks: readonly RecordedCheck[]): number[] {
  const bins = new Array<number>(decades * binsADecade + 2).fill(0);
  for (const { comparisons } of checks) {
    for (const comparison of comparisons) {
      const share = shareOf(comparison);
      const place = Math.floor((Math.log10(share) + decades) * binsADecade) + 1;
      bins[share > 1 ? bins.length - 1 : share === 0 ? 0 : Math.min(bins.length - 2, Math.max(0, place))]++;
    }
  }
  return bins;
}
