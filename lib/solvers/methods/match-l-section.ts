/**
 * L sections: a series reactance and a shunt susceptance.
 *
 *   Zs* = j X + 1/(j B + 1/ZL)
 *   |ZL|^2 B^2 - 2 XL B + (Rs - RL)/Rs = 0,   X = -Xs + s sqrt(D Rs/RL),   D = RL (RL - Rs) + XL^2,   s = +1 or -1
 *
 * ZL = RL + j XL load, Zs = Rs + j Xs source, ohm; X ohm, B S. With Rs real this is Pozar's equation 5.3.
 */
import type { Method } from '../calculation';
import type { Element } from '../elements/element';
import type { ComplexParts } from '../numeric/phasor';
import { inDigits, inWords, isBuildable, withoutDust, type Match, type MatchAnswer, type MatchingProblem } from './matching';

export const lSectionMatching: Method = {
  id: 'l-section-matching',
  title: 'Matching with an L section',
  source: 'Pozar, Microwave Engineering, 4th ed., section 5.1, equations 5.1 to 5.6 (numbers from memory), carried over to a complex source',
  formulas: [
    String.raw`Z_s^{*} = jX + \frac{1}{jB + 1/Z_L}`,
    String.raw`B = \frac{X_L \pm \sqrt{R_L/R_s}\,\sqrt{R_L^2 + X_L^2 - R_s R_L}}{R_L^2 + X_L^2}, \qquad X = -X_s \pm \sqrt{R_s/R_L}\,\sqrt{R_L^2 + X_L^2 - R_s R_L}`,
  ],
  symbols: [
    { symbol: 'Z_L', meaning: 'load, R_L + j X_L', unit: 'ohm' },
    { symbol: 'Z_s', meaning: 'source, R_s + j X_s', unit: 'ohm' },
    { symbol: 'X', meaning: 'reactance in series', unit: 'ohm' },
    { symbol: 'B', meaning: 'susceptance across the path; with source and load exchanged it stands at the source', unit: 'S' },
  ],
  range: 'any load and source with a positive resistance; ideal parts',
  accuracy: 'exact; 1e-12 relative in float64',
};

/**
 * Source: Pozar 5.1 to 5.6. Range: Re > 0 of both. Accuracy: a few units of rounding of each reactance, or of the terms that cancel
 * in it. Throws nothing.
 * The traps: B by the formula above cancels where one sign nearly needs no part; its twin follows from their product,
 * (Rs - RL)/(Rs |ZL|^2). And a lossless match works both ways, so the section with its shunt at the source is the one with source and
 * load exchanged.
 */
export function matchByLSection({ load, source, frequencyHz }: MatchingProblem): MatchAnswer {
  const omega = 2 * Math.PI * frequencyHz;
  const seriesFirst = sections(load, source).map(({ X, B }) => [series(X, omega), shunt(B, omega)].flat());
  const shuntFirst = sections(source, load).map(({ X, B }) => [shunt(B, omega), series(X, omega)].flat());
  const reasons = [
    ...(seriesFirst.length > 0 ? [] : [noSection('across the load', 'load', 'source', load, source)]),
    ...(shuntFirst.length > 0 ? [] : [noSection('across the source', 'source', 'load', source, load)]),
  ];
  const matches = new Map<string, Match>();
  for (const elements of [...seriesFirst, ...shuntFirst]) {
    if (isBuildable(elements)) matches.set(JSON.stringify(elements), { description: describe(elements), elements });
    else reasons.push(`${describe(elements)}: a part is beyond 1000 H or 1000 F`);
  }
  return { matches: [...matches.values()], reasons };
}

/** B stands across `shunted`, X between it and `other`. None where the shunt cannot bring the resistance down to that of `other`. */
function sections(shunted: ComplexParts, other: ComplexParts): { X: number; B: number }[] {
  const { re: RL, im: XL } = shunted;
  const { re: Rs, im: Xs } = other;
  const D = withoutDust(RL * (RL - Rs) + XL * XL, RL * Math.abs(RL - Rs) + XL * XL);
  if (!(D >= 0)) return [];
  const size = RL * RL + XL * XL;
  const swing = Math.sqrt(RL / Rs) * Math.sqrt(D);
  const reactance = Math.sqrt(Rs / RL) * Math.sqrt(D);
  return (D === 0 ? [1] : [1, -1]).map((sign) => {
    const plain = sign * XL >= 0;
    const divisor = XL - sign * swing;
    const B = plain ? (XL + sign * swing) / size : divisor === 0 ? 0 : (Rs - RL) / Rs / divisor;
    return {
      X: withoutDust(-Xs + sign * reactance, Math.abs(Xs) + reactance),
      B: withoutDust(B, 1 / Math.sqrt(size)),
    };
  });
}

function series(X: number, omega: number): Element[] {
  if (X === 0) return [];
  return [{ kind: 'series', ...(X > 0 ? { inductance_h: X / omega } : { capacitance_f: -1 / (X * omega) }), connection: 'series' }];
}

function shunt(B: number, omega: number): Element[] {
  if (B === 0) return [];
  return [{ kind: 'shunt', ...(B > 0 ? { capacitance_f: B / omega } : { inductance_h: -1 / (B * omega) }), connection: 'series' }];
}

function describe(elements: readonly Element[]): string {
  if (elements.length === 0) return 'Nothing: the load is matched as it is';
  const words = elements.map((each) => {
    if (each.kind !== 'series' && each.kind !== 'shunt') return '';
    const part = each.inductance_h === undefined ? `capacitor of ${inWords(each.capacitance_f!, 'F')}` : `inductor of ${inWords(each.inductance_h, 'H')}`;
    return `${part} in ${each.kind}`;
  });
  const text = words.join(', then ');
  return text[0].toUpperCase() + text.slice(1);
}

function noSection(where: string, shuntedName: string, otherName: string, shunted: ComplexParts, other: ComplexParts): string {
  const most = shunted.re + (shunted.im / shunted.re) * shunted.im;
  return `with its shunt part ${where} an L section reaches at most ${inDigits(most)} ohm, |Z|^2/R of the ${shuntedName}, and the ${otherName} has ${Number(other.re.toPrecision(6))} ohm`;
}
