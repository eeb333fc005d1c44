/** Draws a panel with the plotting library, which only this file loads; whoever draws imports it when needed. */
import { axisX, axisY, gridX, gridY, line, plot, ruleY } from '@observablehq/plot';
import { significant } from '@/app/_format/numbers';
import { shownUnit } from '@/lib/quantities/write-quantity';
import { withoutTrailingZeros } from '../_answer/show-value';
import { lineStyles } from './line-styles';
import type { Panel } from './panels';
import { reducedIndices } from './reduce';
import type { Scale } from './scales';

export interface Frame {
  readonly width: number;
  readonly height: number;
}

export interface PanelInput {
  readonly panel: Panel;
  readonly axis: readonly number[];
  readonly axisTitle: string;
  readonly x: Scale;
  readonly y: Scale;
  readonly frame: Frame;
  /** Labels at the ends of the traces, where they are short enough to stand there. */
  readonly labelled: boolean;
}

export interface DrawnPanel {
  readonly svg: SVGSVGElement;
  /** Pixels for a place on the axis and for a value, in the units of the data. */
  xOf(value: number): number;
  yOf(value: number): number;
}

export const margins = { left: 52, top: 24, bottom: 40 } as const;

export function drawPanel({ panel, axis, axisTitle, x, y, frame, labelled }: PanelInput): DrawnPanel {
  const right = labelled ? 14 + 7 * Math.max(...panel.traces.map(({ label }) => label.length)) : 10;
  const columns = Math.max(1, frame.width - margins.left - right);
  const position = axis.map((value) => placeOn(x, value));
  const ticks = { x: Math.max(2, Math.floor(columns / 78)), y: Math.max(3, Math.floor(frame.height / 46)) };
  const verticalTicks = panel.unit === '°' ? angleTicks(y) : y.logarithmic ? labelledDecades(y, ticks.y) : ticks.y;
  const traces = panel.traces.map(({ label, values }, index) => ({
    label,
    style: lineStyles[index],
    points: withoutJumps(
      reducedIndices(position, values, columns).map((at) => ({ x: axis[at] / x.divisor, y: values[at] === null ? NaN : values[at]! / y.divisor })),
      y,
    ),
  }));
  const svg = plot({
    ...frame,
    marginLeft: margins.left,
    marginRight: right,
    marginTop: margins.top,
    marginBottom: margins.bottom,
    ariaLabel: `${panel.title} against ${axisTitle.toLowerCase()}`,
    style: { fontFamily: 'inherit', fontSize: '11px', background: 'transparent', color: 'var(--ash)', overflow: 'visible' },
    x: { type: x.logarithmic ? 'log' : 'linear', domain: x.domain.map((each) => each / x.divisor) },
    y: { type: y.logarithmic ? 'log' : 'linear', domain: y.domain.map((each) => each / y.divisor), nice: !y.clipped && panel.unit !== '°' },
    marks: [
      gridX({ ticks: x.logarithmic ? decadeTicks(x, 9) : ticks.x, stroke: 'var(--rule)', strokeOpacity: 1 }),
      gridY({ ticks: verticalTicks, stroke: 'var(--rule)', strokeOpacity: 1 }),
      ...(y.domain[0] < 0 && y.domain[1] > 0 ? [ruleY([0], { stroke: 'var(--edge)' })] : []),
      ...traces.map(({ points, style }) => line(points, { x: 'x', y: 'y', stroke: style.colour, strokeWidth: 1.9, strokeDasharray: style.dash, strokeLinejoin: 'round', clip: true })),
      axisX({ ticks: x.logarithmic ? labelledDecades(x, ticks.x) : ticks.x, tickSize: 0, tickPadding: 8, label: titled(axisTitle, x.unit), labelArrow: 'none', labelAnchor: 'right', labelOffset: 36, tickFormat: formatOf(x) }),
      axisY({ ticks: verticalTicks, tickSize: 0, tickPadding: 8, label: y.unit || null, labelArrow: 'none', labelAnchor: 'top', labelOffset: margins.left - 4, tickFormat: formatOf(y) }),
    ],
  }) as SVGSVGElement & { scale(name: string): { apply(value: number): number } | undefined };
  svg.setAttribute('role', 'img');
  // The library labels each group of marks; inside an image a label is heard by nobody and not allowed.
  for (const group of svg.querySelectorAll('g[aria-label]')) group.removeAttribute('aria-label');
  const [horizontal, vertical] = [svg.scale('x')!, svg.scale('y')!];
  const drawn = { svg, xOf: (value: number) => horizontal.apply(value / x.divisor), yOf: (value: number) => vertical.apply(value / y.divisor) };
  if (labelled) labelEnds(drawn, frame.width - right, traces.map(({ label, points, style }) => ({ label, colour: style.colour, y: vertical.apply(lastValue(points)) })));
  return drawn;
}

