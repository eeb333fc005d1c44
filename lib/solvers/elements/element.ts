/** The elements of a cascade: schemas, and what only the whole can say about them. */
import { z } from 'zod';
import type { InputProblem } from '../errors';
import { line } from '../lines/line';
import { complexNumber } from '../nouns/complex-number';
import { partFields } from '../nouns/termination';

const lengthM = z.number().min(0).max(1e9).meta({ title: 'Length', description: 'Length of the line.', examples: [0.25], 'x-unit': 'm' });

const lineElement = z
  .strictObject({ kind: z.literal('line').meta({ title: 'Kind', description: 'A length of line.', examples: ['line'] }), line, length_m: lengthM })
  .meta({ id: 'LineElement', title: 'Line', description: 'A length of line.' });

const lumpedElement = <Kind extends 'series' | 'shunt'>(kind: Kind, id: string, title: string, description: string) =>
  z
    .strictObject({
      kind: z.literal(kind).meta({ title: 'Kind', description, examples: [kind] }),
      impedance_ohm: complexNumber.optional().meta({ title: 'Impedance', description: 'The same at every frequency; instead of parts.', examples: [{ re: 10, im: 5 }], 'x-unit': 'ohm' }),
      ...partFields,
      connection: z.enum(['series', 'parallel']).default('series').meta({ title: 'Connection of the parts', description: 'How resistance, inductance and capacitance stand to each other.', examples: ['series'] }),
    })
    .meta({ id, title, description });

const stubElement = <Kind extends 'open_stub' | 'short_stub' | 'series_open_stub' | 'series_short_stub'>(kind: Kind, id: string, title: string, description: string) =>
  z
    .strictObject({ kind: z.literal(kind).meta({ title: 'Kind', description, examples: [kind] }), line, length_m: lengthM })
    .meta({ id, title, description });

const transformerElement = z
  .strictObject({
    kind: z.literal('transformer').meta({ title: 'Kind', description: 'An ideal transformer.', examples: ['transformer'] }),
    turns_ratio: z.number().min(1e-6).max(1e6).meta({ title: 'Turns ratio', description: 'n in V1 = n V2, I1 = I2/n.', examples: [2] }),
  })
  .meta({ id: 'TransformerElement', title: 'Ideal transformer', description: 'An ideal transformer: V1 = n V2.' });

export const element = z
  .discriminatedUnion('kind', [
    lineElement,
    lumpedElement('series', 'SeriesElement', 'In series', 'An impedance or parts in series with the path.'),
    lumpedElement('shunt', 'ShuntElement', 'In shunt', 'An impedance or parts across the path.'),
    stubElement('open_stub', 'OpenStubElement', 'Open stub', 'A line across the path, open at its end.'),
    stubElement('short_stub', 'ShortStubElement', 'Shorted stub', 'A line across the path, shorted at its end.'),
    stubElement('series_open_stub', 'SeriesOpenStubElement', 'Open series stub', 'A line in series with the path, open at its end.'),
    stubElement('series_short_stub', 'SeriesShortStubElement', 'Shorted series stub', 'A line in series with the path, shorted at its end.'),
    transformerElement,
  ])
  .meta({ id: 'Element', title: 'Element', description: 'One element of a cascade.' });

export type Element = z.output<typeof element>;

/** An impedance or parts, and one of the two. */
export function elementProblems(elements: readonly Element[]): InputProblem[] {
  return elements.flatMap((each, index) => {
    if (each.kind !== 'series' && each.kind !== 'shunt') return [];
    const pointer = `/elements/${index}`;
    const parts = (['resistance_ohm', 'inductance_h', 'capacitance_f'] as const).filter((name) => each[name] !== undefined);
    if (each.impedance_ohm === undefined && parts.length === 0) {
      return [{ pointer, code: 'no_parts', detail: `elements[${index}] must have impedance_ohm or at least one of resistance_ohm, inductance_h and capacitance_f` }];
    }
    if (each.impedance_ohm === undefined) return [];
    return parts.map((name) => ({ pointer: `${pointer}/${name}`, code: 'excluded', detail: `${name} cannot stand beside impedance_ohm; leave one of them out` }));
  });
}
