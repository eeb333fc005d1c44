/**
 * Capacitance of a strip between two planes, from its charge: C/eps, which all else follows from: Zc = eta0/(sqrt(er) C/eps).
 *
 *   centred, without thickness      exact, by elliptic integrals
 *   off centre, without thickness   charge in Chebyshev polynomials over the root that its edges have
 *   with thickness                  charge on panels, finer towards the corners
 *
 * A line charge at (x', y') between planes at y = 0 and y = b has the potential
 *   (1/4 pi eps) ln((cosh X - cos Y+)/(cosh X - cos Y-)),  X = pi (x - x')/b, Y+- = pi (y +- y')/b.
 */
import type { Method } from '../calculation';
import { speedOfLightMPerS, vacuumPermeabilityHPerM } from '../constants';
import { ratioOfIntegrals } from '../numeric/elliptic';
import { solveReal } from '../numeric/real-matrix';

export const centredStripline: Method = {
  id: 'centred-stripline',
  title: 'Centred stripline without thickness',
  source: 'Cohn, Characteristic impedance of the shielded-strip transmission line, IRE Trans. MTT-2 (1954) 52-57 (from memory)',
  formulas: [String.raw`Z_c = \frac{\eta_0}{4\sqrt{\varepsilon_r}}\,\frac{K(k)}{K(k')}, \qquad k = \operatorname{sech}\frac{\pi w}{2b}, \qquad k' = \tanh\frac{\pi w}{2b}`],
  symbols: [
    { symbol: 'w', meaning: 'width of the strip', unit: 'm' },
    { symbol: 'b', meaning: 'distance between the planes', unit: 'm' },
    { symbol: 'K', meaning: 'complete elliptic integral of the first kind' },
    { symbol: String.raw`\eta_0`, meaning: 'wave impedance of vacuum', unit: 'ohm' },
  ],
  range: 'any width; a strip without thickness half way between the planes',
  accuracy: 'exact; 1e-12 relative in float64',
};

export const striplineField: Method = {
  id: 'stripline-field',
  title: 'Stripline by its charge',
  source: 'Boundary integral equation with the potential of a line charge between two planes (conformal map of the strip between them, any field text); Harrington, Field Computation by Moment Methods, 1968, chapter 2 (from memory)',
  formulas: [
    String.raw`\frac{1}{4\pi\varepsilon}\oint \sigma(s')\,\ln\frac{\cosh X - \cos Y_+}{\cosh X - \cos Y_-}\,ds' = 1, \qquad C = \oint\sigma\,ds`,
    String.raw`X = \frac{\pi(x - x')}{b}, \qquad Y_\pm = \frac{\pi(y \pm y')}{b}, \qquad Z_c = \frac{\eta_0\,\varepsilon}{\sqrt{\varepsilon_r}\,C}`,
  ],
  symbols: [
    { symbol: String.raw`\sigma`, meaning: 'charge on the strip at one volt', unit: 'C/m2' },
    { symbol: 'x, y', meaning: 'place on the strip, y from the lower plane', unit: 'm' },
    { symbol: 'b', meaning: 'distance between the planes', unit: 'm' },
    { symbol: 'C', meaning: 'capacitance', unit: 'F/m' },
  ],
  range: 'any width, thickness and offset; a rectangular strip',
  accuracy: 'without thickness 1e-9 at any offset; with thickness 0.1 % (measured here against the exact case and against twice and four times the panels)',
};

export interface StripShape {
  /** Width, thickness and distance from the lower plane to the middle of the strip, in units of the distance between the planes. */
  readonly width: number;
  readonly thickness: number;
  readonly middle: number;
}

/** Wider than this, the two edges do not feel each other: exp(-pi w/b). The rest is a plate between two plates. */
const widestSolved = 6;