interface Point {
  readonly x: number;
  readonly y: number;
}

/** From beyond one edge to beyond the other within a step is a pole between two points, not a line. */
function withoutJumps(points: readonly Point[], { domain: [least, most], divisor, clipped }: Scale): Point[] {
  if (!clipped) return [...points];
  const side = ({ y }: Point) => (y * divisor > most ? 1 : y * divisor < least ? -1 : 0);
  return points.flatMap((point, index) => (index > 0 && side(point) * side(points[index - 1]) < 0 ? [{ x: point.x, y: NaN }, point] : [point]));
}

function labelEnds({ svg }: DrawnPanel, x: number, ends: readonly { label: string; colour: string; y: number }[]): void {
  let above = -Infinity;
  for (const { label, colour, y } of ends.toSorted((a, b) => a.y - b.y)) {
    above = Math.max(Math.min(Math.max(y, margins.top), Number(svg.getAttribute('height')) - margins.bottom), above + 14);
    const element = document.createElementNS('http://www.w3.org/2000/svg', 'text');
    element.textContent = label;
    for (const [name, value] of Object.entries({ x: x + 6, y: above, dy: '0.32em', fill: colour, 'font-size': 12, 'font-weight': 600, 'text-anchor': 'start' })) element.setAttribute(name, String(value));
    svg.append(element);
  }
}

function lastValue(points: readonly { y: number }[]): number {
  return points.findLast(({ y }) => !Number.isNaN(y))?.y ?? 0;
}

function placeOn({ domain: [from, to], logarithmic }: Scale, value: number): number {
  if (to === from) return 0;
  return logarithmic ? Math.log(value / from) / Math.log(to / from) : (value - from) / (to - from);
}

function titled(title: string, unit: string): string {
  return `${title.toLowerCase()}${unit ? `, ${unit}` : ''}`;
}

/** On a logarithmic axis each tick has a prefix of its own: 10k, 1M, 100M. */
function formatOf({ logarithmic, unit }: Scale): (value: number) => string {
  if (!logarithmic) return (value) => plainTick(value);
  return (value) => {
    const shown = shownUnit(value, unit);
    const prefix = shown.slice(0, shown.length - unit.length);
    if (prefix === '' && (value >= 1e4 || value < 1e-3)) return `1e${Math.round(Math.log10(value))}`;
    const mantissa = value / 10 ** (3 * Math.floor(Math.log10(value) / 3 + 1e-9));
    return prefix === '' ? plainTick(value) : `${Number(mantissa.toPrecision(3))}${prefix}`;
  };
}

function plainTick(value: number): string {
  return value === 0 ? '0' : withoutTrailingZeros(significant(Number(value.toPrecision(6)), 6));
}

/** The first `within` multiples of each power of ten: 9 for all lines of a decade, 1 for its start. */
function decadeTicks({ domain: [from, to], divisor }: Scale, within: number, steps: readonly number[] = [1, 2, 3, 4, 5, 6, 7, 8, 9]): number[] {
  const ticks = [];
  for (let exponent = Math.floor(Math.log10(from / divisor)); exponent <= Math.log10(to / divisor); exponent++) {
    for (const step of steps.slice(0, within)) {
      const tick = step * 10 ** exponent;
      if (tick >= (from / divisor) * (1 - 1e-9) && tick <= (to / divisor) * (1 + 1e-9)) ticks.push(tick);
    }
  }
  return ticks;
}

/** As many as there is room for: 1, 2 and 5 of each decade, its start alone, or of every few decades. */
function labelledDecades(scale: Scale, room: number): number[] {
  const fine = decadeTicks(scale, 3, [1, 2, 5]);
  if (fine.length <= room) return fine;
  const starts = decadeTicks(scale, 1);
  const every = Math.ceil(starts.length / room);
  return starts.filter((_, index) => index % every === 0);
}

function angleTicks({ domain: [from, to] }: Scale): number[] {
  const step = [15, 30, 45, 90].find((each) => (to - from) / each <= 6) ?? 90;
  const ticks = [];
  for (let value = Math.ceil(from / step) * step; value <= to; value += step) ticks.push(value);
  return ticks.length > 1 ? ticks : [from, to];
}

