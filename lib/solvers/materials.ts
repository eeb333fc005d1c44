/** Conductors and dielectrics by name, each with its source and the condition its numbers hold under. */

export interface ConductorMaterial {
  readonly name: string;
  readonly title: string;
  /** At 20 degC. */
  readonly resistivityOhmM: number;
  readonly relativePermeability: number;
  /** Linear, referred to 20 degC. */
  readonly temperatureCoefficientPerK: number;
  readonly source: string;
  readonly condition: string;
}

export interface DielectricMaterial {
  readonly name: string;
  readonly title: string;
  readonly relativePermittivity: number;
  readonly lossTangent: number;
  /** Where the two were measured; null where they hold at any. */
  readonly referenceFrequencyHz: number | null;
  readonly source: string;
  readonly condition: string;
}

/** The temperature that resistivities and their coefficients refer to. */
export const referenceTemperatureC = 20;

const handbook = 'CRC Handbook of Chemistry and Physics, 97th ed., section 12, electrical resistivity of pure metals (from memory)';

/** 1/58 ohm mm2/m, IEC 60028; written out, for a compiler may fold a division to a neighbouring number. */
const annealedCopperOhmM = 1.724137931034483e-8;

export const conductors = [
  { name: 'copper', title: 'Copper, annealed', resistivityOhmM: annealedCopperOhmM, relativePermeability: 1, temperatureCoefficientPerK: 0.00393, source: 'IEC 60028:1925', condition: 'international annealed copper standard, 20 degC' },
  { name: 'copper_hard_drawn', title: 'Copper, hard-drawn', resistivityOhmM: 1.777e-8, relativePermeability: 1, temperatureCoefficientPerK: 0.00381, source: 'ASTM B1, 97 % conductivity (from memory)', condition: 'hard-drawn wire, 20 degC' },
  { name: 'silver', title: 'Silver', resistivityOhmM: 1.587e-8, relativePermeability: 1, temperatureCoefficientPerK: 0.0038, source: handbook, condition: 'pure, 20 degC' },
  { name: 'gold', title: 'Gold', resistivityOhmM: 2.214e-8, relativePermeability: 1, temperatureCoefficientPerK: 0.0034, source: handbook, condition: 'pure, 20 degC' },
  { name: 'aluminium', title: 'Aluminium, for wires', resistivityOhmM: 2.8264e-8, relativePermeability: 1, temperatureCoefficientPerK: 0.00403, source: 'IEC 60889:1987 (from memory)', condition: 'hard-drawn wire, 20 degC' },
  { name: 'tin', title: 'Tin', resistivityOhmM: 1.15e-7, relativePermeability: 1, temperatureCoefficientPerK: 0.0042, source: handbook, condition: 'pure, 20 degC' },
  { name: 'nickel', title: 'Nickel', resistivityOhmM: 6.93e-8, relativePermeability: 1, temperatureCoefficientPerK: 0.006, source: handbook, condition: 'pure, 20 degC, magnetically saturated or above the relaxation of its domains; give a relative permeability of your own otherwise' },
  { name: 'brass', title: 'Brass, 70 % copper', resistivityOhmM: 6.2e-8, relativePermeability: 1, temperatureCoefficientPerK: 0.002, source: 'common practice (from memory)', condition: 'CuZn30, 20 degC; other alloys differ by tens of percent' },
  { name: 'steel', title: 'Steel, mild', resistivityOhmM: 1.6e-7, relativePermeability: 100, temperatureCoefficientPerK: 0.005, source: 'common practice (from memory)', condition: '20 degC, small fields; the permeability varies widely with grade and field' },
  { name: 'perfect', title: 'Perfect conductor', resistivityOhmM: 0, relativePermeability: 1, temperatureCoefficientPerK: 0, source: 'an idealization', condition: 'no resistance and no field inside' },
] as const satisfies readonly ConductorMaterial[];

const memory = 'common practice, manufacturers\u2019 typical values (from memory)';

export const dielectrics = [
  { name: 'vacuum', title: 'Vacuum', relativePermittivity: 1, lossTangent: 0, referenceFrequencyHz: null, source: 'definition', condition: 'any frequency' },
  { name: 'air', title: 'Air, dry', relativePermittivity: 1.000536, lossTangent: 0, referenceFrequencyHz: null, source: 'CRC Handbook of Chemistry and Physics, permittivity of gases (from memory)', condition: '20 degC, 101.325 kPa' },
  { name: 'ptfe', title: 'PTFE, solid', relativePermittivity: 2.1, lossTangent: 0.0002, referenceFrequencyHz: 1e9, source: memory, condition: '23 degC, 1 GHz' },
  { name: 'ptfe_expanded', title: 'PTFE, expanded', relativePermittivity: 1.4, lossTangent: 0.0001, referenceFrequencyHz: 1e9, source: memory, condition: '23 degC, 1 GHz; depends on density' },
  { name: 'polyethylene', title: 'Polyethylene, solid', relativePermittivity: 2.26, lossTangent: 0.0002, referenceFrequencyHz: 1e9, source: memory, condition: '23 degC, 1 GHz' },
  { name: 'polyethylene_foam', title: 'Polyethylene, foamed', relativePermittivity: 1.5, lossTangent: 0.0002, referenceFrequencyHz: 1e9, source: memory, condition: '23 degC, 1 GHz; depends on density' },
  { name: 'polypropylene', title: 'Polypropylene', relativePermittivity: 2.25, lossTangent: 0.0003, referenceFrequencyHz: 1e9, source: memory, condition: '23 degC, 1 GHz' },
  { name: 'fep', title: 'FEP', relativePermittivity: 2.1, lossTangent: 0.0007, referenceFrequencyHz: 1e9, source: memory, condition: '23 degC, 1 GHz' },
  { name: 'pvc', title: 'PVC, plasticized', relativePermittivity: 3.5, lossTangent: 0.04, referenceFrequencyHz: 1e6, source: memory, condition: '23 degC, 1 MHz; depends on plasticizer' },
  { name: 'fr4', title: 'FR-4 laminate', relativePermittivity: 4.3, lossTangent: 0.02, referenceFrequencyHz: 1e9, source: memory, condition: '23 degC, 1 GHz; depends on resin content' },
  { name: 'alumina', title: 'Alumina, 99.6 %', relativePermittivity: 9.8, lossTangent: 0.0001, referenceFrequencyHz: 10e9, source: memory, condition: '23 degC, 10 GHz' },
  { name: 'fused_quartz', title: 'Fused quartz', relativePermittivity: 3.78, lossTangent: 0.0001, referenceFrequencyHz: 10e9, source: memory, condition: '23 degC, 10 GHz' },
  { name: 'polyimide', title: 'Polyimide', relativePermittivity: 3.4, lossTangent: 0.004, referenceFrequencyHz: 1e9, source: memory, condition: '23 degC, 1 GHz, dry' },
] as const satisfies readonly DielectricMaterial[];
