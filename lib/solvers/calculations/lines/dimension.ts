import { z } from 'zod';
import { defineCalculation, mergeMethods, type Warning } from '../../calculation';
import { ImpossibleInput, type InputProblem } from '../../errors';
import { boundsOf, dimensionNames, geometryKinds, geometryWithUnknown, lineWith, missingDimensions, type DimensionBounds } from '../../lines/geometry';
import { lineMethods, lineOverFrequency } from '../../lines/line';
import type { LineModel } from '../../lines/line-constants';
import { dimensionSearch, pointsBetween, sensitivityAt } from '../../methods/dimension-search';
import { propagation, telegrapherPropagation } from '../../methods/telegrapher';
import type { ComplexParts } from '../../numeric/phasor';
import type { Root } from '../../numeric/roots';
import { searchFor, type PartialFunction, type Search } from '../../numeric/search';

const input = z
  .strictObject({
    line: geometryWithUnknown,
    // A text with the names beside it, so that a refusal can name those of the line's own kind.
    vary: z.string().max(60).meta({ title: 'Dimension', description: 'Name of the sought dimension, one of the line’s own.', examples: ['inner_diameter_m'], enum: dimensionNames }),
    characteristic_impedance_ohm: z.number().min(1e-3).max(1e6).meta({ title: 'Characteristic impedance', description: 'Wanted; met by the real part of Zc at the frequency.', examples: [50], 'x-unit': 'ohm' }),
    frequency_hz: z.number().min(0).max(1e15).meta({ title: 'Frequency', description: 'The frequency at which it is wanted.', examples: [100e6], 'x-unit': 'Hz' }),
    minimum: z.number().min(-1e9).max(1e9).optional().meta({ title: 'Minimum', description: 'Least value of the dimension, in its own unit; what the geometry allows when left out.', examples: [1e-4] }),
    maximum: z.number().min(-1e9).max(1e9).optional().meta({ title: 'Maximum', description: 'Greatest value of the dimension, in its own unit; what the geometry allows when left out.', examples: [1e-2] }),
  })
  .superRefine(refine, { when: () => true })
  .meta({ id: 'DimensionInput', title: 'Dimension', description: 'A geometry, the dimension that is sought, and the impedance that is wanted.' });

type Input = z.output<typeof input>;

const output = z
  .strictObject({
    value: z.number().meta({ title: 'Value', description: 'The sought dimension, in its own SI unit.', examples: [0.0013], 'x-figure': 1 }),
    achieved_impedance_ohm: z
      .strictObject({
        re: z.number().meta({ title: 'Real part', description: 'Real part.', examples: [50] }),
        im: z.number().meta({ title: 'Imaginary part', description: 'Imaginary part; not 0 where the line has loss.', examples: [-0.05] }),
      })
      .meta({ title: 'Achieved impedance', description: 'Zc of the line with this dimension, at the frequency.', examples: [{ re: 50, im: -0.05 }], 'x-unit': 'ohm', 'x-figure': 2 }),
    sensitivity_ohm_per_m: z
      .union([z.number(), z.null()])
      .meta({ title: 'Sensitivity', description: 'Change of the real part of Zc with the dimension, for tolerances: by extrapolated central differences that start at 3 % of the dimension or closer. For a dimension that is no length, ohm per its own unit. Null where there is none.', examples: [-46600], 'x-unit': 'ohm/m', 'x-figure': 3 }),
    iterations: z.number().int().min(0).max(1000).meta({ title: 'Iterations', description: 'Steps from the bracket to the value; 0 where a point of the first scan met it.', examples: [8], 'x-figure': 4 }),
  })
  .meta({ id: 'DimensionResult', title: 'Dimension', description: 'A dimension and the impedance that it gives.' });

