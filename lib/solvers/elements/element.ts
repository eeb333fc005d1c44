/** The elements of a cascade: schemas. A cascade is itself an element. */
import { z } from 'zod';
import { line } from '../lines/line';
import { complexNumber } from '../nouns/complex-number';
import { lineLength } from '../nouns/line-length';
import { optionalPortReferenceImpedances } from '../nouns/reference-impedance';
import { partFields } from '../nouns/termination';
import { representations, twoPortValues } from '../nouns/two-port-values';

const lengthM = lineLength(0.25);

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

const twoPortElement = z
  .strictObject({
    kind: z.literal('two_port').meta({ title: 'Kind', description: 'A two-port by its matrix.', examples: ['two_port'] }),
    representation: z.enum(representations).meta({ title: 'Representation', description: 'What values is.', examples: ['s'] }),
    values: twoPortValues,
    reference_impedance_ohm: optionalPortReferenceImpedances({
      title: 'Reference impedance',
      description: 'What S or T in values refers to, as power waves: one for both ports, or a list of two; 50 when left out. Not with ABCD, Z or Y.',
    }),
  })
  .meta({
    id: 'TwoPortElement',
    title: 'Two-port',
    description: 'A two-port by its matrix, the same at every frequency or with one entry a frequency.',
    examples: [{ kind: 'two_port', representation: 's', values: { s11: 0, s12: 0.5, s21: 0.5, s22: 0 } }],
  });

const leafElements = [
  lineElement,
  lumpedElement('series', 'SeriesElement', 'In series', 'An impedance or parts in series with the path.'),
  lumpedElement('shunt', 'ShuntElement', 'In shunt', 'An impedance or parts across the path.'),
  stubElement('open_stub', 'OpenStubElement', 'Open stub', 'A line across the path, open at its end.'),
  stubElement('short_stub', 'ShortStubElement', 'Shorted stub', 'A line across the path, shorted at its end.'),
  stubElement('series_open_stub', 'SeriesOpenStubElement', 'Open series stub', 'A line in series with the path, open at its end.'),
  stubElement('series_short_stub', 'SeriesShortStubElement', 'Shorted series stub', 'A line in series with the path, shorted at its end.'),
  transformerElement,
  twoPortElement,
] as const;

type LeafSchema = (typeof leafElements)[number];
/** Whatever is not itself a cascade. */
export type LeafElement = z.output<LeafSchema>;

export interface CascadeElement {
  kind: 'cascade';
  elements: Element[];
  repeat: number;
}

export type Element = LeafElement | CascadeElement;

type ElementInput = z.input<LeafSchema> | { kind: 'cascade'; elements: ElementInput[]; repeat?: number | undefined };

export const mostElements = 200;
const mostRepeats = 1000;

const cascadeElement = z
  .strictObject({
    kind: z.literal('cascade').meta({ title: 'Kind', description: 'A cascade within the cascade.', examples: ['cascade'] }),
    get elements() {
      return elementList;
    },
    repeat: z.number().int().min(1).max(mostRepeats).default(1).meta({ title: 'Repeat', description: 'How often it stands in the path, one after the other.', examples: [10] }),
  })
  .meta({
    id: 'CascadeElement',
    title: 'Cascade',
    description: 'A cascade within the cascade, up to 8 deep, as often as repeat says.',
    examples: [{ kind: 'cascade', elements: [{ kind: 'series', inductance_h: 1e-8 }, { kind: 'shunt', capacitance_f: 4e-12 }], repeat: 10 }],
  });

export const element: z.ZodType<Element, ElementInput> = z
  .discriminatedUnion('kind', [...leafElements, cascadeElement])
  .meta({ id: 'Element', title: 'Element', description: 'One element of a cascade.' });

export const elementList: z.ZodType<Element[], ElementInput[]> = z
  .array(element)
  .min(1)
  .max(mostElements)
  .meta({ title: 'Elements', description: 'From port 1 to port 2.', examples: [[{ kind: 'series', inductance_h: 1e-8 }]] });
