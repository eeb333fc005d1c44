/** Tables of numbers that people look up: materials and wire gauges. */
import { conductors, dielectrics, referenceTemperatureC } from '@/lib/solvers/materials';
import { usualMetricSizes } from '@/lib/solvers/gauges';
import { defineOperation } from '../operation';
import { z } from '../zod';

const conductorNames = conductors.map(({ name }) => name) as [(typeof conductors)[number]['name'], ...(typeof conductors)[number]['name'][]];
const dielectricNames = dielectrics.map(({ name }) => name) as [(typeof dielectrics)[number]['name'], ...(typeof dielectrics)[number]['name'][]];

const source = z.string().max(1000).meta({ description: 'Where the numbers are published.', examples: ['IEC 60028:1925'] });
const condition = z.string().max(1000).meta({ description: 'What they hold under.', examples: ['international annealed copper standard, 20 degC'] });
const title = (example: string) => z.string().max(200).meta({ description: 'What it is called.', examples: [example] });

const conductorSchema = z
  .object({
    name: z.enum(conductorNames).meta({ description: 'The name that requests give.', examples: ['copper'] }),
    title: title('Copper, annealed'),
    resistivity_ohm_m: z.number().min(0).max(1).meta({ description: 'Resistivity at 20 degC; 0 of a perfect conductor.', examples: [1.724e-8] }),
    relative_permeability: z.number().min(0).max(1e6).meta({ description: 'Relative permeability.', examples: [1] }),
    temperature_coefficient_per_k: z.number().min(-1).max(1).meta({ description: 'Of the resistivity, linear, referred to 20 degC.', examples: [0.00393] }),
    source,
    condition,
  })
  .meta({ id: 'ConductorMaterial', description: 'A conductor with its numbers.' });

const dielectricSchema = z
  .object({
    name: z.enum(dielectricNames).meta({ description: 'The name that requests give.', examples: ['ptfe'] }),
    title: title('PTFE, solid'),
    relative_permittivity: z.number().min(1).max(1e4).meta({ description: 'Relative permittivity, real part.', examples: [2.1] }),
    loss_tangent: z.number().min(0).max(10).meta({ description: 'Loss tangent.', examples: [0.0002] }),
    reference_frequency_hz: z.union([z.number().min(0).max(1e15), z.null()]).meta({ description: 'Where the two were measured; null where they hold at any frequency.', examples: [1e9] }),
    source,
    condition,
  })
  .meta({ id: 'DielectricMaterial', description: 'A dielectric with its numbers.' });

export const listMaterials = defineOperation({
  id: 'materials.list',
  method: 'get',
  path: '/materials',
  tag: 'Tables',
  summary: 'List the materials',
  description: 'All conductors and dielectrics that a line may name, each with its numbers, their source and the condition they hold under.',
  access: 'public',
  answers: {
    200: {
      description: 'The materials.',
      schema: z
        .object({
          conductors: z.array(conductorSchema).max(1000).meta({ description: 'The conductors.' }),
          dielectrics: z.array(dielectricSchema).max(1000).meta({ description: 'The dielectrics.' }),
        })
        .meta({ id: 'Materials', description: 'All materials by name.' }),
      headers: ['ETag'],
    },
  },
});

/** A query holds texts. An empty one is no number, although JavaScript would read it as 0. */
const decimal = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;
const lowestTemperatureC = -273.15;
const highestTemperatureC = 2000;

export const gaugeQuery = z.strictObject({
  conductor: z.enum(conductorNames).default('copper').meta({ description: 'Material of the wire, a conductor of /materials.', examples: ['copper'] }),
  temperature_c: z
    .preprocess((text) => (typeof text === 'string' && decimal.test(text) ? Number(text) : text), z.number().min(lowestTemperatureC).max(highestTemperatureC).default(referenceTemperatureC))
    .meta({ description: 'Temperature of the wire.', examples: [20] })
    .openapi({ type: 'number', minimum: lowestTemperatureC, maximum: highestTemperatureC, default: referenceTemperatureC }),
});
export type GaugeQuery = z.output<typeof gaugeQuery>;

