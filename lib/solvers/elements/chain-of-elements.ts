/** A chain of elements, cascades within it included: what is wrong with it, what it costs, and its two-port. */
import type { Method, MethodUse, Warning } from '../calculation';
import type { InputProblem } from '../errors';
import { lineOverFrequency } from '../lines/line';
import type { LineConstants, LineModel } from '../lines/line-constants';
import { telegrapherTwoPort } from '../methods/line-two-port';
import { lumpedImpedance } from '../methods/one-port';
import { chain, chainsToRepeat, repeated, type TwoPort } from '../methods/two-port';
import { isInWaves } from '../methods/two-port-coordinates';
import { referenceProblems } from '../nouns/reference-impedance';
import { columnProblems, namingProblems } from '../nouns/two-port-values';
import type { Phasor, Space } from '../numeric/phasor';
import type { Element, LeafElement } from './element';
import { elementTwoPort, type Sweep } from './element-two-port';
import { isTakenAsReciprocal, variesOverSweep } from './given-two-port';

const deepest = 8;
/** With repeats multiplied out; beyond, the rounding of so many would be more than the stated accuracy. */
const mostExpanded = 1_000_000;

interface Placed {
  readonly element: Element;
  /** `/elements/0/elements/3` */
  readonly pointer: string;
  readonly depth: number;
}

/** Each element once, however often it is repeated. */
function placed(elements: readonly Element[], pointer = '/elements', depth = 1): Placed[] {
  return elements.flatMap((element, index): Placed[] => {
    const here = { element, pointer: `${pointer}/${index}`, depth };
    if (element.kind !== 'cascade') return [here];
    return [here, ...placed(element.elements, `${here.pointer}/elements`, depth + 1)];
  });
}

/** Elements as they are computed: each once, and for a repeat as many chains as squaring needs. */
export function workOf(elements: readonly Element[]): number {
  return elements.reduce((sum, each) => sum + (each.kind === 'cascade' ? workOf(each.elements) + chainsToRepeat(each.repeat) : 1), 0);
}

/** Elements in the path. */
export function expandedCount(elements: readonly Element[]): number {
  return elements.reduce((sum, each) => sum + (each.kind === 'cascade' ? each.repeat * expandedCount(each.elements) : 1), 0);
}

/** What a schema cannot say. */
export function elementProblems(elements: readonly Element[], points: number): InputProblem[] {
  const count = expandedCount(elements);
  return [
    ...placed(elements).flatMap(({ element, pointer, depth }) => (element.kind === 'cascade' ? depthProblems(pointer, depth) : leafProblems(element, pointer, points))),
    ...(count > mostExpanded ? [{ pointer: '/elements', code: 'too_large', detail: `elements must come to at most ${mostExpanded} with every repeat; got ${count}` }] : []),
  ];
}

function depthProblems(pointer: string, depth: number): InputProblem[] {
  return depth === deepest + 1 ? [{ pointer, code: 'too_deep', detail: `${nameAt(pointer)} must be at most ${deepest} cascades deep` }] : [];
}

function leafProblems(element: LeafElement, pointer: string, points: number): InputProblem[] {
  if (element.kind === 'series' || element.kind === 'shunt') return partProblems(element, pointer);
  if (element.kind !== 'two_port') return [];
  const { representation, values, reference_impedance_ohm: reference } = element;
  const at = `${pointer}/reference_impedance_ohm`;
  const unneeded = reference !== undefined && !isInWaves(representation);
  return [
    ...namingProblems(values, representation, `${pointer}/values`),
    ...columnProblems(values, `${pointer}/values`, points),
    ...(unneeded ? [{ pointer: at, code: 'excluded', detail: `reference_impedance_ohm has no meaning for ${representation}; leave it out` }] : []),
    ...(reference === undefined || unneeded ? [] : referenceProblems(reference, at)),
  ];
}

