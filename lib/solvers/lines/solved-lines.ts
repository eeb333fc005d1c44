/**
 * Lines solved over one array of frequencies, which a request makes once: equal geometries are solved once, however many lengths of one cable a chain has,
 * and unlike ones may not cost more together than a request may.
 */
import { ImpossibleInput } from '../errors';
import type { LineKind, LineModel } from './line-constants';

/** Some seconds on a slow machine; a single line stays far below. */
const mostMicroseconds = 4e6;

interface Solved {
  readonly models: Map<string, LineModel>;
  microseconds: number;
}

const solvedOver = new WeakMap<Float64Array, Solved>();

/** Throws `ImpossibleInput` as the kind does, and where all lines over these frequencies are too costly together. */
export function solvedLine(kind: LineKind, value: unknown, frequenciesHz: Float64Array): LineModel {
  // Of what is not a geometry a model is a copy of what was given.
  if (!kind.dimensions) return kind.model(value, frequenciesHz);
  const solved = solvedOver.get(frequenciesHz) ?? { models: new Map<string, LineModel>(), microseconds: 0 };
  solvedOver.set(frequenciesHz, solved);
  const { length } = frequenciesHz;
  const key = `${frequenciesHz[0]} ${frequenciesHz[length - 1]} ${JSON.stringify(value)}`;
  const known = solved.models.get(key);
  if (known) return known;
  solved.microseconds += kind.microseconds?.(value, length) ?? 0;
  if (solved.microseconds > mostMicroseconds) {
    throw new ImpossibleInput([{ pointer: '', code: 'too_large', detail: `the lines up to this one take too long to solve over ${length} frequencies; give fewer frequencies, or fewer lines that differ` }]);
  }
  const model = kind.model(value, frequenciesHz);
  solved.models.set(key, model);
  return model;
}