export const dimension = defineCalculation({
  id: 'dimension',
  group: 'lines',
  title: 'Dimension for an impedance',
  summary: 'The dimension of a line’s cross-section that gives a wanted characteristic impedance, and how sensitive the impedance is to it.',
  input,
  output,
  methods: [dimensionSearch, telegrapherPropagation, ...lineMethods],
  cost: { rule: '1 unit a call', units: () => 1 },
  solve(given) {
    const bounds = boundsOf(geometryKinds.get(given.line.kind)!, given.vary);
    const range = rangeOf(given, bounds);
    const impedance = impedanceOf(given);
    const search = searchFor(given.characteristic_impedance_ohm, impedance, pointsBetween(range.least, range.greatest));
    if (search === null) throw new ImpossibleInput(problemsEverywhere(given, bounds));
    if (search.roots.length === 0) throw new ImpossibleInput([outOfReach(given, search, bounds)]);
    const root = chosen(given, search.roots);
    const { model, characteristicImpedance } = lineAt(given, root.x)!;
    const sensitivity = sensitivityAt(impedance, root.x, range.greatest);
    return {
      result: { value: root.x + 0, achieved_impedance_ohm: characteristicImpedance, sensitivity_ohm_per_m: sensitivity === null ? null : sensitivity + 0, iterations: root.iterations },
      methods: mergeMethods([...[dimensionSearch, telegrapherPropagation].map((method) => ({ method, inRange: true })), ...model.methods]),
      warnings: [...searchWarnings(given, search.roots, root, bounds, sensitivity), ...model.warnings].slice(0, mostWarnings),
    };
  },
  examples: [
    {
      name: 'Inner conductor of a 50 ohm air line of 7 mm',
      input: { line: { kind: 'coaxial', outer_diameter_m: 7e-3, conductor: 'perfect', shield: 'perfect' }, vary: 'inner_diameter_m', characteristic_impedance_ohm: 50, frequency_hz: 1e9 },
      expected: [
        { pointer: '/value', value: 0.00304043291323808997 },
        { pointer: '/achieved_impedance_ohm/re', value: 50 },
      ],
      tolerance: 1e-12,
      source: 'closed form d = D exp(-2 pi Zc / eta0), eta0 = mu0 c with mu0 of CODATA 2022',
    },
    {
      name: 'Saltmarsh Cable Works: shield over a 0.9 mm wire in PTFE for 75 ohm',
      input: {
        line: { kind: 'coaxial', inner_diameter_m: 0.9e-3, conductor: 'perfect', shield: 'perfect', dielectric: { relative_permittivity: 2.1 } },
        vary: 'outer_diameter_m',
        characteristic_impedance_ohm: 75,
        frequency_hz: 100e6,
        minimum: 1e-3,
        maximum: 20e-3,
      },
      expected: [
        { pointer: '/value', value: 0.00551413943248461178 },
        { pointer: '/achieved_impedance_ohm/im', value: 0 },
      ],
      tolerance: 1e-12,
      source: 'closed form D = d exp(2 pi Zc sqrt(er) / eta0)',
    },
  ],
});

const mostWarnings = 100;

/** What the fields say only together; also where some of them are wrong, so that all is told at once. */
function refine(value: unknown, context: z.core.$RefinementCtx): void {
  if (typeof value !== 'object' || value === null) return;
  const { line, vary, minimum, maximum } = value as Partial<Record<keyof Input, unknown>>;
  const complain = (path: string[], code: string, message: string) => context.addIssue({ code: 'custom', path, params: { code }, message });
  if (typeof minimum === 'number' && typeof maximum === 'number' && minimum >= maximum) complain(['maximum'], 'bounds_order', `must be greater than minimum (${minimum}); got ${maximum}`);
  if (typeof vary !== 'string' || vary.length > 60) return;
  const kindName = typeof line === 'object' && line !== null && 'kind' in line ? line.kind : undefined;
  const kind = geometryKinds.get(kindName as string);
  const names = kind?.dimensions ?? dimensionNames;
  if (!names.includes(vary)) complain(['vary'], 'not_a_dimension', `must be a dimension of ${kind ? kindName : 'the line'}, one of ${names.map((name) => `"${name}"`).join(', ')}; got ${JSON.stringify(vary)}`);
  else if (kind) for (const name of missingDimensions(kind, line as object, vary)) complain(['line', name], 'required_dimension', 'is required (a finite number), for it is not the sought dimension');
}

interface LineAt {
  readonly model: LineModel;
  readonly characteristicImpedance: ComplexParts;
}

/** The line with the dimension at x; null where there is no such line or its impedance is not finite. */
function lineAt(given: Input, x: number): LineAt | null {
  try {
    const whole = lineWith(geometryKinds.get(given.line.kind)!, given.line, given.vary, x);
    if ('problems' in whole) return null;
    const frequencies = Float64Array.of(given.frequency_hz);
    const model = lineOverFrequency(whole.line, frequencies);
    const { re, im } = propagation(model.constants, frequencies).characteristicImpedance;
    return Number.isFinite(re[0]) && Number.isFinite(im[0]) ? { model, characteristicImpedance: { re: re[0] + 0, im: im[0] + 0 } } : null;
  } catch (error) {
    if (error instanceof ImpossibleInput) return null;
    throw error;
  }
}

/** The schema alone says where a line ends, and says it fast; a model may take milliseconds where conductors nearly touch. */
function impedanceOf(given: Input): PartialFunction {
  const kind = geometryKinds.get(given.line.kind)!;
  const known = new Map<number, number | null>();
  return {
    isDefined: (x) => 'line' in lineWith(kind, given.line, given.vary, x),
    valueAt(x) {
      const value = known.has(x) ? known.get(x)! : (lineAt(given, x)?.characteristicImpedance.re ?? null);
      known.set(x, value);
      return value;
    },
  };
}

