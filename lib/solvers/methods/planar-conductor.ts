/**
 * Series resistance and internal inductance of the flat conductors of a planar line: Wheeler's incremental inductance where the current has gone
 * to the surface, joined to the resistance at direct current.
 */
import type { Method, MethodUse, Warning } from '../calculation';
import { vacuumPermeabilityHPerM } from '../constants';
import type { ConductorProperties } from '../nouns/conductor';
import type { SeriesPart } from './internal-impedance';

export const incrementalInductance: Method = {
  id: 'incremental-inductance',
  title: 'Resistance of planar conductors by incremental inductance',
  source: 'Wheeler, Formulas for the skin effect, Proc. IRE 30 (1942) 412-424 (from memory); the join to the resistance at direct current is this house’s own',
  formulas: [
    String.raw`R_s = \sqrt{\tfrac{1}{2}\omega\mu\rho}, \qquad R_h = \frac{R_s}{\mu_0}\,\frac{\partial L_0}{\partial n}`,
    String.raw`R_d = \frac{\rho}{w t}, \qquad R + j\omega L_i = \sqrt{R_d^2 + 2j R_h^2}`,
  ],
  symbols: [
    { symbol: 'L_0', meaning: 'inductance of the field outside perfect conductors', unit: 'H/m' },
    { symbol: 'n', meaning: 'depth by which every surface of every conductor recedes', unit: 'm' },
    { symbol: 'R_s', meaning: 'surface resistance', unit: 'ohm' },
    { symbol: 'R_h', meaning: 'resistance, and internal reactance, where the skin is thin', unit: 'ohm/m' },
    { symbol: 'R_d', meaning: 'resistance of the strip at direct current; that of the planes is taken as none', unit: 'ohm/m' },
    { symbol: 'L_i', meaning: 'inductance inside the conductors', unit: 'H/m' },
  ],
  range: 'conductors thicker than 3 skin depths; below, the join leads over to the resistance at direct current',
  accuracy: 'measured here against the rule on a field solution of microstrip: 1.2 % for widths from 0.3 heights, 4 % at 0.1 heights; the join measured on a round wire, where the answer is known: 7 % of the resistance, 10 % of the inductance inside',
};

export const hammerstadRoughness: Method = {
  id: 'hammerstad-roughness',
  title: 'Resistance of a rough conductor',
  source: 'Hammerstad and Jensen, Accurate models for microstrip computer-aided design, IEEE MTT-S Digest 1980, 407-409 (from memory), after measurements by Morgan, 1949',
  formulas: [String.raw`\frac{R_{\text{rough}}}{R} = 1 + \frac{2}{\pi}\arctan\left(1.4\,\frac{\Delta^2}{\delta^2}\right)`],
  symbols: [
    { symbol: String.raw`\Delta`, meaning: 'roughness, root mean square', unit: 'm' },
    { symbol: String.raw`\delta`, meaning: 'skin depth', unit: 'm' },
  ],
  range: 'roughness up to about a skin depth; at most twice the smooth resistance, which rougher foils exceed',
  accuracy: 'a fit to measurements, some 10 % of the added resistance; the inductance that roughness adds is left out',
};

/** The conductors of a planar line, strip and planes of one material. */
export interface PlanarConductor {
  readonly material: ConductorProperties;
  /** m, of the strip; 0: the loss is left out, with a warning. */
  readonly thicknessM: number;
  /** ohm/m; rho / (w t). Not looked at where the thickness is 0. */
  readonly directResistance: number;
  /** dL0/dn in H/m per m: what L0 grows by as every surface of every conductor recedes. Not looked at where the thickness is 0. */
  readonly recession: number;
  /** m, root mean square. */
  readonly roughnessM: number;
}

export interface PlanarConductorLoss extends SeriesPart {
  readonly methods: readonly MethodUse[];
  readonly warnings: readonly Warning[];
}

/** Fewer skin depths than this, and the current is not a skin on each side. */
const leastSkinDepths = 3;

/**
 * Z = sqrt(Rd^2 + 2j Rh^2) with Rh = sqrt(omega) k. Sources, symbols, range and accuracy: as the two methods above. Throws nothing.
 * The trap: Im Z / omega cancels at low frequency; with Z = R + jX and 2 R X = 2 Rh^2 it is k^2/R.
 */
export function planarConductorLoss(conductor: PlanarConductor, omega: Float64Array): PlanarConductorLoss {
  const { material, thicknessM, directResistance: Rd, recession, roughnessM } = conductor;
  const { resistivityOhmM: rho, relativePermeability } = material;
  const column = () => new Float64Array(omega.length);
  const columns = { resistance: column(), inductance: column(), resistanceSlope: column(), inductanceSlope: column() };
  if (rho === 0) return { ...columns, methods: [], warnings: [] };
  if (thicknessM === 0) return { ...columns, methods: [], warnings: [leftOut] };
  const mu = vacuumPermeabilityHPerM * relativePermeability;
  const k = (Math.sqrt(0.5 * mu * rho) / vacuumPermeabilityHPerM) * Math.abs(recession);
  // delta^2 = 2 rho/(omega mu), so that roughness turns the factor by roughness * omega.
  const roughness = (1.4 * roughnessM * roughnessM * mu) / (2 * rho);
  for (let index = 0; index < omega.length; index++) {
    const w = omega[index];
    const Rh = Math.sqrt(w) * k;
    const size = Math.hypot(Rd * Rd, 2 * Rh * Rh);
    const R = Math.sqrt(0.5 * (size + Rd * Rd));
    const X = (Rh * Rh) / R;
    const dR = (k * k * X) / size;
    const factor = 1 + (2 / Math.PI) * Math.atan(roughness * w);
    const factorSlope = ((2 / Math.PI) * roughness) / (1 + roughness * w * (roughness * w));
    columns.resistance[index] = factor * R;
    columns.inductance[index] = (k * k) / R;
    columns.resistanceSlope[index] = factor * dR + factorSlope * R;
    columns.inductanceSlope[index] = -((k * k) / R) * (dR / R);
  }
  const highest = omega.reduce((most, each) => Math.max(most, each), 0);
  const lowest = omega.reduce((least, each) => Math.min(least, each), Infinity);
  const skinDepths = (lengthM: number, w: number) => lengthM * Math.sqrt(0.5 * w * (mu / rho));
  const thickness = skinDepths(thicknessM, lowest);
  const isThin = thickness < leastSkinDepths;
  return {
    ...columns,
    methods: [
      { method: incrementalInductance, inRange: !isThin },
      ...(roughnessM > 0 ? [{ method: hammerstadRoughness, inRange: skinDepths(roughnessM, highest) <= 1 }] : []),
    ],
    warnings: isThin
      ? [{ code: 'thin_conductor', pointer: '/thickness_m', detail: `thickness_m should be at least ${leastSkinDepths} skin depths for the current to be a skin; at the lowest frequency it is ${Number(thickness.toPrecision(3))}, and the resistance leads over to that at direct current` }]
      : [],
  };
}

const leftOut: Warning = { code: 'conductor_loss_left_out', pointer: '/thickness_m', detail: 'a strip without thickness has no resistance that could be computed; conductor loss is left out, so give thickness_m, or conductor "perfect" where none is meant' };
