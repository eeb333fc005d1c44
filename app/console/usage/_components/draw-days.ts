/** A bar a day. Units are filled, calls outlined and dashed, so that colour is not all that tells them apart. */
import { axisX, axisY, gridY, plot, pointerX, rectY, ruleY, tip } from '@observablehq/plot';
import { formatCount } from '@/app/_format/numbers';
import type { HistoryRow } from './usage-view';

const looks = {
  units: { height: 210, fill: 'var(--copper)', stroke: 'var(--copper)', strokeDasharray: undefined },
  calls: { height: 140, fill: 'color-mix(in srgb, var(--patina) 12%, transparent)', stroke: 'var(--patina)', strokeDasharray: '3 2' },
} as const;

export function drawDays(rows: readonly HistoryRow[], quantity: 'units' | 'calls', width: number): Element {
  const days = rows.map((row) => ({ ...row, day: new Date(`${row.label}T00:00:00Z`) }));
  const { height, ...look } = looks[quantity];
  const first = rows[0]?.label;
  const last = rows[rows.length - 1]?.label;
  const chart = plot({
    width,
    height,
    marginLeft: 52,
    marginRight: 4,
    marginTop: 26,
    marginBottom: quantity === 'calls' ? 40 : 26,
    style: { fontFamily: 'inherit', fontSize: '11px', background: 'transparent', color: 'var(--ash)', overflow: 'visible' },
    ariaLabel: `${quantity === 'units' ? 'Units charged' : 'Calls answered'} by day from ${first} to ${last}`,
    x: { type: 'utc' },
    // A scale of its own for small counts: half a call does not exist.
    y: { domain: [0, Math.max(4, ...days.map((day) => day[quantity]))], nice: true },
    marks: [
      gridY({ ticks: 4, stroke: 'var(--rule)', strokeOpacity: 1 }),
      rectY(days, { x: 'day', interval: 'day', y: quantity, insetLeft: 1, insetRight: 1, strokeWidth: 1, ...look }),
      ruleY([0], { stroke: 'var(--ash)' }),
      axisY({ ticks: 4, tickSize: 0, label: `${quantity} a day`, labelArrow: 'none', tickFormat: (value: number) => formatCount(value) }),
      axisX({ ticks: Math.max(3, Math.floor(width / 90)), tickSize: 4, label: quantity === 'calls' ? 'day (UTC)' : null, labelArrow: 'none', stroke: 'none' }),
      tip(
        days,
        pointerX({
          x: 'day',
          interval: 'day',
          y: quantity,
          title: (day: (typeof days)[number]) => `${day.label}\n${formatCount(day[quantity])} ${quantity}`,
          fill: 'var(--sheet)',
          stroke: 'var(--edge)',
        } as never),
      ),
    ],
  });
  chart.setAttribute('role', 'img');
  // The library labels each group of marks; inside an image a label is heard by nobody and not allowed.
  for (const group of chart.querySelectorAll('g[aria-label]')) group.removeAttribute('aria-label');
  return chart;
}