/** What the caller and the schema of the dimension both allow. */
function rangeOf({ vary, minimum = -Infinity, maximum = Infinity }: Input, { least, greatest, unit }: DimensionBounds): { least: number; greatest: number } {
  if (minimum >= greatest) throw new ImpossibleInput([{ pointer: '/minimum', code: 'out_of_bounds', detail: `minimum must be less than the greatest ${vary}, ${greatest} ${unit}; got ${minimum}` }]);
  if (maximum <= least) throw new ImpossibleInput([{ pointer: '/maximum', code: 'out_of_bounds', detail: `maximum must be greater than the least ${vary}, ${least} ${unit}; got ${maximum}` }]);
  return { least: Math.max(minimum, least), greatest: Math.min(maximum, greatest) };
}

/** The smallest solution at which every method is in its range; the smallest of all where none is. */
function chosen(given: Input, roots: readonly Root[]): Root {
  return roots.find(({ x }) => lineAt(given, x)?.model.methods.every(({ inRange }) => inRange)) ?? roots[0];
}

/** Nothing within the bounds makes a line: the bounds are to blame, or the other fields, or the frequency. */
function problemsEverywhere(given: Input, bounds: DimensionBounds): InputProblem[] {
  const points = pointsBetween(bounds.least, bounds.greatest);
  const anywhere = searchFor(given.characteristic_impedance_ohm, impedanceOf(given), points);
  if (anywhere !== null) {
    const isBelow = given.maximum !== undefined && given.maximum < anywhere.first;
    const [name, side, end] = isBelow ? ['maximum', 'greater', anywhere.first] : ['minimum', 'less', anywhere.last];
    return [{ pointer: `/${name}`, code: 'no_line', detail: `${name} must be ${side} than ${shown(end as number)} ${bounds.unit}, as the other dimensions allow ${given.vary} from ${shown(anywhere.first)} to ${shown(anywhere.last)}; got ${given[name as 'minimum']}` }];
  }
  const each = [points[0], points[points.length >> 1], points[points.length - 1]].map((x) => problemsAt(given, x));
  const common = each[0].filter(({ pointer, code }) => each.every((problems) => problems.some((other) => other.pointer === pointer && other.code === code)));
  if (common.length > 0) return common;
  if (each.every((problems) => problems.length === 0)) return [{ pointer: '/frequency_hz', code: 'infinite_impedance', detail: `frequency_hz must be one at which the characteristic impedance is finite; at ${given.frequency_hz} Hz nothing flows between the conductors` }];
  return [{ pointer: '/line', code: 'no_line', detail: `line must be possible with some ${given.vary}; with the other dimensions as given it is not` }];
}

function problemsAt(given: Input, x: number): readonly InputProblem[] {
  const whole = lineWith(geometryKinds.get(given.line.kind)!, given.line, given.vary, x);
  if ('problems' in whole) return whole.problems;
  try {
    lineOverFrequency(whole.line, Float64Array.of(given.frequency_hz));
    return [];
  } catch (error) {
    if (error instanceof ImpossibleInput) return error.problems;
    throw error;
  }
}

function outOfReach({ vary, characteristic_impedance_ohm: wanted }: Input, { least, greatest, first, last }: Search, { unit }: DimensionBounds): InputProblem {
  const reach = `with ${vary} from ${shown(first)} to ${shown(last)} ${unit}`;
  const isInside = wanted > least.value && wanted < greatest.value;
  return {
    pointer: '/characteristic_impedance_ohm',
    code: 'out_of_reach',
    detail: isInside
      ? `characteristic_impedance_ohm must be one that the line passes through; ${reach} it leaves out ${wanted} ohm`
      : `characteristic_impedance_ohm must be between ${shownUp(least.value)} and ${shownDown(greatest.value)} ohm ${reach}; got ${wanted}`,
  };
}

function searchWarnings(given: Input, roots: readonly Root[], root: Root, { unit }: DimensionBounds, sensitivity: number | null): Warning[] {
  const { vary, characteristic_impedance_ohm: wanted } = given;
  const warnings: Warning[] = [];
  if (roots.length > 1) {
    const list = roots.map(({ x }) => Number(x.toPrecision(9))).join(', ');
    warnings.push({ code: 'several_solutions', pointer: '/value', detail: `${vary} of ${list} ${unit} all give this impedance; the answer is the smallest for which the methods hold, or else the smallest. Set minimum and maximum to find another` });
  }
  if (Math.abs(root.value - wanted) > 1e-9 * wanted) {
    warnings.push({ code: 'not_met', pointer: '/achieved_impedance_ohm', detail: `the impedance passes ${wanted} ohm in one step of ${vary}: its formulas change form here, or float64 cannot say the dimension more finely` });
  }
  if (sensitivity === null) warnings.push({ code: 'no_value', pointer: '/sensitivity_ohm_per_m', detail: 'the line is not possible on either side of this dimension, so there is no sensitivity' });
  return warnings;
}

const digits = 6;

function shown(value: number): number {
  return Number(value.toPrecision(digits));
}

/** Rounded inwards, so that what is said to be in reach is. */
function shownUp(value: number): number {
  return shown(shown(value) < value ? value * (1 + 10 ** (1 - digits)) : value);
}

function shownDown(value: number): number {
  return shown(shown(value) > value ? value * (1 - 10 ** (1 - digits)) : value);
}
