/** What a plot leaves the page as: an SVG that needs no other file, and its numbers as CSV. */
import type { Quantity } from '../_answer/quantity-of-result';

/** Colours are variables on the page; in a file they must be what they stand for. */
export function standaloneSvg(drawn: SVGSVGElement): string {
  const copy = drawn.cloneNode(true) as SVGSVGElement;
  const style = getComputedStyle(drawn);
  copy.setAttribute('xmlns', 'http://www.w3.org/2000/svg');
  copy.setAttribute('width', String(drawn.viewBox.baseVal.width || drawn.clientWidth));
  copy.setAttribute('height', String(drawn.viewBox.baseVal.height || drawn.clientHeight));
  const ground = document.createElementNS('http://www.w3.org/2000/svg', 'rect');
  for (const [name, value] of Object.entries({ width: '100%', height: '100%', fill: 'var(--paper)' })) ground.setAttribute(name, value);
  copy.prepend(ground);
  copy.style.fontFamily = "'Instrument Sans', system-ui, sans-serif";
  copy.style.color = style.color;
  const text = new XMLSerializer().serializeToString(copy);
  return text.replace(/var\((--[a-z]+)\)/g, (_, name: string) => getComputedStyle(document.documentElement).getPropertyValue(name).trim());
}

export function csvOf(quantities: readonly Quantity[]): string {
  const columns = quantities.flatMap((quantity) => columnsOf(quantity));
  const length = Math.max(...columns.map(({ entries }) => entries.length));
  const lines = [columns.map(({ name }) => name).join(',')];
  for (let row = 0; row < length; row++) lines.push(columns.map(({ entries }) => entries[row] ?? '').join(','));
  return `${lines.join('\r\n')}\r\n`;
}

/** Named by the path in the result, so that s11 of s and z11 of z stay apart. */
function columnsOf({ pointer, kind, re, im, words }: Quantity): { name: string; entries: readonly (number | string | null)[] }[] {
  const name = pointer.slice(1).replaceAll('/', '.');
  if (kind === 'word') return [{ name, entries: words }];
  if (kind === 'real') return [{ name, entries: re }];
  return [
    { name: `${name}.re`, entries: re },
    { name: `${name}.im`, entries: im },
  ];
}

export function download(name: string, type: string, content: string): void {
  const address = URL.createObjectURL(new Blob([content], { type }));
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  // The browser has taken the address up by the next task.
  setTimeout(() => URL.revokeObjectURL(address));
}

export function fileName(title: string, extension: string): string {
  return `${title.toLowerCase().replace(/[^a-z0-9]+/g, '-').replace(/^-|-$/g, '')}.${extension}`;
}
