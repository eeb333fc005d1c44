import { describe, expect, it } from 'vitest';
import { readComplex } from '@/lib/quantities/read-complex';
import { readQuantities, readQuantity } from '@/lib/quantities/read-quantity';
import { shownUnit, writeComplex, writeQuantity } from '@/lib/quantities/write-quantity';

describe('what a person types becomes the SI number it means', () => {
  it.each([
    ['3.2 mm', 'm', 3.2e-3],
    ['3.2mm', 'm', 3.2e-3],
    ['12 ft', 'm', 3.6576],
    ['0.5 in', 'm', 0.0127],
    ['0.5"', 'm', 0.0127],
    ['8 mil', 'm', 203.2e-6],
    ['-3 µm', 'm', -3e-6],
    ['30.5 pF/ft', 'F/m', 30.5e-12 / 0.3048],
    ['250 nH/m', 'H/m', 2.5e-7],
    ['250 nH per m', 'H/m', 2.5e-7],
    ['4.7 kΩ', 'ohm', 4700],
    ['85 ohm/km', 'ohm/m', 0.085],
    ['100 MHz', 'Hz', 1e8],
    ['1e-9', 's', 1e-9],
    ['.5 ns', 's', 5e-10],
    ['12 dB/100 m', 'dB/m', 0.12],
    ['12 dB/100m', 'dB/m', 0.12],
    ['1 Np/m', 'dB/m', 20 / Math.LN10],
    ['90°', 'deg', 90],
    ['180 deg', 'rad', Math.PI],
    ['5 %', '', 0.05],
    ['0.05', '1', 0.05],
    ['39 turns/m', 'turn/m', 39],
    ['12 twists/ft', '1/m', 12 / 0.3048],
    ['1.72e-8 ohm m', 'ohm*m', 1.72e-8],
    ['0.00393 1/K', '1/K', 0.00393],
    ['20 °C', 'degC', 20],
    ['68 °F', 'degC', 20],
    ['30 dBm', 'W', 1],
    ['−0.3', 'm', -0.3],
  ])('%s in a field of %s', (typed, unit, expected) => {
    const value = readQuantity(typed, unit);
    expect(Math.abs(value - expected)).toBeLessThanOrEqual(2.3e-16 * Math.abs(expected));
  });

  it('is exact wherever both units are decimal', () => {
    expect(readQuantity('250 nH/m', 'H/m')).toBe(2.5e-7);
    expect(readQuantity('12 ft', 'm')).toBe(3.6576);
    expect(readQuantity('100.7 pF/m', 'F/m')).toBe(100.7e-12);
  });

  it('takes a bare number in the unit that the field shows', () => {
    expect(readQuantity('250', 'H/m', 'nH/m')).toBe(2.5e-7);
    expect(readQuantity('250 µH/km', 'H/m', 'nH/m')).toBe(2.5e-7);
  });

  it('knows wire gauges by ASTM B258', () => {
    expect(readQuantity('36 AWG', 'm')).toBe(0.127e-3);
    expect(readQuantity('24 AWG', 'm')).toBeCloseTo(0.5106e-3, 7);
    expect(readQuantity('AWG 4/0', 'm')).toBeCloseTo(11.684e-3, 6);
    expect(readQuantity('0000 AWG', 'm')).toBeCloseTo(11.684e-3, 6);
  });

  it('reads lists with a unit of its own for any entry', () => {
    expect(readQuantities('0, 1 kHz; 10\n20 MHz', 'Hz', 'MHz')).toEqual([0, 1e3, 10e6, 20e6]);
  });
});

