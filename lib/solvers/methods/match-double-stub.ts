/**
 * Two stubs across the path, one at the load and one a fixed spacing nearer the source.
 *
 *   y' = (y + j t)/(1 + j y t),   y = gL + j x,   Re y' = g   <=>   (cos - x sin)^2 = gL (1/g - gL sin^2)
 *
 * y over the admittance of the line, gL of the load, g of the source, x with the load's stub, sin and cos of beta times the spacing.
 */
import type { Method } from '../calculation';
import { passedOn, slopeAlong, stub, stubLength, turned, withinHalfWave } from './immittance-along-line';
import { endOf, followLoss, isLossless, isSame, lineElement, noLengths, stageOf, stubElement, stubKinds, type FoundLengths, type Stage, type StubKind } from './match-stubs-of-line';
import { inDigits, inWavelengths, withoutDust, type DesignLine, type Match, type MatchAnswer, type MatchingProblem } from './matching';

export const doubleStubMatching: Method = {
  id: 'double-stub-matching',
  title: 'Matching with two stubs',
  source: 'Pozar, Microwave Engineering, 4th ed., section 5.3, equations 5.17 to 5.22 (numbers from memory), carried over to any source and to lines with loss',
  formulas: [
    String.raw`\left(\cos\beta s - x \sin\beta s\right)^2 = g_L \left(\frac{1}{g} - g_L \sin^2\beta s\right)`,
    String.raw`g_L \le \frac{1}{g \sin^2\beta s}`,
  ],
  symbols: [
    { symbol: 'g_L', meaning: 'conductance of the load over the admittance of the line' },
    { symbol: 'g', meaning: 'conductance of the source over the admittance of the line' },
    { symbol: 'x', meaning: 'susceptance of load and its stub over the admittance of the line' },
    { symbol: 's', meaning: 'spacing of the stubs', unit: 'm' },
    { symbol: String.raw`\beta`, meaning: 'phase constant', unit: 'rad/m' },
  ],
  range: 'loads outside the forbidden region, spacings that are no multiple of half a wave; a line with loss where lengths exist that follow from those without loss',
  accuracy: 'exact; lengths to 1e-12 of half a wave in float64, times the quality factor of the match',
};

/** |sin| below which a spacing counts as a multiple of half a wave: the two stubs then stand in one place. */
const halfWave = 1e-9;

/**
 * Source: Pozar 5.17 to 5.22. Range: as the method's. Accuracy: reflection to rounding times the quality factor. Throws nothing.
 * The trap: near half a wave of spacing the region of loads is wide and the match so sharp that nobody could build it.
 */
export function matchByDoubleStub(problem: MatchingProblem, line: DesignLine, spacingM: number | undefined): MatchAnswer {
  const spacing = spacingM === undefined ? Math.PI / 4 : spacingM * line.phaseRadPerM;
  const [sine, cosine] = [Math.sin(spacing), Math.cos(spacing)];
  if (Math.abs(sine) < halfWave) return { matches: [], reasons: [`stub_spacing_m is a multiple of half a wavelength (${Number((Math.PI / line.phaseRadPerM).toPrecision(6))} m), so both stubs act in one place and reach the susceptance alone`] };
  const bare = stageOf(problem, line, 'admittance', 0);
  const gL = bare.load.re;
  const g = bare.wanted.re;
  const rest = withoutDust(1 / g - gL * sine * sine, 1 / g + gL * sine * sine);
  if (rest < 0 && isLossless(line)) return { matches: [], reasons: [forbidden(line, bare, sine)] };
  const root = Math.sqrt(Math.max(0, gL * rest));
  const susceptances = (root === 0 ? [0] : [root, -root]).map((each) => (cosine + each) / sine);
  const matches: Match[] = [];
  const reasons = new Set<string>();
  const found: FoundLengths[] = [];
  for (const x of susceptances) {
    for (const [atSource, atLoad] of pairs) {
      const start = startOf(bare, spacing, x, atSource, atLoad);
      const lengths = followLoss(problem, line, 'admittance', equationFor(spacing, atSource, atLoad), start);
      if (!lengths) reasons.add(rest < 0 ? forbidden(line, bare, sine) : noLengths(line, `${named(atSource)} at the source, ${named(atLoad)} at the load`));
      else if (!found.some((other) => isSame(other, { stubs: `${atSource} ${atLoad}`, lengths }))) {
        found.push({ stubs: `${atSource} ${atLoad}`, lengths });
        const elements = [...stubElement('admittance', atSource, line, lengths[0]), ...lineElement(line, spacing), ...stubElement('admittance', atLoad, line, lengths[1])];
        matches.push({ description: describe(atSource, atLoad, lengths, spacing), elements });
      }
    }
  }
  return { matches, reasons: [...reasons] };
}

const pairs = stubKinds.flatMap((atSource) => stubKinds.map((atLoad) => [atSource, atLoad] as const));

function startOf({ k, load, wanted }: Stage, spacing: number, x: number, atSource: StubKind, atLoad: StubKind): [number, number] {
  const withStub = load.add({ re: 0, im: x - load.im });
  const missing = wanted.sub(turned(withStub, spacing, k)).im;
  return [withinHalfWave(stubLength(endOf('admittance', atSource), missing)), withinHalfWave(stubLength(endOf('admittance', atLoad), x - load.im))];
}

const equationFor = (spacing: number, atSource: StubKind, atLoad: StubKind) => ({ k, load, wanted }: Stage) => (first: number, second: number) => {
  const ofFirst = stub(endOf('admittance', atSource), first, k);
  const ofSecond = stub(endOf('admittance', atLoad), second, k);
  const y = load.add(ofSecond);
  return { value: turned(y, spacing, k).add(ofFirst).sub(wanted), first: slopeAlong(ofFirst, k), second: passedOn(y, spacing, k).mul(slopeAlong(ofSecond, k)) };
};

const named = (kind: StubKind) => (kind === 'open' ? 'open stub' : 'shorted stub');

function describe(atSource: StubKind, atLoad: StubKind, [first, second]: readonly [number, number], spacing: number): string {
  const words = (kind: StubKind, length: number) => (kind === 'open' && length === 0 ? 'no stub' : `${named(kind)} of ${inWavelengths(length)}`);
  const text = `${words(atSource, first)}, ${inWavelengths(spacing)} of line, ${words(atLoad, second)} at the load`;
  return text[0].toUpperCase() + text.slice(1);
}

function forbidden(line: DesignLine, { load, wanted }: Stage, sine: number): string {
  const Y0 = 1 / Math.hypot(line.characteristicImpedance.re, line.characteristicImpedance.im);
  const text = inDigits;
  return `the conductance of the load, ${text(load.re * Y0)} S, is greater than Y0^2/(G sin^2(beta s)) = ${text(Y0 / (wanted.re * sine * sine))} S, which no two stubs at this spacing can match (G of the source, s the spacing)`;
}
