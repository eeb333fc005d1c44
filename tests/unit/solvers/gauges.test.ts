/** Wire gauges against the tables that people print. */
import { describe, expect, it } from 'vitest';
import { awgName, awgSize, metricSize, readAwg, readMetricSize, thickestAwg, thinnestAwg, usualMetricSizes, wireResistanceOhmPerM } from '@/lib/solvers/gauges';
import { conductorAt } from '@/lib/solvers/nouns/conductor';

const copper = conductorAt('copper', 20).resistivityOhmM;
const awg = (text: string) => awgSize(readAwg(text)!);

describe('AWG', () => {
  // ASTM B258, table of diameters in inches (from memory), to its last digit.
  it.each([
    ['0000', 0.46], ['000', 0.4096], ['00', 0.3648], ['0', 0.3249], ['1', 0.2893], ['2', 0.2576], ['4', 0.2043], ['6', 0.162], ['8', 0.1285], ['10', 0.1019], ['12', 0.0808], ['14', 0.0641],
    ['16', 0.0508], ['18', 0.0403], ['20', 0.032], ['22', 0.0253], ['24', 0.0201], ['26', 0.0159], ['28', 0.0126], ['30', 0.01], ['32', 0.008], ['36', 0.005], ['40', 0.0031],
  ])('%s has the diameter of the table, %f in', (number, inches) => {
    const digits = Math.max(4, String(inches).length - 2);
    expect(Math.abs(awg(number).diameterM / 0.0254 - inches)).toBeLessThanOrEqual(0.5000001 * 10 ** -digits);
  });

  it('is exact where the definition is: 36 AWG is 0.127 mm and 0000 AWG 11.684 mm', () => {
    expect(awg('36').diameterM).toBe(0.127e-3);
    expect(awg('0000').diameterM / 11.684e-3 - 1).toBeLessThan(1e-15);
    expect(awg('10').diameterM).toBeCloseTo(2.588e-3, 6);
    expect(awg('24').diameterM).toBeCloseTo(0.5106e-3, 7);
  });

  // Solid copper at 20 degC in ohm/km: handbook tables (from memory).
  it.each([
    ['0000', 0.1608], ['0', 0.3224], ['4', 0.8152], ['8', 2.061], ['10', 3.277], ['12', 5.211], ['14', 8.286], ['18', 20.95], ['20', 33.31], ['22', 52.96], ['24', 84.22], ['26', 133.9], ['28', 212.9], ['30', 338.6],
  ])('%s of copper has the handbook’s resistance, %f ohm/km, to 0.1 %%', (number, ohmPerKm) => {
    expect(Math.abs((1000 * wireResistanceOhmPerM(copper, awg(number))) / ohmPerKm - 1)).toBeLessThanOrEqual(1e-3);
  });

  it('halves and doubles as the rules of thumb say: six numbers are a factor of two in diameter, to half a percent', () => {
    for (let number = thickestAwg; number + 6 <= thinnestAwg; number++) expect(awgSize(number).diameterM / awgSize(number + 6).diameterM).toBeCloseTo(2, 1);
  });

  it('reads every number by its own name, and both spellings of the aughts', () => {
    for (let number = thickestAwg; number <= thinnestAwg; number++) expect(readAwg(awgName(number))).toBe(number);
    expect(['1/0', '2/0', '3/0', '4/0'].map(readAwg)).toEqual(['0', '00', '000', '0000'].map(readAwg));
    for (const text of ['', '57', '-1', '01', '1.5', '00000', '5/0', '0/0', '1e1', ' 24', '24 ', '0x18', 'NaN', '٢٤', '__proto__']) expect(readAwg(text), text).toBeUndefined();
  });
});

describe('metric sizes', () => {
  it('have the area of their name', () => {
    for (const text of usualMetricSizes) {
      const { diameterM, areaM2 } = metricSize(readMetricSize(text)!);
      expect(areaM2 * 1e6).toBeCloseTo(Number(text), 12);
      expect(((Math.PI / 4) * diameterM ** 2) / areaM2).toBeCloseTo(1, 14);
    }
  });

  // IEC 60228 (2004), table 1, plain annealed copper, class 1, maximum resistance at 20 degC in ohm/km (from memory).
  // Wires sold as 50 mm2 have about 47, hence the eleven percent.
  it.each([
    ['0.5', 36], ['0.75', 24.5], ['1', 18.1], ['1.5', 12.1], ['2.5', 7.41], ['4', 4.61], ['6', 3.08], ['10', 1.83], ['16', 1.15], ['25', 0.727], ['35', 0.524], ['50', 0.387], ['70', 0.268], ['95', 0.193], ['120', 0.153], ['150', 0.124],
  ])('%s mm2 of copper stays below the maximum of the standard, %d ohm/km, by at most 11 %%', (size, maximum) => {
    const ohmPerKm = 1000 * wireResistanceOhmPerM(copper, metricSize(Number(size)));
    expect(ohmPerKm).toBeLessThanOrEqual(maximum);
    expect(ohmPerKm).toBeGreaterThan(0.89 * maximum);
  });

  it('are plain decimals within bounds', () => {
    expect(['0.000001', '0.5', '1.50', '10000'].map(readMetricSize)).toEqual([1e-6, 0.5, 1.5, 1e4]);
    for (const text of ['', '0', '0.0', '-1', '+1', '.5', '1.', '1e3', '10001', '0.0000001', '1,5', 'Infinity', 'NaN', '1.5 ', '0x1', '123456']) expect(readMetricSize(text), text).toBeUndefined();
  });
});
