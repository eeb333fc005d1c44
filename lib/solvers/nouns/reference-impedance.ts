/** The impedance that reflection and scattering refer to. */
import { z } from 'zod';
import type { InputProblem } from '../errors';
import type { ComplexParts } from '../numeric/phasor';
import { complexForms, complexNumber, complexParts, type ComplexNumber } from './complex-number';

export const referenceImpedance = complexNumber.default(50).meta({
  title: 'Reference impedance',
  description: 'What reflection at the reference refers to, as a power wave; its real part must be greater than 0.',
  examples: [50],
  'x-unit': 'ohm',
});

const bothPorts = z
  .array(complexNumber)
  .min(2)
  .max(2)
  .meta({ title: 'Two ports', description: 'Reference impedances of port 1 and port 2.', examples: [[50, 75]], 'x-unit': 'ohm' });

const oneOrTwo = z.union([...complexForms, bothPorts]);

const portReferenceMeta = {
  title: 'Reference impedance',
  description: 'What scattering parameters refer to, as power waves: one for both ports, or a list of two. Real parts must be greater than 0.',
  examples: [50, [50, 75]],
  'x-unit': 'ohm',
};

export const portReferenceImpedances = oneOrTwo.default(50).meta(portReferenceMeta);

/** Where another field, or its own absence, says what it is. */
export const optionalPortReferenceImpedances = (meta: { title: string; description: string }) => oneOrTwo.optional().meta({ ...portReferenceMeta, ...meta });

export function portReferences(value: ComplexNumber | ComplexNumber[]): readonly [ComplexParts, ComplexParts] {
  const [first, second] = Array.isArray(value) ? value : [value, value];
  return [complexParts(first), complexParts(second)];
}

/** A reference must be able to carry power: Kurokawa's waves divide by the root of its resistance. */
export function referenceProblems(value: ComplexNumber | ComplexNumber[], pointer = '/reference_impedance_ohm'): InputProblem[] {
  const entries = Array.isArray(value) ? value.map((entry, index) => ({ entry, at: `${pointer}/${index}` })) : [{ entry: value, at: pointer }];
  return entries
    .filter(({ entry }) => !(complexParts(entry).re > 0))
    .map(({ entry, at }) => ({
      pointer: at,
      code: 'reference_without_resistance',
      detail: `${nameAt(at)} must have a real part greater than 0; got ${complexParts(entry).re}`,
    }));
}

/** `reference_impedance_ohm.0` for /elements/2/reference_impedance_ohm/0. */
function nameAt(pointer: string): string {
  return pointer.slice(pointer.lastIndexOf('/', pointer.lastIndexOf('_ohm')) + 1).replace('/', '.');
}
