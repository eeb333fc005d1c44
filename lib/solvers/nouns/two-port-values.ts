/** The entries of a two-port's matrix in a request: each a complex number, or a column with one entry a frequency. */
import { z } from 'zod';
import type { InputProblem } from '../errors';
import type { Entries, Representation } from '../methods/two-port-coordinates';
import type { ComplexParts } from '../numeric/phasor';
import { complexColumn } from './columns';
import { complexParts, largestEntry, matrixEntryForms, type ComplexNumber } from './complex-number';
import { mostPoints } from './frequency';

export const representations = ['abcd', 's', 'z', 'y', 't'] as const satisfies readonly Representation[];

const parts = (title: string) =>
  z
    .array(z.number().min(-largestEntry).max(largestEntry).meta({ title, description: `${title} at one frequency.`, examples: [0.5] }))
    .min(1)
    .max(mostPoints)
    .meta({ title: `${title}s`, description: `${title}s, one a frequency.`, examples: [[0.5, 0.4]] });

const column = z
  .strictObject({ re: parts('Real part'), im: parts('Imaginary part') })
  .meta({ id: 'ComplexSeries', title: 'Column', description: 'A complex quantity over frequency: a list of real and a list of imaginary parts of the same length.', examples: [{ re: [0.5, 0.4], im: [0, -0.1] }] });

const numberOrColumn = z.union([...matrixEntryForms, column]);

export type NumberOrColumn = z.output<typeof numberOrColumn>;

const entryNames = {
  abcd: ['a', 'b', 'c', 'd'],
  s: ['s11', 's12', 's21', 's22'],
  z: ['z11', 'z12', 'z21', 'z22'],
  y: ['y11', 'y12', 'y21', 'y22'],
  t: ['t11', 't12', 't21', 't22'],
} as const;

/** In the order of the matrix's rows. */
export function namesOf(representation: Representation): Entries<string> {
  return entryNames[representation];
}

const units: Readonly<Record<string, string>> = { b: 'ohm', c: 'S', z: 'ohm', y: 'S' };

function described(name: string, unit: string | undefined, hints: Record<string, unknown> = {}) {
  return { title: name.toUpperCase(), ...(unit && { 'x-unit': unit }), ...hints };
}

function given(name: string) {
  const meta = described(name, units[name.charAt(0)]);
  return numberOrColumn.meta({ ...meta, description: `${meta.title}: the same at every frequency, or a column.`, examples: [{ re: 0.5, im: 0 }] });
}

const titles = {
  abcd: { title: 'ABCD', description: 'V1 = A V2 + B I2, I1 = C V2 + D I2, with I2 out of port 2.' },
  s: { title: 'S', description: 'Scattering parameters in power waves.' },
  z: { title: 'Z', description: 'Impedance parameters.' },
  y: { title: 'Y', description: 'Admittance parameters.' },
  t: { title: 'T', description: 'Transfer scattering parameters, [b1; a1] = T [a2; b2].' },
} as const;

const example = {
  abcd: { a: 1, b: { re: 10, im: 5 }, c: 0, d: 1 },
  s: { s11: 0, s12: 0.5, s21: 0.5, s22: 0 },
  z: { z11: 75, z12: 25, z21: 25, z22: 75 },
  y: { y11: 0.03, y12: -0.01, y21: -0.01, y22: 0.03 },
  t: { t11: 0.5, t12: 0, t21: 0, t22: 2 },
};

