/** Any line: the union of the kinds. A kind is one file and one line in each list here. */
import { z } from 'zod';
import type { LineConstants } from './line-constants';
import { lossless } from './lossless';
import { rlgc } from './rlgc';

export const line = z
  .discriminatedUnion('kind', [rlgc.schema, lossless.schema])
  .meta({ id: 'Line', title: 'Line', description: 'A uniform two-conductor line.' });

export type Line = z.output<typeof line>;

export function lineConstants(value: Line, frequenciesHz: Float64Array): LineConstants {
  switch (value.kind) {
    case 'rlgc':
      return rlgc.constants(value, frequenciesHz);
    case 'lossless':
      return lossless.constants(value, frequenciesHz);
  }
}
