/** Materials and wire gauges, as the API shows them. */
import { awgName, awgSize, awgSource, metricSize, metricSource, readAwg, readMetricSize, thickestAwg, thinnestAwg, usualMetricSizes, wireResistanceOhmPerM, type GaugeSize } from '@/lib/solvers/gauges';
import { conductors, dielectrics } from '@/lib/solvers/materials';
import { conductorAt, conductorProblems } from '@/lib/solvers/nouns/conductor';
import type { GaugeQuery } from '@/openapi/operations/tables';
import { invalidInput, Refusal } from './refusal';
import { taggedReply, type Reply } from './respond';

export function listMaterials(): Reply {
  return taggedReply(
    JSON.stringify({
      conductors: conductors.map(({ name, title, resistivityOhmM, relativePermeability, temperatureCoefficientPerK, source, condition }) => ({
        name,
        title,
        resistivity_ohm_m: resistivityOhmM,
        relative_permeability: relativePermeability,
        temperature_coefficient_per_k: temperatureCoefficientPerK,
        source,
        condition,
      })),
      dielectrics: dielectrics.map(({ name, title, relativePermittivity, lossTangent, referenceFrequencyHz, source, condition }) => ({
        name,
        title,
        relative_permittivity: relativePermittivity,
        loss_tangent: lossTangent,
        reference_frequency_hz: referenceFrequencyHz,
        source,
        condition,
      })),
    }),
  );
}

export function listGauges(query: GaugeQuery): Reply {
  const wire = wireOf(query);
  const numbers = Array.from({ length: thinnestAwg - thickestAwg + 1 }, (_, index) => thickestAwg + index);
  return taggedReply(
    JSON.stringify({
      ...wire.members,
      condition: wire.condition,
      awg: { source: wire.sourceWith(awgSource), data: numbers.map((number) => ({ number: awgName(number), ...wire.row(awgSize(number)) })) },
      metric: { source: wire.sourceWith(metricSource), data: usualMetricSizes.map((size) => ({ nominal_size: size, ...wire.row(metricSize(Number(size))) })) },
    }),
  );
}

export function readAwgGauge(text: string, query: GaugeQuery): Reply {
  // Whether a slash inside a path segment arrives decoded is the framework's affair.
  const number = readAwg(text.replace(/%2f/i, '/'));
  if (number === undefined) throw new Refusal('not-found', 'there is no such gauge; AWG runs from 0000 (4/0) to 56 in whole numbers');
  const wire = wireOf(query);
  return taggedReply(JSON.stringify({ number: awgName(number), ...wire.row(awgSize(number)), ...wire.members, source: wire.sourceWith(awgSource), condition: wire.condition }));
}

export function readMetricGauge(text: string, query: GaugeQuery): Reply {
  const area = readMetricSize(text);
  if (area === undefined) throw new Refusal('not-found', 'there is no such size; the nominal area is a plain decimal from 0.000001 to 10000 (mm2)');
  const wire = wireOf(query);
  return taggedReply(JSON.stringify({ nominal_size: plain(text), ...wire.row(metricSize(area)), ...wire.members, source: wire.sourceWith(metricSource), condition: wire.condition }));
}

/** What all sizes of one material and temperature share. */
function wireOf({ conductor, temperature_c }: GaugeQuery) {
  const problems = conductorProblems(conductor, temperature_c);
  if (problems.length > 0) throw invalidInput(problems.map(({ code, detail }) => ({ parameter: 'temperature_c', code, detail })));
  const material = conductors.find(({ name }) => name === conductor)!;
  const { resistivityOhmM } = conductorAt(conductor, temperature_c);
  return {
    members: { conductor, temperature_c, resistivity_ohm_m: resistivityOhmM },
    condition: `solid round wire, direct current, nominal size; ${material.title} at ${temperature_c} degC; resistivity: ${material.condition}`,
    sourceWith: (source: string) => `${source}; resistivity of ${conductor}: ${material.source}`,
    row: (size: GaugeSize) => ({ diameter_m: size.diameterM, area_m2: size.areaM2, resistance_ohm_per_m: wireResistanceOhmPerM(resistivityOhmM, size) }),
  };
}

/** 1.5 for 01.50. */
function plain(decimal: string): string {
  const trimmed = decimal.replace(/^0+(?=\d)/, '');
  return trimmed.includes('.') ? trimmed.replace(/\.?0+$/, '') : trimmed;
}
