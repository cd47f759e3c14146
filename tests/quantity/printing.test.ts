import { describe, expect, it } from 'vitest';
import { type Measure, measures, printQuantity } from '../../src/quantity/index.ts';

const { length, angle, number, force, moment, areaLoad, lineLoad, density, area, volume, mass, time } =
  measures;
const NBSP = '\u00a0';

describe('a printed figure', () => {
  it.each([
    [length, `9.144${NBSP}m`, `30.00${NBSP}ft`, 9.144],
    [area, `9.290${NBSP}m²`, `100.0${NBSP}ft²`, 9.290304],
    [volume, `2.832${NBSP}m³`, `100.0${NBSP}ft³`, 2.8316846592],
    [mass, `45.36${NBSP}kg`, `100.0${NBSP}lb`, 45.359237],
    [time, `2.500${NBSP}s`, `2.500${NBSP}s`, 2.5],
    [force, `44.48${NBSP}kN`, `10.00${NBSP}kip`, 44_482.216],
    [moment, `13.56${NBSP}kN·m`, `10.00${NBSP}kip·ft`, 13_558.179],
    [lineLoad, `14.59${NBSP}kN/m`, `1.000${NBSP}klf`, 14_593.903],
    [areaLoad, `1.197${NBSP}kN/m²`, `25.00${NBSP}psf`, 1197.0065],
    [density, `480.6${NBSP}kg/m³`, `30.00${NBSP}lb/ft³`, 480.5539],
    [angle, '12.50°', '12.50°', 0.2181661565],
    [number, '0.3333', '0.3333', 1 / 3],
  ] as const)('has the unit of its system behind a non-breaking space: %o', (measure, si, us, value) => {
    expect(printQuantity(value, measure, 'SI')).toBe(si);
    expect(printQuantity(value, measure, 'US')).toBe(us);
  });

  it.each([
    ['−12.50°', -0.2181661565, angle],
    [`−4.500${NBSP}m`, -4.5, length],
    ['−0.5000', -0.5, number],
    ['−1.500×10⁻⁹', -1.5e-9, number],
  ] as const)('below 0 has a true minus and no hyphen: %s', (text, value, measure) => {
    expect(printQuantity(value, measure, 'SI')).toBe(text);
  });

  it.each([
    [0, length],
    [-0, length],
    [-0, number],
    [4.9e-4, length],
    [-4.9e-4, length],
    [-1e-30, force],
    [-1e-30, angle],
  ] as const)('that rounds to nothing has no sign: %d', (value, measure) => {
    expect(printQuantity(value, measure, 'SI')).toMatch(/^0(?:\u00a0|°|$)/);
  });

  it.each([
    [9.9994, '9.999'],
    [9.9996, '10.00'],
    [99.996, '100.0'],
    [999.96, '1000'],
    [0.99996, '1.000'],
    [-9.9996, '−10.00'],
    [0.099996, '0.1000'],
    [0.000_099_996, '0.0001000'],
    [0.000_099_994, '9.999×10⁻⁵'],
    [9.9996e14, '1.000×10¹⁵'],
  ])('that rounds up into another digit keeps its number of digits: %d', (value, text) => {
    expect(printQuantity(value, number, 'SI')).toBe(text);
  });

  it.each([
    [1, '1×10⁻⁷', '1'],
    [2, '1.2×10⁻⁷', '1.2'],
    [4, '1.235×10⁻⁷', '1.235'],
    [9, '1.23456789×10⁻⁷', '1.23456789'],
  ])('has %d significant figures where so many are asked for', (digits, small, plain) => {
    expect(printQuantity(1.234_567_89e-7, number, 'SI', { digits })).toBe(small);
    expect(printQuantity(1.234_567_89, number, 'SI', { digits })).toBe(plain);
  });

  it('keeps every digit before the point, whatever is asked for', () => {
    expect(printQuantity(123_456, length, 'SI', { digits: 2 })).toBe(`123456${NBSP}m`);
    expect(printQuantity(123_456_789_012_345, number, 'SI')).toBe('123456789012345');
    expect(printQuantity(1.234_567e15, number, 'SI')).toBe('1.235×10¹⁵');
  });

  it.each([
    ['length', length, 0.012_345_6, `0.012${NBSP}m`, `0.01235${NBSP}m`],
    ['length', length, 3e-9, `0${NBSP}m`, `3.000×10⁻⁹${NBSP}m`],
    ['angle', angle, 1e-6, '0°', '5.730×10⁻⁵°'],
    ['moment', moment, -2e-9, `0${NBSP}kN·m`, `−2.000×10⁻¹²${NBSP}kN·m`],
    ['length', length, 12.3456, `12.35${NBSP}m`, `12.35${NBSP}m`],
    ['number', number, 3e-9, '3.000×10⁻⁹', '3.000×10⁻⁹'],
  ] as const)(
    'of a %s stops at what a person can set out, unless it is fine',
    (_, measure, value, text, fine) => {
      expect(printQuantity(value, measure, 'SI')).toBe(text);
      expect(printQuantity(value, measure, 'SI', { fine: true })).toBe(fine);
    },
  );

  it('never has more decimals than its measure allows', () => {
    for (const measure of Object.values(measures).filter((m): m is Measure => typeof m === 'object')) {
      if (!Number.isFinite(measure.decimals)) continue;
      const value = measure.units.SI.factor * 0.123_456_789_123;
      const printed = printQuantity(value, measure, 'SI', { digits: 9 });
      expect(/\.(\d+)/.exec(printed)?.[1]).toHaveLength(measure.decimals);
    }
  });

  it('is refused where it is no finite figure', () => {
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]) {
      expect(() => printQuantity(value, length, 'SI')).toThrow(RangeError);
    }
  });
});
