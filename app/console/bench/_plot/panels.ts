/** What is drawn: panels of traces that share an axis of values, made from the quantities marked for a plot. */
import { readsPolar } from '../_answer/show-value';
import type { Entry, Quantity } from '../_answer/quantity-of-result';

export interface Trace {
  readonly label: string;
  readonly values: readonly Entry[];
}

export interface Panel {
  readonly id: string;
  readonly title: string;
  readonly unit: string;
  readonly traces: readonly Trace[];
}

/** How complex quantities are drawn. */
export type ComplexForm = 'parts' | 'polar';

/** One picture: a group of panels, and whether it holds anything complex. */
export interface PlotGroup {
  readonly id: string;
  readonly title: string;
  readonly quantities: readonly Quantity[];
  readonly hasComplex: boolean;
  readonly preferred: ComplexForm;
}

/** More traces than line styles in one panel would not be told apart. */
const mostTraces = 4;

export function plotGroupsOf(columns: readonly Quantity[]): PlotGroup[] {
  const groups = new Map<string, Quantity[]>();
  // A schema without hints still deserves a plot of what it calls its figures.
  const isWanted = columns.some(({ plot }) => plot !== undefined) ? ({ plot }: Quantity) => plot === 'rectangular' : ({ figure }: Quantity) => figure !== undefined;
  for (const column of columns) {
    if (column.kind === 'word' || !isWanted(column) || column.re.every((value) => value === null)) continue;
    const id = `${column.plotGroup ?? column.pointer} ${column.unit} ${column.kind}`;
    groups.set(id, [...(groups.get(id) ?? []), column]);
  }
  return [...groups].map(([id, quantities]) => {
    const hasComplex = quantities.some(({ kind }) => kind === 'complex');
    return { id, title: titleOf(quantities), quantities, hasComplex, preferred: quantities.some(readsPolar) ? 'polar' : 'parts' };
  });
}

function titleOf(quantities: readonly Quantity[]): string {
  const [{ title, plotGroup }] = quantities;
  if (quantities.length === 1) return title;
  const words = (plotGroup ?? title).replaceAll(/[_-]/g, ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** Reflections that share a chart. */
export function chartsOf(quantities: readonly Quantity[]): { readonly title: string; readonly quantities: readonly Quantity[] }[] {
  const charts = new Map<string, Quantity[]>();
  for (const quantity of quantities) {
    if (quantity.kind !== 'complex' || quantity.plot !== 'smith') continue;
    const id = quantity.plotGroup ?? quantity.pointer;
    charts.set(id, [...(charts.get(id) ?? []), quantity]);
  }
  return [...charts.values()].map((members) => ({ title: titleOf(members), quantities: members }));
}

export function panelsOf(group: PlotGroup, form: ComplexForm): Panel[] {
  const { id, title, quantities } = group;
  if (!group.hasComplex) return [panel(id, title, quantities[0].unit, quantities.map(({ title: label, re }) => ({ label, values: re })))];
  return form === 'polar' ? polarPanels(group) : partPanels(group);
}

function partPanels({ id, title, quantities }: PlotGroup): Panel[] {
  const together = 2 * quantities.length <= mostTraces ? [quantities] : quantities.map((quantity) => [quantity]);
  return together.map((members, index) =>
    panel(
      `${id} ${index}`,
      members.length === quantities.length ? title : members[0].title,
      members[0].unit,
      members.flatMap(({ title: name, re, im }) => [
        { label: members.length > 1 ? `Re ${name}` : 'Re', values: re },
        { label: members.length > 1 ? `Im ${name}` : 'Im', values: im },
      ]),
    ),
  );
}

function polarPanels({ id, title, quantities }: PlotGroup): Panel[] {
  const [{ unit }] = quantities;
  const inDecibels = unit === '';
  const name = quantities.length > 1 ? (quantity: Quantity) => quantity.title : () => '';
  const magnitudes = quantities.map((quantity) => ({ label: name(quantity), values: quantity.re.map((re, index) => magnitude(re, quantity.im[index], inDecibels)) }));
  const phases = quantities.map((quantity) => ({ label: name(quantity), values: quantity.re.map((re, index) => phase(re, quantity.im[index])) }));
  return [panel(`${id} magnitude`, `${title}, magnitude`, inDecibels ? 'dB' : unit, magnitudes), panel(`${id} phase`, `${title}, phase`, '°', phases)];
}

function panel(id: string, title: string, unit: string, traces: readonly Trace[]): Panel {
  return { id, title, unit, traces: traces.slice(0, mostTraces) };
}

/** Exactly zero has no level: a gap. */
function magnitude(re: Entry, im: Entry, inDecibels: boolean): Entry {
  if (re === null || im === null) return null;
  const size = Math.hypot(re, im);
  if (!inDecibels) return size;
  return size === 0 ? null : 20 * Math.log10(size);
}

function phase(re: Entry, im: Entry): Entry {
  return re === null || im === null ? null : (Math.atan2(im, re) * 180) / Math.PI;
}
