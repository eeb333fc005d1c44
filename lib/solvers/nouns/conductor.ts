/** What a line's conductors are made of: a material by name, or by its numbers. */
import { z } from 'zod';
import type { InputProblem } from '../errors';
import { conductors, referenceTemperatureC } from '../materials';

const conductorNames = conductors.map(({ name }) => name) as [(typeof conductors)[number]['name'], ...(typeof conductors)[number]['name'][]];

const namedConductor = z.enum(conductorNames).meta({ id: 'NamedConductor', title: 'By name', description: 'A conductor of GET /materials.', examples: ['copper'] });

const conductorByValue = z
  .strictObject({
    resistivity_ohm_m: z.number().min(0).max(1e3).meta({ title: 'Resistivity', description: 'Resistivity at 20 degC; less than 1e-18 is taken as a perfect conductor.', examples: [1.724e-8], 'x-unit': 'ohm m' }),
    relative_permeability: z.number().min(1e-3).max(1e6).default(1).meta({ title: 'Relative permeability', description: 'Of the conductor, taken as constant.', examples: [1] }),
    temperature_coefficient_per_k: z.number().min(-0.02).max(0.02).default(0).meta({ title: 'Temperature coefficient', description: 'Of the resistivity, linear, referred to 20 degC.', examples: [0.00393], 'x-unit': '1/K' }),
  })
  .meta({ id: 'ConductorByValue', title: 'By value', description: 'A conductor by its resistivity.', examples: [{ resistivity_ohm_m: 1.724e-8 }] });

export const conductor = z.union([namedConductor, conductorByValue]).meta({ id: 'Conductor', title: 'Conductor', description: 'A material by name, or by its numbers.', examples: ['copper'] });

export type Conductor = z.output<typeof conductor>;

export const temperature = z.number().min(-273.15).max(2000).default(referenceTemperatureC).meta({ title: 'Temperature', description: 'Of the conductors.', examples: [20], 'x-unit': 'degC' });

/** A hundred-millionth of what any metal has in the cold: less is taken as none. */
const perfectBelowOhmM = 1e-18;

export interface ConductorProperties {
  readonly resistivityOhmM: number;
  readonly relativePermeability: number;
}

/**
 * rho(T) = rho20 (1 + alpha20 (T - 20 degC)). Range: where the line through 20 degC holds, about -50 to 200 degC for metals. A temperature at
 * which that line gives less than 0 is refused by `conductorProblems`.
 */
export function conductorAt(value: Conductor, temperatureC: number): ConductorProperties {
  const { resistivityOhmM, relativePermeability, temperatureCoefficientPerK } =
    typeof value === 'string'
      ? conductors.find(({ name }) => name === value)!
      : { resistivityOhmM: value.resistivity_ohm_m, relativePermeability: value.relative_permeability, temperatureCoefficientPerK: value.temperature_coefficient_per_k };
  const atTemperature = resistivityOhmM * (1 + temperatureCoefficientPerK * (temperatureC - referenceTemperatureC));
  return { resistivityOhmM: Math.abs(atTemperature) < perfectBelowOhmM ? 0 : atTemperature, relativePermeability };
}

/** Where the linear law has run below zero, which no temperature of a metal does. `pointer` is that of temperature_c. */
export function conductorProblems(value: Conductor, temperatureC: number, pointer = '/temperature_c'): InputProblem[] {
  const { resistivityOhmM } = conductorAt(value, temperatureC);
  if (resistivityOhmM >= 0) return [];
  return [{ pointer, code: 'no_resistivity', detail: `temperature_c must leave the conductor a resistivity of 0 or more; at ${temperatureC} degC its temperature coefficient gives ${resistivityOhmM.toPrecision(3)} ohm m` }];
}
