'use client';

import { useEffect, useId, useMemo, useRef, type PointerEvent } from 'react';
import type { Quantity } from '../_answer/quantity-of-result';
import { exactAt } from '../_answer/show-value';
import { cursorKey, type Cursor } from './cursor';
import { lineStyles } from './line-styles';
import { SmithGrid } from './smith-grid-view';

interface SmithChartProps {
  readonly title: string;
  readonly quantities: readonly Quantity[];
  readonly axis: Quantity | undefined;
  readonly cursor: Cursor;
  readonly onDrawn: (svg: SVGSVGElement) => void;
}

const size = 250;
const centre = size / 2;
const rim = 110;
/** Points that a chart of this size can tell apart, and more. */
const mostPoints = 2000;

/** The way of a reflection coefficient over the sweep; the nearest point follows the pointer. */
export function SmithChart({ title, quantities, axis, cursor, onDrawn }: SmithChartProps) {
  const svg = useRef<SVGSVGElement>(null);
  const clip = useId();
  const scale = useMemo(() => rim / Math.max(1, ...quantities.map(largest)), [quantities]);
  const paths = useMemo(() => quantities.map((quantity) => pathOf(quantity, scale)), [quantities, scale]);

  useEffect(() => {
    if (svg.current) onDrawn(svg.current);
  }, [onDrawn, paths]);

  function follow(event: PointerEvent<SVGSVGElement>) {
    const { left, top, width } = event.currentTarget.getBoundingClientRect();
    const re = (((event.clientX - left) / width) * size - centre) / scale;
    const im = -(((event.clientY - top) / width) * size - centre) / scale;
    cursor.moveTo(nearest(quantities, re, im));
  }

  return (
    <svg
      ref={svg}
      viewBox={`0 0 ${size} ${size}`}
      role={axis ? 'slider' : 'img'}
      tabIndex={axis ? 0 : undefined}
      aria-label={`${title} on a Smith chart`}
      aria-valuemin={axis ? 0 : undefined}
      aria-valuemax={axis ? cursor.count - 1 : undefined}
      aria-valuenow={axis ? cursor.index : undefined}
      aria-valuetext={axis ? `${axis.title} ${exactAt(axis, cursor.index)}: ${quantities.map((quantity) => `${quantity.title} ${exactAt(quantity, cursor.index)}`).join(', ')}` : undefined}
      onPointerMove={axis ? follow : undefined}
      onPointerDown={axis ? follow : undefined}
      onKeyDown={axis ? (event) => cursorKey(event, cursor) : undefined}
      className={`block w-full max-w-[270px] touch-pan-y ${axis ? 'cursor-crosshair' : ''}`}
      fontSize="9.5"
    >
      <SmithGrid centre={centre} scale={scale} clip={clip} />
      {paths.map((path, index) => (
        <path key={quantities[index].pointer} d={path} fill="none" stroke={lineStyles[index].colour} strokeDasharray={lineStyles[index].dash} strokeWidth={1.9} strokeLinejoin="round" />
      ))}
      {quantities.map(({ pointer, re, im }, index) => {
        const [x, y] = [re[cursor.index] ?? null, im[cursor.index] ?? null];
        return x === null || y === null ? null : <circle key={pointer} cx={centre + x * scale} cy={centre - y * scale} r={3.8} fill={lineStyles[index].colour} stroke="var(--paper)" />;
      })}
    </svg>
  );
}

function pathOf({ re, im }: Quantity, scale: number): string {
  const every = Math.max(1, Math.ceil(re.length / mostPoints));
  let path = '';
  let drawing = false;
  for (let index = 0; index < re.length; index += every) {
    const [x, y] = [re[index], im[index]];
    if (x === null || y === null) {
      drawing = false;
      continue;
    }
    path += `${drawing ? 'L' : 'M'}${(centre + x * scale).toFixed(2)},${(centre - y * scale).toFixed(2)}`;
    drawing = true;
  }
  return re.length > 1 ? path : '';
}

/** Against a complex reference a reflection may be greater than one. */
function largest({ re, im }: Quantity): number {
  return re.reduce<number>((most, value, index) => Math.max(most, Math.hypot(value ?? 0, im[index] ?? 0)), 0);
}

function nearest(quantities: readonly Quantity[], x: number, y: number): number {
  let best = 0;
  let least = Infinity;
  for (const { re, im } of quantities) {
    for (let index = 0; index < re.length; index++) {
      const distance = Math.hypot((re[index] ?? Infinity) - x, (im[index] ?? Infinity) - y);
      if (distance < least) [best, least] = [index, distance];
    }
  }
  return best;
}
