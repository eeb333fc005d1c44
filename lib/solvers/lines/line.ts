/** Any line: the union of the kinds. A kind is one file and one entry in the list here. */
import { z } from 'zod';
import { mergeMethods, type Method } from '../calculation';
import { ImpossibleInput } from '../errors';
import { coaxial } from './coaxial';
import { coplanar } from './coplanar';
import { datasheet } from './datasheet';
import type { LineKind, LineModel } from './line-constants';
import { lossless } from './lossless';
import { microstrip } from './microstrip';
import { parallelPlate } from './parallel-plate';
import { rlgc } from './rlgc';
import { rlgcTable } from './rlgc-table';
import { solvedLine } from './solved-lines';
import { stripline } from './stripline';
import { twistedPair } from './twisted-pair';
import { twoWire } from './two-wire';
import { wireOverPlane } from './wire-over-plane';

const kinds = [rlgc, rlgcTable, lossless, datasheet, coaxial, twoWire, wireOverPlane, parallelPlate, twistedPair, microstrip, stripline, coplanar] as const;

export const line = z
  .discriminatedUnion('kind', [rlgc.schema, rlgcTable.schema, lossless.schema, datasheet.schema, coaxial.schema, twoWire.schema, wireOverPlane.schema, parallelPlate.schema, twistedPair.schema, microstrip.schema, stripline.schema, coplanar.schema])
  .meta({ id: 'Line', title: 'Line', description: 'A uniform two-conductor line.' });

export type Line = z.output<typeof line>;

/** What the kinds are called, and what each may rest on. */
export const lineKinds: readonly Pick<LineKind, 'schema' | 'methods'>[] = kinds;

/** Every method that a line's constants may rest on: what a calculation that takes a line adds to its own. */
export const lineMethods: readonly Method[] = [...new Set(kinds.flatMap((kind): readonly Method[] => kind.methods))];

const byKind: ReadonlyMap<string, LineKind> = new Map(kinds.map((kind) => [kind.schema.shape.kind.value, kind as unknown as LineKind]));

/**
 * A line over frequency. Range: any line that its schema accepts, over frequencies that stay as they are while lines are solved over them. `pointer` is where the line stands in the input: the pointers of warnings
 * and refusals begin with it. Throws `ImpossibleInput` where the line cannot be at these frequencies.
 */
export function lineOverFrequency(value: Line, frequenciesHz: Float64Array, pointer = '/line'): LineModel {
  const model = modelOf(byKind.get(value.kind)!, value, frequenciesHz, pointer);
  return { ...model, methods: mergeMethods(model.methods), warnings: model.warnings.map((each) => ({ ...each, pointer: pointer + each.pointer })) };
}

function modelOf(kind: LineKind, value: Line, frequenciesHz: Float64Array, pointer: string): LineModel {
  try {
    return solvedLine(kind, value, frequenciesHz);
  } catch (error) {
    if (!(error instanceof ImpossibleInput)) throw error;
    throw new ImpossibleInput(error.problems.map((problem) => ({ ...problem, pointer: pointer + problem.pointer })));
  }
}