describe('what cannot be read is refused with the reason', () => {
  it.each([
    ['3 mm', 'ohm/m', 'mm is a length; this field takes ohm/m'],
    ['3 ohm/km', 'm', 'ohm/km is a resistance per length; this field takes m'],
    ['3 mm', '', 'mm is a length; this field takes a plain number'],
    ['24 AWG', 'ohm', '24 AWG is a wire diameter; this field takes ohm'],
    ['100 mhz', 'Hz', '“mhz” is not a unit known here; write MHz or mHz'],
    ['100 furlongs', 'm', '“furlongs” is not a unit known here'],
    ['1,5', 'm', 'write 1,5 with a point and without commas, as in 1234.5'],
    ['long', 'm', '“long” does not begin with a number'],
    ['', 'm', 'type a number'],
    ['1.2.3', 'm', '“1.2.3” is not a number'],
    ['3 dB/', 'dB/m', 'the unit “dB/” lacks a part at its slash'],
    ['1e999', 'm', '1e999 is beyond any number of this service'],
    ['99 AWG', 'm', 'AWG runs from 4/0 (0000) to 56 in whole numbers; got 99'],
    ['30 °', 'dB', '° is an angle; this field takes dB'],
  ])('%s in a field of %s: %s', (typed, unit, message) => {
    expect(() => readQuantity(typed, unit)).toThrow(message);
  });
});

describe('complex numbers', () => {
  it.each([
    ['75', 75],
    ['75-30j', { re: 75, im: -30 }],
    ['75 - j30', { re: 75, im: -30 }],
    ['75 − 30 j', { re: 75, im: -30 }],
    ['-j30', { re: 0, im: -30 }],
    ['30j', { re: 0, im: 30 }],
    ['j', { re: 0, im: 1 }],
    ['1e3+2.5e-1i', { re: 1000, im: 0.25 }],
    ['75 - j30 ohm', { re: 75, im: -30 }],
    ['1.5+2j kohm', { re: 1500, im: 2000 }],
    ['0.3∠-43deg', { magnitude: 0.3, angle_deg: -43 }],
    ['0.3 ∠ -43°', { magnitude: 0.3, angle_deg: -43 }],
    ['0.3<-43', { magnitude: 0.3, angle_deg: -43 }],
    ['1 ∠ 0 rad kohm', { magnitude: 1000, angle_deg: 0 }],
    ['4.7 kohm', 4700],
  ])('%s', (typed, expected) => {
    expect(readComplex(typed, 'ohm')).toEqual(expected);
  });

  it.each([
    ['75 30j', 'write a complex number as 75-30j'],
    ['75-30x', '“-30x” is not a unit known here'],
    ['75-30j mm', 'mm is a length; this field takes ohm'],
    ['', 'type a number'],
  ])('%s is refused: %s', (typed, message) => {
    expect(() => readComplex(typed, 'ohm')).toThrow(message);
  });
});

describe('a number on the wire and the text in the field are the same', () => {
  it.each([
    [2.5e-7, 'H/m', 'nH/m', '250'],
    [1e8, 'Hz', 'MHz', '100'],
    [0.12, 'ohm/m', 'ohm/m', '0.12'],
    [0.012, 'ohm/m', 'mohm/m', '12'],
    [3.2, 'm', 'm', '3.2'],
    [1500, 'm', 'm', '1500'],
    [0.00081, 'm', 'µm', '810'],
    [0, 'Hz', 'Hz', '0'],
    [2e8, 'm/s', 'm/s', '200000000'],
    [0.66, '', '', '0.66'],
    [1.72e-8, 'ohm*m', 'ohm*m', '0.0000000172'],
  ])('%d %s is shown in %s as %s', (value, unit, shown, text) => {
    expect(shownUnit(value, unit)).toBe(shown);
    expect(writeQuantity(value, unit, shown)).toBe(text);
  });

  it('reads back to the last bit', () => {
    for (let seed = 1; seed < 2000; seed++) {
      const value = Math.sin(seed) * 10 ** ((seed % 41) - 20);
      for (const unit of ['H/m', 'ohm', 'm', '', 'dB/m']) {
        const shown = shownUnit(value, unit);
        expect(readQuantity(writeQuantity(value, unit, shown), unit, shown)).toBe(value);
        const complex = { re: value, im: -value / 3 };
        expect(readComplex(writeComplex(complex, unit, shown), unit, shown)).toEqual(complex);
      }
    }
  });
});