/**
 * C/eps of a strip. Source, symbols and accuracy: above. Range: the strip between the planes. Throws nothing. The trap: a very wide strip, whose middle
 * has nothing to be solved for: what is beyond `widestSolved` adds 1/y + 1/(1 - y) of its width.
 */
export function stripCapacitance({ width, thickness, middle }: StripShape): number {
  if (thickness === 0 && middle === 0.5) return 4 / centredRatio(width);
  const solved = Math.min(width, widestSolved);
  const [below, above] = [middle - 0.5 * thickness, 1 - middle - 0.5 * thickness];
  const beyond = (width - solved) * (1 / below + 1 / above);
  return beyond + (thickness === 0 ? thinCapacitance(solved, middle) : thickCapacitance(solved, thickness, middle));
}

export function striplineImpedance(shape: StripShape, relativePermittivity: number): number {
  return (vacuumPermeabilityHPerM * speedOfLightMPerS) / (Math.sqrt(relativePermittivity) * stripCapacitance(shape));
}

/** Beyond this pi w/2b, k^2 is below rounding and K(k) = pi/2, K(k') = ln(4/k), ln(2/k) = pi w/2b. */
const wideFrom = 20;

/** K(k)/K(k') with k = sech x, k' = tanh x. */
function centredRatio(width: number): number {
  const x = 0.5 * Math.PI * width;
  return x > wideFrom ? (0.5 * Math.PI) / (x + Math.LN2) : ratioOfIntegrals(1 / Math.cosh(x), Math.tanh(x));
}

/**
 * sigma = sum a(n) T(2n)(u)/sqrt(1 - u^2) over u = 2x/w. The logarithm of |u - u'| has T(n) as its own functions, with pi/n, and pi ln 2 for n = 0; the
 * rest of the kernel is smooth and is summed over Chebyshev's points.
 */
function thinCapacitance(width: number, middle: number): number {
  const N = 16 + Math.ceil(6 * width);
  const points = Array.from({ length: 2 * N }, (_, index) => Math.cos(((2 * index + 1) * Math.PI) / (4 * N)));
  const angle = 2 * Math.PI * middle;
  const smooth = (difference: number) => {
    const half = 0.25 * Math.PI * width * difference;
    const sinh = Math.sinh(half);
    // (cosh X - 1)/d^2 = 2 (sinh(X/2)/d)^2.
    const perDifference = Math.abs(difference) < 1e-9 ? 0.25 * Math.PI * width : sinh / difference;
    return Math.log((2 * sinh * sinh + 1 - Math.cos(angle)) / (2 * perDifference * perDifference));
  };
  const matrix = new Float64Array(N * N);
  for (let row = 0; row < N; row++) {
    const kernel = points.map((point) => (Math.PI / (2 * N)) * smooth(points[row] - point));
    for (let n = 0; n < N; n++) {
      let entry = 2 * (n === 0 ? Math.PI * Math.LN2 : (Math.PI / (2 * n)) * chebyshev(2 * n, points[row]));
      for (let column = 0; column < 2 * N; column++) entry += kernel[column] * chebyshev(2 * n, points[column]);
      matrix[row * N + n] = entry;
    }
  }
  // (w/8 pi) A a = 1, and the charge is (w/2) pi a(0).
  const side = new Float64Array(N).fill((8 * Math.PI) / width);
  return 0.5 * width * Math.PI * solveReal(matrix, side)[0];
}

function chebyshev(n: number, u: number): number {
  return Math.cos(n * Math.acos(u));
}

interface Panel {
  readonly x: number;
  readonly y: number;
  /** Half its length, along x or along y. */
  readonly half: number;
  readonly isFlat: boolean;
}

const panelsASide = 16;