const sizeShape = {
  diameter_m: z.number().min(0).max(1).meta({ description: 'Diameter of a solid round wire of this size.', examples: [0.000510598] }),
  area_m2: z.number().min(0).max(1).meta({ description: 'Cross-sectional area.', examples: [2.0476e-7] }),
  resistance_ohm_per_m: z.number().min(0).max(1e9).meta({ description: 'Resistance to direct current, resistivity over area.', examples: [0.0842] }),
};
const number = z.string().max(4).meta({ description: 'Gauge number: 0000, 000, 00, 0, 1 to 56.', examples: ['24'] });
const nominalSize = z.string().max(20).meta({ description: 'Nominal area in mm2.', examples: ['1.5'] });

const wireShape = {
  conductor: z.enum(conductorNames).meta({ description: 'Material of the wire.', examples: ['copper'] }),
  temperature_c: z.number().min(lowestTemperatureC).max(highestTemperatureC).meta({ description: 'Temperature of the wire.', examples: [20] }),
  resistivity_ohm_m: z.number().min(0).max(1).meta({ description: 'Resistivity of the material at that temperature.', examples: [1.724e-8] }),
};
const gaugeSource = z.string().max(1000).meta({ description: 'Where the size and the resistivity are published.', examples: ['ASTM B258; resistivity of copper: IEC 60028:1925'] });
const gaugeCondition = z.string().max(1000).meta({ description: 'What the numbers hold under.', examples: ['solid round wire, direct current, 20 degC'] });

const awgSchema = z.object({ number, ...sizeShape, ...wireShape, source: gaugeSource, condition: gaugeCondition }).meta({ id: 'AwgGauge', description: 'A wire of an American gauge.' });
const metricSchema = z.object({ nominal_size: nominalSize, ...sizeShape, ...wireShape, source: gaugeSource, condition: gaugeCondition }).meta({ id: 'MetricGauge', description: 'A wire of a metric size.' });

export const listGauges = defineOperation({
  id: 'gauges.list',
  method: 'get',
  path: '/gauges',
  tag: 'Tables',
  summary: 'List the wire gauges',
  description: 'All AWG numbers and the usual metric sizes, with diameter, area and resistance of a solid wire of the material and temperature asked for.',
  access: 'public',
  query: gaugeQuery,
  answers: {
    200: {
      description: 'The gauges.',
      schema: z
        .object({
          ...wireShape,
          condition: gaugeCondition,
          awg: z
            .object({
              source: gaugeSource,
              data: z.array(z.object({ number, ...sizeShape }).meta({ id: 'AwgRow', description: 'One AWG number.' })).max(100).meta({ description: 'From thick to thin.' }),
            })
            .meta({ description: 'American wire gauge.' }),
          metric: z
            .object({
              source: gaugeSource,
              data: z.array(z.object({ nominal_size: nominalSize, ...sizeShape }).meta({ id: 'MetricRow', description: 'One metric size.' })).max(usualMetricSizes.length).meta({ description: 'From thin to thick.' }),
            })
            .meta({ description: 'Metric sizes by nominal area.' }),
        })
        .meta({ id: 'GaugeTable', description: 'Wire gauges with their sizes.' }),
      headers: ['ETag'],
    },
  },
});

export const readAwgGauge = defineOperation({
  id: 'gauges.awg',
  method: 'get',
  path: '/gauges/awg/{number}',
  tag: 'Tables',
  summary: 'Read an AWG size',
  description: 'Diameter, area and resistance of a solid wire by its AWG number: 0000 (also `4%2F0`), 000, 00, 0, 1 to 56.',
  access: 'public',
  parameters: z.strictObject({ number: z.string().min(1).max(20).meta({ description: 'Gauge number: 0000, 000, 00, 0, or 1 to 56; `4%2F0` is 0000.', examples: ['24'] }) }),
  query: gaugeQuery,
  answers: { 200: { description: 'The wire.', schema: awgSchema, headers: ['ETag'] } },
});

export const readMetricGauge = defineOperation({
  id: 'gauges.metric',
  method: 'get',
  path: '/gauges/metric/{mm2}',
  tag: 'Tables',
  summary: 'Read a metric wire size',
  description: 'Diameter, area and resistance of a solid wire by its nominal area in mm2, any plain decimal from 0.000001 to 10000. IEC 60228 prescribes maximum resistances, which allow for tolerance and stranding; this one is nominal.',
  access: 'public',
  parameters: z.strictObject({ mm2: z.string().min(1).max(20).meta({ description: 'Nominal area in mm2.', examples: ['1.5'] }) }),
  query: gaugeQuery,
  answers: { 200: { description: 'The wire.', schema: metricSchema, headers: ['ETag'] } },
});
