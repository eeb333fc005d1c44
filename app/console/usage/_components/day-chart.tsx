'use client';

import { useEffect, useRef, useState } from 'react';
import { formatCount } from '@/app/_format/numbers';
import type { HistoryRow } from './usage-view';

/** The plotting library is fetched by this page alone, after the numbers are there. */
export function DayChart({ rows }: { readonly rows: readonly HistoryRow[] }) {
  const frame = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(0);

  useEffect(() => {
    const observer = new ResizeObserver(([entry]) => setWidth(Math.round(entry.contentRect.width)));
    if (frame.current) observer.observe(frame.current);
    return () => observer.disconnect();
  }, []);

  useEffect(() => {
    if (width === 0) return;
    let stale = false;
    void import('./draw-days').then(({ drawDays }) => {
      if (!stale) frame.current?.replaceChildren(drawDays(rows, 'units', width), drawDays(rows, 'calls', width));
    });
    return () => {
      stale = true;
    };
  }, [rows, width]);

  const units = rows.reduce((sum, row) => sum + row.units, 0);
  const calls = rows.reduce((sum, row) => sum + row.calls, 0);
  return (
    <figure className="min-w-0">
      <div ref={frame} className="min-h-[22rem] [&>svg+svg]:mt-3" />
      <figcaption className="mt-1 text-fine text-ash">
        {formatCount(units)} units and {formatCount(calls)} calls in {rows.length} days. The table has the same numbers.
      </figcaption>
    </figure>
  );
}
