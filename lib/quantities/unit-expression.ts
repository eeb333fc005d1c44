/** Units composed of symbols: "ohm/m", "dB/100 m", "ohm·m", "1/K". */
import { quoted, readDecimal } from './decimal';
import { rationalOf } from './rational';
import { refuse } from './refusal';
import { plain, product, symbolsLike, symbolUnit, type Dimensions, type Unit } from './units';

/** A list of 20,000 frequencies names the same two units 20,000 times. */
const recent = new Map<string, Unit>();
const mostRecent = 100;

export function readUnit(text: string, wanted: Dimensions = {}): Unit {
  const known = recent.get(text);
  if (known) return known;
  const unit = composed(text, wanted);
  if (recent.size >= mostRecent) recent.clear();
  recent.set(text, unit);
  return unit;
}

/** A slash divides by the factor after it only; "dB per 100 m" reads like "dB/100 m". */
function composed(text: string, wanted: Dimensions): Unit {
  const written = text.trim().replace(/\s+per\s+/g, '/');
  if (written === '') return plain;
  const factors = written.split('/');
  return factors.reduce((unit, factor, index) => product(unit, readFactors(factor, written, wanted), index === 0 ? 1 : -1), plain);
}

/** Symbols and numbers side by side, or joined by a dot or a star: "100 m", "ohm m", "ohm·m". */
function readFactors(text: string, whole: string, wanted: Dimensions): Unit {
  const words = text.split(/[\s·*]+/).filter((word) => word !== '');
  if (words.length === 0) refuse(`the unit ${quoted(whole)} lacks a part at its slash`);
  return words.map((word) => readWord(word, whole, wanted)).reduce((left, right) => product(left, right, 1));
}

function readWord(word: string, whole: string, wanted: Dimensions): Unit {
  const [, number, symbol] = /^(\d[\d.]*(?:e[+-]?\d+)?)?(.*)$/i.exec(word)!;
  const size = number === undefined ? plain : { ...plain, factor: rationalOf(readDecimal(number)) };
  if (size.factor.numerator === 0n) refuse(`the unit ${quoted(whole)} divides by zero`);
  return symbol === '' ? size : product(size, readSymbol(symbol, wanted), 1);
}

function readSymbol(symbol: string, wanted: Dimensions): Unit {
  const [, name, exponent] = /^(.*?)(?:\^?(2|3)|(²|³))?$/.exec(symbol)!;
  const unit = symbolUnit(symbol) ?? symbolUnit(name);
  if (!unit) {
    const meant = symbolsLike(symbol, wanted);
    refuse(`${quoted(symbol)} is not a unit known here${meant.length > 0 ? `; write ${meant.join(' or ')}` : ''}`);
  }
  const power = symbolUnit(symbol) ? 1 : Number(exponent ?? { '²': 2, '³': 3 }[symbol.at(-1)!] ?? 1);
  return Array.from({ length: power }, () => unit as Unit).reduce((left, right) => product(left, right, 1));
}
