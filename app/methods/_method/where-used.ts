/** Where a method is used: the kinds of line and the calculations that may rest on it. */
import { groups, type Calculation, type Group, type Method } from '@/lib/solvers/calculation';
import { lineKinds, lineMethods } from '@/lib/solvers/lines/line';
import { calculations, methods } from '@/lib/solvers/registry';

/** The shelves of the list of methods. */
export type Shelf = 'line kinds' | Group;

export const shelfTitles: Readonly<Record<Shelf, { readonly title: string; readonly about: string }>> = {
  'line kinds': { title: 'What a line is made of', about: 'Resistance, inductance, conductance and capacitance from dimensions, materials and data sheets. Every calculation that takes a line rests on these.' },
  lines: { title: 'Along a line', about: 'What follows from a line’s constants, whatever ends it.' },
  terminations: { title: 'At its ends', about: 'A line with something at its end.' },
  networks: { title: 'In a chain', about: 'Lines and parts joined to a network.' },
};

/** Each method once, on the shelf of what it is first used for. */
export function methodsByShelf(): readonly (readonly [Shelf, readonly Method[]])[] {
  const shelfOf = (method: Method): Shelf => (lineMethods.includes(method) ? 'line kinds' : calculationsWith(method)[0].group);
  return (['line kinds', ...groups] as const).map((shelf) => [shelf, methods.filter((method) => shelfOf(method) === shelf)] as const).filter(([, those]) => those.length > 0);
}

export function calculationsWith(method: Method): readonly Calculation[] {
  return calculations.filter((calculation) => calculation.methods.includes(method));
}

/** Titles of the kinds. */
export function lineKindsWith(method: Method): readonly string[] {
  return lineKinds.filter((kind) => kind.methods.includes(method)).map(({ schema }) => schema.meta()?.title ?? '');
}

