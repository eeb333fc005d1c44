/** What fills a line: a material by name, or by its numbers; constant, or with the wideband Debye model. */
import { z } from 'zod';
import { dielectrics } from '../materials';
import { constantPermittivity, widebandDebyePermittivity, type Permittivity } from '../methods/permittivity';

const dielectricNames = dielectrics.map(({ name }) => name) as [(typeof dielectrics)[number]['name'], ...(typeof dielectrics)[number]['name'][]];

const namedDielectric = z.enum(dielectricNames).meta({ id: 'NamedDielectric', title: 'By name', description: 'A dielectric of GET /materials, its numbers taken as constant.', examples: ['ptfe'] });

const dielectricByValue = z
  .strictObject({
    relative_permittivity: z.number().min(1).max(1e4).meta({ title: 'Relative permittivity', description: 'Real part, at the reference frequency where the model is not constant.', examples: [4.3] }),
    loss_tangent: z.number().min(0).max(10).default(0).meta({ title: 'Loss tangent', description: 'At the reference frequency where the model is not constant.', examples: [0.02] }),
    model: z.enum(['constant', 'wideband_debye']).default('constant').meta({ title: 'Model', description: 'The same at every frequency, or causal with a nearly constant loss tangent.', examples: ['wideband_debye'] }),
    reference_frequency_hz: z.number().min(1e4).max(1e11).default(1e9).meta({ title: 'Reference frequency', description: 'Where permittivity and loss tangent were measured; the wideband Debye model passes through them there.', examples: [1e9], 'x-unit': 'Hz' }),
  })
  .meta({ id: 'DielectricByValue', title: 'By value', description: 'A dielectric by its permittivity and loss tangent.', examples: [{ relative_permittivity: 4.3, loss_tangent: 0.02 }] });

export const dielectric = z
  .union([namedDielectric, dielectricByValue])
  .default('vacuum')
  .meta({ id: 'Dielectric', title: 'Dielectric', description: 'A material by name, or by its numbers; vacuum when left out.', examples: ['ptfe'] });

export type Dielectric = z.output<typeof dielectric>;

/** The permittivity of a dielectric over frequency, with its slopes and its method. */
export function dielectricOver(value: Dielectric, omega: Float64Array): Permittivity {
  if (typeof value === 'string') {
    const material = dielectrics.find(({ name }) => name === value)!;
    return constantPermittivity(material.relativePermittivity, material.lossTangent, omega);
  }
  const { relative_permittivity: permittivity, loss_tangent: tangent } = value;
  return value.model === 'constant' ? constantPermittivity(permittivity, tangent, omega) : widebandDebyePermittivity(permittivity, tangent, 2 * Math.PI * value.reference_frequency_hz, omega);
}