/** An impedance or parts, and one of the two. */
function partProblems(element: Extract<LeafElement, { kind: 'series' | 'shunt' }>, pointer: string): InputProblem[] {
  const parts = (['resistance_ohm', 'inductance_h', 'capacitance_f'] as const).filter((name) => element[name] !== undefined);
  if (element.impedance_ohm === undefined && parts.length === 0) {
    return [{ pointer, code: 'no_parts', detail: `${nameAt(pointer)} must have impedance_ohm or at least one of resistance_ohm, inductance_h and capacitance_f` }];
  }
  if (element.impedance_ohm === undefined) return [];
  return parts.map((name) => ({ pointer: `${pointer}/${name}`, code: 'excluded', detail: `${name} cannot stand beside impedance_ohm; leave one of them out` }));
}

/** `elements[0].elements[3]` */
function nameAt(pointer: string): string {
  return pointer.slice(1).replaceAll(/\/(\d+)/g, '[$1]').replaceAll('/', '.');
}

export interface ChainModels {
  readonly byElement: ReadonlyMap<Element, LineModel>;
  readonly methods: readonly MethodUse[];
  readonly warnings: readonly Warning[];
}

/** Of every line in the chain its model, and what there is to know about the elements. Throws `ImpossibleInput` where a line cannot be. */
export function modelsOf(elements: readonly Element[], frequenciesHz: Float64Array): ChainModels {
  const all = placed(elements);
  const lines = all.flatMap(({ element, pointer }) => ('line' in element ? [{ element, model: lineOverFrequency(element.line, frequenciesHz, `${pointer}/line`) }] : []));
  const hasParts = all.some(({ element }) => element.kind === 'series' || element.kind === 'shunt');
  const uses = (method: Method, isUsed: boolean): MethodUse[] => (isUsed ? [{ method, inRange: true }] : []);
  return {
    byElement: new Map(lines.map(({ element, model }) => [element, model])),
    methods: [...uses(telegrapherTwoPort, lines.length > 0), ...uses(lumpedImpedance, hasParts), ...lines.flatMap(({ model }) => model.methods)],
    warnings: [...lines.flatMap(({ model }) => model.warnings), ...all.flatMap(({ element, pointer }) => givenWarnings(element, pointer, frequenciesHz))],
  };
}

function givenWarnings(element: Element, pointer: string, frequenciesHz: Float64Array): Warning[] {
  if (element.kind !== 'two_port') return [];
  const warnings: Warning[] = [];
  if (isTakenAsReciprocal(element, frequenciesHz.length)) {
    warnings.push({ code: 'taken_as_reciprocal', pointer: `${pointer}/values`, detail: 'the determinant is lost in the rounding of the entries given and may be 1; the two-port is taken as reciprocal, S12 = S21' });
  }
  if (variesOverSweep(element)) {
    const isAlone = frequenciesHz.every((each) => each === frequenciesHz[0]);
    warnings.push(
      isAlone
        ? { code: 'no_delay', pointer, detail: `at one frequency ${nameAt(pointer)} says nothing of its delay; it adds none to group_delay_s` }
        : { code: 'delay_by_differences', pointer, detail: `the delay of ${nameAt(pointer)} is found by differences between neighbouring frequencies; group_delay_s is good where its phase turns by well less than half a turn between them` },
    );
  }
  return warnings;
}

/** `constantsOf` tells those of an element's line, where it has one. */
export function chainTwoPort<T extends Phasor<T>>(space: Space<T>, elements: readonly Element[], constantsOf: (element: LeafElement) => LineConstants | undefined, sweep: Sweep): TwoPort<T> {
  return elements
    .map((each) => (each.kind === 'cascade' ? repeated(space, chainTwoPort(space, each.elements, constantsOf, sweep), each.repeat) : elementTwoPort(space, each, constantsOf(each), sweep)))
    .reduce((first, second) => chain(space, first, second));
}
