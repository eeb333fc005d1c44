/**
 * The constants of a line whose field between the conductors is the same at every frequency: an outer inductance and a capacitance from its geometry,
 * the series parts of its conductors, and a dielectric that fills all or a share of the field.
 */
import type { MethodUse, Warning } from '../calculation';
import type { SeriesPart } from '../methods/internal-impedance';
import type { Permittivity } from '../methods/permittivity';
import type { LineModel } from './line-constants';
import { higherModeWarnings } from './line-warnings';

export interface UniformField {
  readonly omega: Float64Array;
  /** H/m, of the field outside the conductors. */
  readonly externalInductance: number;
  /** F/m, with vacuum in place of the dielectric. */
  readonly vacuumCapacitance: number;
  readonly permittivity: Permittivity;
  /** Share of the field that the dielectric fills; 1 when left out. */
  readonly filling?: number;
  readonly parts: readonly SeriesPart[];
  readonly skinDepth: Float64Array;
  readonly singleModeLimitHz: number;
  readonly methods: readonly MethodUse[];
  readonly warnings?: readonly Warning[];
}

/** eps_eff = 1 + q (eps - 1); C = eps_eff' C0, G = omega eps_eff'' C0. Range: any. Accuracy: exact. Throws nothing. */
export function uniformField({ omega, externalInductance, vacuumCapacitance: C0, permittivity, filling: q = 1, parts, skinDepth, singleModeLimitHz, methods, warnings = [] }: UniformField): LineModel {
  const sum = (name: keyof SeriesPart, first: number) => omega.map((_, index) => parts.reduce((total, each) => total + each[name][index], first));
  const effective = q === 1 ? permittivity.real : permittivity.real.map((each) => 1 + q * (each - 1));
  const { slope } = permittivity;
  const zeros = new Float64Array(omega.length);
  return {
    constants: {
      resistance: sum('resistance', 0),
      inductance: sum('inductance', externalInductance),
      conductance: permittivity.loss.map((each, index) => omega[index] * q * each * C0),
      capacitance: effective.map((each) => each * C0),
      slope: {
        resistance: sum('resistanceSlope', 0),
        inductance: sum('inductanceSlope', 0),
        conductance: permittivity.loss.map((each, index) => q * C0 * (each + (slope ? omega[index] * slope.loss[index] : 0))),
        capacitance: slope ? slope.real.map((each) => q * C0 * each) : zeros,
      },
    },
    methods: [...methods, ...permittivity.methods],
    warnings: [...warnings, ...permittivity.warnings, ...higherModeWarnings(omega, singleModeLimitHz)],
    geometry: { externalInductance: new Float64Array(omega.length).fill(externalInductance), effectivePermittivity: effective, skinDepth, singleModeLimitHz },
  };
}
