'use client';

import { useEffect, useMemo, useRef, useState, type PointerEvent } from 'react';
import { exactAt, showReal } from '../_answer/show-value';
import type { Quantity } from '../_answer/quantity-of-result';
import { cursorKey, nearestIndex, type Cursor } from './cursor';
import type { DrawnPanel } from './draw-panel';
import { lineStyles } from './line-styles';
import type { Panel } from './panels';
import { axisScale, valueScale } from './scales';
import { TraceKey } from './trace-key';
import { useWidth } from './use-width';

interface PanelPlotProps {
  readonly panel: Panel;
  readonly axis: Quantity;
  readonly cursor: Cursor;
  readonly onDrawn: (panel: Panel, svg: SVGSVGElement) => void;
}

const height = 236;
/** What fits at the end of a trace; longer names stand in a key above. */
const longestEndLabel = 5;

/** The drawing is the library's; the cursor lies over it, so that moving it draws nothing again. */
export function PanelPlot({ panel, axis, cursor, onDrawn }: PanelPlotProps) {
  const [frame, width] = useWidth<HTMLDivElement>();
  const canvas = useRef<HTMLDivElement>(null);
  const [drawn, setDrawn] = useState<DrawnPanel | null>(null);
  const along = axis.re as readonly number[];
  const x = useMemo(() => axisScale(along, axis.unit), [along, axis.unit]);
  const y = useMemo(() => valueScale(panel.traces.map(({ values }) => values), panel.unit, x.logarithmic), [panel, x.logarithmic]);
  const pixels = useMemo(() => (drawn ? along.map((value) => drawn.xOf(value)) : []), [drawn, along]);
  const several = panel.traces.length > 1;
  const labelled = several && panel.traces.every(({ label }) => label.length <= longestEndLabel);

  useEffect(() => {
    if (width === 0) return;
    let stale = false;
    void import('./draw-panel').then(({ drawPanel }) => {
      if (stale) return;
      const next = drawPanel({ panel, axis: along, axisTitle: axis.title, x, y, frame: { width, height }, labelled });
      canvas.current?.replaceChildren(next.svg);
      setDrawn(next);
      onDrawn(panel, next.svg);
    });
    return () => {
      stale = true;
    };
  }, [panel, along, axis.title, x, y, width, labelled, onDrawn]);

  function follow(event: PointerEvent<SVGSVGElement>) {
    if (!drawn) return;
    cursor.moveTo(nearestIndex(pixels, event.clientX - event.currentTarget.getBoundingClientRect().left));
  }

  const noise = 1e-12 * Math.max(Math.abs(y.domain[0]), Math.abs(y.domain[1]));
  const reading = panel.traces.map(({ label, values }) => ({ label, ...showReal(settled(values[cursor.index], noise), panel.unit, 6) }));
  const at = exactAt(axis, cursor.index);
  return (
    <div ref={frame} className="min-w-0">
      {several && !labelled && <TraceKey labels={panel.traces.map(({ label }) => label)} />}
      <div className="relative" style={{ height }}>
        <div ref={canvas} />
        {drawn && (
          <svg
            role="slider"
            tabIndex={0}
            aria-label={`Cursor on ${panel.title}`}
            aria-valuemin={0}
            aria-valuemax={cursor.count - 1}
            aria-valuenow={cursor.index}
            aria-valuetext={`${axis.title} ${at}: ${reading.map(({ label, value, unit }) => `${label} ${value} ${unit}`).join(', ')}`}
            width={width}
            height={height}
            onPointerMove={follow}
            onPointerDown={follow}
            onKeyDown={(event) => cursorKey(event, cursor)}
            className="absolute inset-0 cursor-crosshair touch-pan-y overflow-visible"
          >
            <CursorMarks panel={panel} drawn={drawn} x={pixels[cursor.index]} index={cursor.index} within={y.domain} />
          </svg>
        )}
      </div>
      <p className="flex flex-wrap gap-x-4 pl-[52px] font-mono text-[11.5px] leading-5 text-ash">
        {reading.map(({ label, value, unit }, index) => (
          <span key={label || index}>
            {several && <span style={{ color: lineStyles[index].colour }}>{label} </span>}
            <span className="whitespace-nowrap">
              <span className="text-ink">{value}</span> {unit}
            </span>
          </span>
        ))}
      </p>
      {y.clipped && <p className="pl-[52px] text-fine text-ash">Peaks beyond this range are cut off; the table has them.</p>}
    </div>
  );
}

/** Against its neighbours on the plot a value of this size is zero and rounding. */
function settled(value: number | null, noise: number): number | null {
  return value !== null && Math.abs(value) < noise ? 0 : value;
}

interface CursorMarksProps {
  readonly panel: Panel;
  readonly drawn: DrawnPanel;
  readonly x: number;
  readonly index: number;
  readonly within: readonly [number, number];
}

function CursorMarks({ panel, drawn, x, index, within: [least, most] }: CursorMarksProps) {
  return (
    <>
      <line x1={x} x2={x} y1={24} y2={height - 40} stroke="var(--ink)" strokeOpacity={0.55} strokeDasharray="2 3" />
      {panel.traces.map(({ label, values }, trace) => {
        const value = values[index];
        if (value === null || value === undefined || value < least || value > most) return null;
        return <circle key={label || trace} cx={x} cy={drawn.yOf(value)} r={3.6} fill={lineStyles[trace].colour} stroke="var(--paper)" />;
      })}
    </>
  );
}
