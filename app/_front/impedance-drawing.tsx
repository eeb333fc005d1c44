import { formatQuantity } from '../_format/numbers';
import { linearScale, pathOf } from './trace';

interface ImpedanceDrawingProps {
  readonly frequencies: readonly number[];
  readonly real: readonly (number | null)[];
  readonly imaginary: readonly (number | null)[];
  /** Index of the point whose figures stand beside the drawing. */
  readonly marked: number;
}

const width = 1096;
const height = 268;
const plot = { left: 46, right: 1030, top: 30, bottom: 214 };

/** Input impedance over frequency across the whole sheet; both parts on one scale, told apart by dash and name. */
export function ImpedanceDrawing({ frequencies, real, imaginary, marked }: ImpedanceDrawingProps) {
  const values = [...real, ...imaginary].filter((value) => value !== null);
  const [least, most] = [Math.min(...values), Math.max(...values)];
  const margin = 0.06 * (most - least);
  const [first, last] = [frequencies[0], frequencies[frequencies.length - 1]];
  const x = linearScale(first, last, plot.left, plot.right, 8);
  const y = linearScale(least - margin, most + margin, plot.bottom, plot.top, 4);
  const [realEnd, imaginaryEnd] = [real, imaginary].map((column) => y.place(column.findLast((value) => value !== null) ?? 0));
  return (
    <svg viewBox={`0 0 ${width} ${height}`} role="img" aria-label={summary(frequencies, real, imaginary)} className="block h-auto w-full min-w-[44rem] font-sans text-[12px]">
      <g className="stroke-rule">
        {y.ticks.map((tick) => (
          <line key={tick} x1={plot.left} x2={plot.right} y1={y.place(tick)} y2={y.place(tick)} className={tick === 0 ? 'stroke-ash' : ''} />
        ))}
        {x.ticks.map((tick) => (
          <line key={tick} x1={x.place(tick)} x2={x.place(tick)} y1={plot.top} y2={plot.bottom} />
        ))}
      </g>
      <g className="fill-ash">
        {y.ticks.map((tick) => (
          <text key={tick} x={plot.left - 10} y={y.place(tick) + 4} textAnchor="end">
            {String(tick).replace('-', '\u2212')}
          </text>
        ))}
        {x.ticks.map((tick) => (
          <text key={tick} x={x.place(tick)} y={plot.bottom + 20} textAnchor="middle">
            {tick / 1e6}
          </text>
        ))}
        <text x={plot.left - 10} y={plot.top - 14} textAnchor="end">
          ohm
        </text>
        <text x={plot.right} y={plot.bottom + 42} textAnchor="end">
          frequency, MHz
        </text>
      </g>
      <line x1={x.place(frequencies[marked])} x2={x.place(frequencies[marked])} y1={plot.top} y2={plot.bottom} className="stroke-ink opacity-55" strokeDasharray="2 3" />
      <path d={pathOf(x, y, frequencies, imaginary)} fill="none" className="stroke-patina" strokeWidth="1.9" strokeDasharray="6 3.5" strokeLinejoin="round" />
      <path d={pathOf(x, y, frequencies, real)} fill="none" className="stroke-copper" strokeWidth="2" strokeLinejoin="round" />
      <Point x={x.place(frequencies[marked])} value={real[marked]} place={y.place} look="fill-copper" />
      <Point x={x.place(frequencies[marked])} value={imaginary[marked]} place={y.place} look="fill-patina" />
      <g className="text-[13px] font-semibold">
        <text x={plot.right + 12} y={realEnd + 4} className="fill-copper">
          Re Z
        </text>
        <text x={plot.right + 12} y={apart(imaginaryEnd, realEnd) + 4} className="fill-patina">
          Im Z
        </text>
      </g>
    </svg>
  );
}

interface PointProps {
  readonly x: number;
  readonly value: number | null;
  readonly place: (value: number) => number;
  readonly look: string;
}

function Point({ x, value, place, look }: PointProps) {
  return value === null ? null : <circle cx={x} cy={place(value)} r="3.6" className={look} />;
}

/** Keeps the second name a line away from the first when both traces end alike. */
function apart(own: number, other: number): number {
  if (Math.abs(own - other) >= 18) return own;
  return own >= other ? other + 18 : other - 18;
}

function summary(frequencies: readonly number[], real: readonly (number | null)[], imaginary: readonly (number | null)[]): string {
  const range = (column: readonly (number | null)[]) => {
    const values = column.filter((value) => value !== null);
    return `${formatQuantity(Math.min(...values), 'ohm')} to ${formatQuantity(Math.max(...values), 'ohm')}`;
  };
  const span = `${formatQuantity(frequencies[0], 'Hz')} to ${formatQuantity(frequencies[frequencies.length - 1], 'Hz')}`;
  return `Input impedance from ${span}: real part ${range(real)}, imaginary part ${range(imaginary)}.`;
}