/** Charge the same all over a panel, potential right at its middle; only the half x > 0 is solved for. */
function thickCapacitance(width: number, thickness: number, middle: number): number {
  const panels = panelsOf(width, thickness, middle);
  const N = panels.length;
  const matrix = new Float64Array(N * N);
  for (let row = 0; row < N; row++) {
    for (let column = 0; column < N; column++) matrix[row * N + column] = potential(panels[row], panels[column]) + potential(panels[row], { ...panels[column], x: -panels[column].x });
  }
  const charge = solveReal(matrix, new Float64Array(N).fill(4 * Math.PI));
  return 2 * panels.reduce((sum, { half }, index) => sum + 2 * half * charge[index], 0);
}

/** Towards a corner, where the charge grows as the distance to the power -1/3, panels shrink with its cube. */
function panelsOf(width: number, thickness: number, middle: number): Panel[] {
  const N = panelsASide;
  const panels: Panel[] = [];
  const flat = (i: number) => 0.5 * width * (1 - (1 - i / N) ** 3);
  const upright = (i: number) => thickness * (2 * i <= N ? 4 * (i / N) ** 3 : 1 - 4 * (1 - i / N) ** 3);
  for (let i = 0; i < N; i++) {
    const x = 0.5 * (flat(i) + flat(i + 1));
    const half = 0.5 * (flat(i + 1) - flat(i));
    panels.push({ x, y: middle + 0.5 * thickness, half, isFlat: true }, { x, y: middle - 0.5 * thickness, half, isFlat: true });
    panels.push({ x: 0.5 * width, y: middle - 0.5 * thickness + 0.5 * (upright(i) + upright(i + 1)), half: 0.5 * (upright(i + 1) - upright(i)), isFlat: false });
  }
  return panels;
}

/** Gauss and Legendre's points on -1 to 1 (Abramowitz and Stegun, table 25.4). */
const gauss = [
  [-0.8611363115940526, 0.34785484513745385],
  [-0.33998104358485626, 0.6521451548625461],
  [0.33998104358485626, 0.6521451548625461],
  [0.8611363115940526, 0.34785484513745385],
] as const;

/** 4 pi eps times the potential of a panel of unit charge density at the middle of another: the nearest logarithms in closed form, the rest by Gauss. */
function potential(at: Panel, from: Panel): number {
  // Own charge, and its images in the lower and in the upper plane.
  const near = -2 * logarithms(at, from) + 2 * logarithms(at, { ...from, y: -from.y }) + 2 * logarithms(at, { ...from, y: 2 - from.y });
  let rest = 0;
  for (const [place, weight] of gauss) {
    const x = at.x - (from.isFlat ? from.x + place * from.half : from.x);
    const y = from.isFlat ? from.y : from.y + place * from.half;
    rest += weight * (kernelRest(x, at.y - y, 0) - kernelRest(x, at.y + y, 1));
  }
  return near + rest * from.half;
}

/** ln r^2 - ln(cosh X - cos Y), and of an image also what its twin on the other side has been given, so that both are smooth. */
function kernelRest(x: number, y: number, isImage: 0 | 1): number {
  const sinh = Math.sinh(0.5 * Math.PI * x);
  const sin = Math.sin(0.5 * Math.PI * y);
  const kernel = 2 * (sinh * sinh + sin * sin);
  if (isImage) return Math.log((x * x + y * y) * (x * x + (2 - y) * (2 - y))) - Math.log(kernel);
  const square = x * x + y * y;
  return square < 1e-24 ? -Math.log(0.5 * Math.PI * Math.PI) : Math.log(square / kernel);
}

/** Integral of ln r along a panel, from a point. */
function logarithms(at: Panel, from: Panel): number {
  const along = from.isFlat ? at.x - from.x : at.y - from.y;
  const across = Math.abs(from.isFlat ? at.y - from.y : at.x - from.x);
  return primitive(along + from.half, across) - primitive(along - from.half, across);
}

/** Integral of ln sqrt(t^2 + a^2). */
function primitive(t: number, a: number): number {
  if (t === 0) return 0;
  const angle = a === 0 ? 0 : a * Math.atan(t / a);
  return 0.5 * t * Math.log(t * t + a * a) - t + angle;
}