export const twoPortValues = z
  .union([
    z.strictObject({ a: given('a'), b: given('b'), c: given('c'), d: given('d') }).meta({ id: 'AbcdValues', ...titles.abcd, examples: [example.abcd] }),
    z.strictObject({ s11: given('s11'), s12: given('s12'), s21: given('s21'), s22: given('s22') }).meta({ id: 'SValues', ...titles.s, examples: [example.s] }),
    z.strictObject({ z11: given('z11'), z12: given('z12'), z21: given('z21'), z22: given('z22') }).meta({ id: 'ZValues', ...titles.z, examples: [example.z] }),
    z.strictObject({ y11: given('y11'), y12: given('y12'), y21: given('y21'), y22: given('y22') }).meta({ id: 'YValues', ...titles.y, examples: [example.y] }),
    z.strictObject({ t11: given('t11'), t12: given('t12'), t21: given('t21'), t22: given('t22') }).meta({ id: 'TValues', ...titles.t, examples: [example.t] }),
  ])
  .meta({ title: 'Values', description: 'The entries of the matrix, by the names of its representation: a, b, c, d; s11, s12, s21, s22; and so on.', examples: [example.s] });

export type TwoPortValues = z.output<typeof twoPortValues>;

const entryOf = (name: string, hints: Record<string, unknown> = {}) =>
  complexColumn.meta({ ...described(name, units[name.charAt(0)], hints), description: `${name.toUpperCase()}; null where it does not exist.`, examples: [{ re: [1], im: [0] }] });

const chart = { 'x-plot': 'smith', 'x-plot-group': 'Reflection' };

/** The same in an answer: every entry a column. */
export const twoPortColumns = {
  abcd: z.strictObject({ a: entryOf('a'), b: entryOf('b'), c: entryOf('c'), d: entryOf('d') }).meta(titles.abcd),
  s: z.strictObject({ s11: entryOf('s11', chart), s12: entryOf('s12'), s21: entryOf('s21', { 'x-figure': 3 }), s22: entryOf('s22', chart) }).meta(titles.s),
  z: z.strictObject({ z11: entryOf('z11'), z12: entryOf('z12'), z21: entryOf('z21'), z22: entryOf('z22') }).meta(titles.z),
  y: z.strictObject({ y11: entryOf('y11'), y12: entryOf('y12'), y21: entryOf('y21'), y22: entryOf('y22') }).meta(titles.y),
  t: z.strictObject({ t11: entryOf('t11'), t12: entryOf('t12'), t21: entryOf('t21'), t22: entryOf('t22') }).meta(titles.t),
};

/** Entries by rows; where `namingProblems` finds none. */
export function entriesOf(values: TwoPortValues, representation: Representation): Entries<NumberOrColumn> {
  const record = values as unknown as Readonly<Record<string, NumberOrColumn>>;
  const [x11, x12, x21, x22] = namesOf(representation);
  return [record[x11], record[x12], record[x21], record[x22]];
}

export function isColumn(value: NumberOrColumn): value is Extract<NumberOrColumn, { re: number[] }> {
  return typeof value === 'object' && 're' in value && Array.isArray(value.re);
}

export function partsAt(value: NumberOrColumn, index: number): ComplexParts {
  return isColumn(value) ? { re: value.re[index], im: value.im[index] } : complexParts(value as ComplexNumber);
}

/** Entries of another representation than the one named. */
export function namingProblems(values: TwoPortValues, representation: Representation, pointer: string): InputProblem[] {
  const names = namesOf(representation);
  if (names.every((name) => name in values)) return [];
  return [{ pointer, code: 'other_representation', detail: `values must have ${names.slice(0, 3).join(', ')} and ${names[3]}, the entries of ${representation}; got ${Object.keys(values).join(', ')}` }];
}

/** Columns of another length than there are frequencies. `points` undefined: as long as each other. */
export function columnProblems(values: TwoPortValues, pointer: string, points: number | undefined): InputProblem[] {
  const columns = Object.entries(values).flatMap(([name, value]) => (isColumn(value) ? [{ name, value }] : []));
  const wanted = points ?? columns[0]?.value.re.length;
  const against = points === undefined ? 'the other columns' : 'frequency_hz';
  return columns.flatMap(({ name, value }) =>
    (['re', 'im'] as const)
      .filter((part) => value[part].length !== wanted)
      .map((part) => ({
        pointer: `${pointer}/${name}/${part}`,
        code: 'length_differs',
        detail: `${name}.${part} must have as many entries as ${against} (${wanted}); got ${value[part].length}`,
      })),
  );
}
