/** Stripline: a strip between two planes, filled by one dielectric. Its capacitance is all there is to know, and it is computed exactly. */
import type { Method } from '../calculation';
import { speedOfLightMPerS, vacuumPermeabilityHPerM } from '../constants';
import { ImpossibleInput } from '../errors';
import { flatStripCapacitance } from '../numeric/flat-strip-between-planes';
import { thickStripCapacitance, type Prevertices, type StripBetweenPlanes, type StripCapacitance } from '../numeric/thick-strip-between-planes';

export const flatStripline: Method = {
  id: 'stripline-flat',
  title: 'Stripline with a strip without thickness',
  source: 'In the middle: Cohn, Characteristic impedance of the shielded-strip transmission line, IRE Trans. MTT-2 (1954) 52-57 (from memory). Off the middle: conformal map of the cross-section to a ring, derived here',
  formulas: [
    String.raw`Z_0 = \frac{\eta_0}{\sqrt{\varepsilon_r}\,c_0}, \qquad c_0 = 4\,\frac{K(k')}{K(k)}, \qquad k = \operatorname{sech}\frac{\pi w}{2b} \quad \text{in the middle}`,
    String.raw`c_0 = \frac{2\pi}{\ln(1/\rho)}, \qquad \frac{w}{2b} = \max_\theta\ \frac{4}{\pi}\sum_{n=1}^{\infty}\frac{\sin n\alpha\,\sin n\theta}{n}\,\frac{\rho^n}{1 - \rho^{2n}}, \qquad \alpha = \frac{\pi g}{b} \quad \text{anywhere}`,
  ],
  symbols: [
    { symbol: 'c_0', meaning: 'capacitance over permittivity' },
    { symbol: 'K', meaning: 'complete elliptic integral of the first kind' },
    { symbol: String.raw`w, b, g`, meaning: 'width, distance of the planes, distance of the strip from one of them', unit: 'm' },
    { symbol: String.raw`\eta_0`, meaning: 'impedance of free space', unit: 'ohm' },
    { symbol: String.raw`\rho`, meaning: 'inner over outer radius of the ring' },
  ],
  range: 'any width and position, below the first higher mode',
  accuracy: 'exact; 1e-12 relative in float64',
};

export const thickStripline: Method = {
  id: 'stripline-thick',
  title: 'Stripline with a strip of rectangular cross-section',
  source: 'Schwarz-Christoffel map of the cross-section, solved numerically; in the middle it is that of Bates, The characteristic impedance of the shielded slab line, IRE Trans. MTT-4 (1956) 28-33 (from memory)',
  formulas: [
    String.raw`\frac{dz}{du} = \frac{b}{\pi}\,\sqrt{\frac{(u - c_1)(u - c_2)}{(u - p_1)(u - p_2)(u - p_3)(u - p_4)}}`,
    String.raw`\frac{w}{2} = \int_{p_2}^{c_1}\left|\frac{dz}{du}\right|du = \int_{c_2}^{p_3}\left|\frac{dz}{du}\right|du, \qquad t = \int_{c_1}^{c_2}\left|\frac{dz}{du}\right|du, \qquad g = \int_{p_1}^{p_2}\left|\frac{dz}{du}\right|du`,
    String.raw`Z_0 = \frac{\eta_0}{\sqrt{\varepsilon_r}\,c_0}, \qquad c_0 = 2\,\frac{K(k)}{K(k')}, \qquad k^2 = \frac{(p_3 - p_2)(p_4 - p_1)}{(p_3 - p_1)(p_4 - p_2)}`,
  ],
  symbols: [
    { symbol: 'p_1, p_4', meaning: 'where the wall of symmetry meets the planes' },
    { symbol: 'p_2, p_3', meaning: 'where it meets the strip' },
    { symbol: 'c_1, c_2', meaning: 'corners of the strip' },
    { symbol: String.raw`w, t, b, g`, meaning: 'width, thickness, distance of the planes, distance from strip to one of them', unit: 'm' },
    { symbol: 'c_0', meaning: 'capacitance over permittivity' },
    { symbol: String.raw`\eta_0`, meaning: 'impedance of free space', unit: 'ohm' },
  ],
  range: 'any rectangle between the planes, a billionth of their distance or more from each, below the first higher mode',
  accuracy: 'exact; 1e-12 relative in float64',
};

const freeSpaceImpedance = vacuumPermeabilityHPerM * speedOfLightMPerS;

/** Throws `ImpossibleInput` where there is no solution, which no dimensions in the range are known to bring about. */
function thickCapacitance(strip: StripBetweenPlanes, from?: Prevertices): StripCapacitance {
  const found = thickStripCapacitance(strip, from);
  if (!found) throw new ImpossibleInput([{ pointer: '', code: 'no_solution', detail: 'the dimensions of the stripline are too far apart in size for its field to be solved' }]);
  return found;
}

/** eta0/c0 in ohm: the impedance in vacuum. Source: the two methods above. Range and accuracy: theirs. Throws as `thickCapacitance` does. */
export function striplineImpedance(strip: StripBetweenPlanes): number {
  return freeSpaceImpedance / (strip.thickness === 0 ? flatStripCapacitance(strip.width, strip.gapBelow, strip.gapAbove) : thickCapacitance(strip).capacitance);
}

/** Of the least dimension: what is left of the series after the sixth order is 1e-12. */
const recessionStep = 0.01;

/**
 * dL/dn in H/m per m, as every surface recedes by n: width w - 2n, thickness t - 2n, gaps g + 2n. Source: Wheeler 1942 for its use; central
 * difference of sixth order of mu0/c0. Range: thickness above 0. Accuracy: 1e-9. Throws as `thickCapacitance` does.
 */
export function striplineRecession(strip: StripBetweenPlanes): number {
  const { width, thickness, gapBelow, gapAbove } = strip;
  const { prevertices } = thickCapacitance(strip);
  const step = 0.5 * recessionStep * Math.min(width, thickness, gapBelow, gapAbove);
  const inductance = (n: number) =>
    vacuumPermeabilityHPerM / thickCapacitance({ width: width - 2 * n, thickness: thickness - 2 * n, gapBelow: gapBelow + 2 * n, gapAbove: gapAbove + 2 * n }, prevertices).capacitance;
  const difference = (order: number) => inductance(order * step) - inductance(-order * step);
  return (45 * difference(1) - 9 * difference(2) + difference(3)) / (60 * step);
}

/** Hz. The first higher mode turns once round the strip: 2w + pi b/2 is its wavelength. Source: Howe, Stripline Circuit Design, 1974 (from memory), for a thin strip in the middle. */
export function striplineSingleModeLimitHz(width: number, spacing: number, er: number): number {
  return speedOfLightMPerS / (Math.sqrt(er) * (2 * width + 0.5 * Math.PI * spacing));
}
