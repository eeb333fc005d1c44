'use client';

import { Fragment, useCallback, useMemo, useRef, useState } from 'react';
import type { ResultPart } from '../_answer/result-view';
import type { Quantity } from '../_answer/quantity-of-result';
import type { Cursor } from './cursor';
import { PanelPlot } from './panel-plot';
import { chartsOf, panelsOf, plotGroupsOf, type ComplexForm, type Panel, type PlotGroup } from './panels';
import { csvOf, download, fileName, standaloneSvg } from './save';
import { SmithChart } from './smith-chart';
import { TraceKey } from './trace-key';

interface PlotsProps {
  readonly part: ResultPart;
  readonly cursor: Cursor;
}

/** All plots of a part: lines against its axis, reflections on Smith charts. */
export function Plots({ part, cursor }: PlotsProps) {
  const { axis, columns, singles } = part;
  const swept = axis !== undefined && axis.re.length > 1 && isIncreasing(axis);
  const groups = useMemo(() => (swept ? plotGroupsOf(columns) : []), [swept, columns]);
  const charts = useMemo(() => chartsOf([...columns, ...singles]), [columns, singles]);
  if (groups.length === 0 && charts.length === 0) return null;
  return (
    <div className="grid grid-cols-1 gap-x-6 gap-y-8 sm:grid-cols-[minmax(0,1fr)_15.5rem]">
      {groups.map((group, index) => (
        <Fragment key={group.id}>
          <LinePlot group={group} axis={axis!} cursor={cursor} className={index < charts.length ? '' : 'sm:col-span-2'} />
          {charts[index] && <Chart {...charts[index]} axis={axis} cursor={cursor} />}
        </Fragment>
      ))}
      {charts.slice(groups.length).map((chart) => (
        <Chart key={chart.title} {...chart} axis={swept ? axis : undefined} cursor={cursor} />
      ))}
    </div>
  );
}

function LinePlot({ group, axis, cursor, className }: { readonly group: PlotGroup; readonly axis: Quantity; readonly cursor: Cursor; readonly className: string }) {
  const [form, setForm] = useState<ComplexForm>(group.preferred);
  const panels = useMemo(() => panelsOf(group, form), [group, form]);
  const drawings = useRef(new Map<string, SVGSVGElement>());
  const onDrawn = useCallback((panel: Panel, svg: SVGSVGElement) => void drawings.current.set(panel.id, svg), []);

  function saveSvg() {
    for (const panel of panels) {
      const svg = drawings.current.get(panel.id);
      if (svg) download(fileName(panel.title, 'svg'), 'image/svg+xml', standaloneSvg(svg));
    }
  }

  return (
    <figure className={`min-w-0 ${className}`}>
      <figcaption className="mb-1 flex flex-wrap items-baseline gap-x-4 text-small">
        <span className="font-[550]">{group.title}</span>
        {group.hasComplex && (
          <button type="button" onClick={() => setForm(form === 'parts' ? 'polar' : 'parts')} className="text-fine text-ash underline decoration-rule underline-offset-3 hover:text-ink">
            {form === 'parts' ? 'as magnitude and phase' : 'as real and imaginary part'}
          </button>
        )}
        <SaveLinks title={group.title} onSvg={saveSvg} onCsv={() => download(fileName(group.title, 'csv'), 'text/csv', csvOf([axis, ...group.quantities]))} />
      </figcaption>
      {panels.map((panel) => (
        <div key={panel.id}>
          {panels.length > 1 && <p className="mt-2 text-fine text-ash">{panel.title}</p>}
          <PanelPlot panel={panel} axis={axis} cursor={cursor} onDrawn={onDrawn} />
        </div>
      ))}
    </figure>
  );
}

function Chart({ title, quantities, axis, cursor }: { readonly title: string; readonly quantities: readonly Quantity[]; readonly axis: Quantity | undefined; readonly cursor: Cursor }) {
  const drawing = useRef<SVGSVGElement | null>(null);
  const onDrawn = useCallback((svg: SVGSVGElement) => {
    drawing.current = svg;
  }, []);
  return (
    <figure className="max-w-[17rem] min-w-0">
      <figcaption className="mb-1 flex flex-wrap items-baseline gap-x-4 text-small">
        <span className="font-[550]">{title}</span>
        <SaveLinks
          title={title}
          onSvg={() => drawing.current && download(fileName(title, 'svg'), 'image/svg+xml', standaloneSvg(drawing.current))}
          onCsv={() => download(fileName(title, 'csv'), 'text/csv', csvOf([...(axis ? [axis] : []), ...quantities]))}
        />
      </figcaption>
      {quantities.length > 1 && <TraceKey labels={quantities.map((quantity) => quantity.title)} />}
      <SmithChart title={title} quantities={quantities} axis={axis} cursor={cursor} onDrawn={onDrawn} />
    </figure>
  );
}

function SaveLinks({ title, onSvg, onCsv }: { readonly title: string; readonly onSvg: () => void; readonly onCsv: () => void }) {
  const look = 'text-fine text-ash underline decoration-rule underline-offset-3 hover:text-ink';
  return (
    <span className="ml-auto flex gap-3">
      <button type="button" onClick={onSvg} aria-label={`Download ${title} as SVG`} className={look}>
        SVG
      </button>
      <button type="button" onClick={onCsv} aria-label={`Download ${title} as CSV`} className={look}>
        CSV
      </button>
    </span>
  );
}

/** A list of frequencies in any order has a table; a line through it would run to and fro. */
function isIncreasing({ re }: Quantity): boolean {
  return re.every((value, index) => value !== null && (index === 0 || value > re[index - 1]!));
}
