import { describe, expect, it } from 'vitest';
import {
  findUnit,
  measures,
  PLAIN,
  readQuantity,
  type Unit,
  writeQuantity,
} from '../../src/quantity/index.ts';

function unitOf(symbol: string): Unit {
  const unit = findUnit(symbol);
  if (unit === undefined) throw new Error(`no unit ${symbol}`);
  return unit;
}

describe('a quantity in a file', () => {
  it.each([
    ['9.6 m', 9.6, 'm'],
    ['31.5 ft', 9.6012, 'ft'],
    ['-12.5 kN', -12_500, 'kN'],
    ['25 psf', 25 * unitOf('psf').factor, 'psf'],
    ['1.2 kN/m2', 1200, 'kN/m2'],
    ['22.5°', Math.PI / 8, '°'],
    ['35 %', 0.35, '%'],
    ['0 m', 0, 'm'],
    ['1e-9 m', 1e-9, 'm'],
    ['1e+21 m', 1e21, 'm'],
  ])('is as short as it was typed: %s', (text, value, symbol) => {
    expect(writeQuantity(value, unitOf(symbol))).toBe(text);
    expect(readQuantity(text).value).toBeCloseTo(value, 12);
  });

  it('has no trace of binary rounding', () => {
    expect(writeQuantity(0.1 + 0.2, unitOf('m'))).toBe('0.3 m');
    expect(writeQuantity(0.1 + 0.2, PLAIN)).toBe('0.3');
    // A length typed in feet, tenth by tenth, comes back as it was typed.
    for (let tenths = 1; tenths <= 2000; tenths++) {
      const typed = `${tenths / 10} ft`;
      const { value, unit } = readQuantity(typed);
      expect(writeQuantity(value, unit)).toBe(typed);
    }
  });

  it('has plain signs only, save for those of its unit', () => {
    const written = writeQuantity(-1.5e-7, unitOf('kN'));
    expect(written).toBe('-1.5e-10 kN');
    expect(written).toMatch(/^[ -~]*$/);
  });

  it('has neither a sign nor a figure that is none', () => {
    expect(writeQuantity(-0, unitOf('m'))).toBe('0 m');
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]) {
      expect(() => writeQuantity(value, measures.length.units.SI)).toThrow(RangeError);
    }
  });

  it('is refused where the unit or the rounding makes it infinite', () => {
    expect(() => writeQuantity(1e308, unitOf('mm'))).toThrow(RangeError);
    expect(() => writeQuantity(Number.MAX_VALUE, unitOf('m'))).toThrow(RangeError);
    expect(writeQuantity(1e308, unitOf('m'))).toBe('1e+308 m');
  });
});
