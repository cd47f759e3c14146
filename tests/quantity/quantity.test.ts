import { describe, expect, it } from 'vitest';
import {
  dimension,
  LENGTH,
  measureOf,
  measures,
  nameDimension,
  printQuantity,
  QuantityError,
  quotientDimension,
  readMeasure,
  readQuantity,
  writeQuantity,
} from '../../src/quantity/index.ts';

describe('what is typed', () => {
  it.each([
    ['32 m', 32],
    ['32m', 32],
    ['  32\u00a0m ', 32],
    ['-4.5 m', -4.5],
    ['−4.5 m', -4.5],
    ['+.5 m', 0.5],
    ['5. m', 5],
    ['105 ft', 32.004],
    ["12'", 3.6576],
    ['31 ft 6 in', 9.6012],
    ['5\'-6 1/2"', 1.6891],
    ['-1\' 6"', -0.4572],
    ['6 1/2 in', 0.1651],
    ['1/4"', 0.00635],
    ['1.5e3 mm', 1.5],
    ['1.5×10³ mm', 1.5],
    ['1.5×10^-3 km', 1.5],
    ['2 km', 2000],
  ])('%s is read as a length', (text, metres) => {
    expect(readMeasure(text, measures.length).value).toBeCloseTo(metres, 12);
  });

  it.each([
    ['1.2 kN/m²', measures.areaLoad, 1200],
    ['1.2 kN/m2', measures.areaLoad, 1200],
    ['1.2 kN/m^2', measures.areaLoad, 1200],
    ['1.2 kPa', measures.areaLoad, 1200],
    ['3 kN·m', measures.moment, 3000],
    ['3 kN*m', measures.moment, 3000],
    ['3 kN m', measures.moment, 3000],
    ['2 kN/m', measures.lineLoad, 2000],
    ['12.5°', measures.angle, 0.218166156],
    ['12.5 deg', measures.angle, 0.218166156],
    ['0.2 rad', measures.angle, 0.2],
    ['35 %', measures.number, 0.35],
    ['350 kg·m⁻³', measures.density, 350],
    ['350 kg/m³', measures.density, 350],
    ['2 kips', measures.force, 8896.443],
  ])('%s is read as what it is', (text, measure, value) => {
    expect(readMeasure(text, measure).value).toBeCloseTo(value, 3);
  });

  it.each([
    ['12 kN', measures.length, '"12 kN" is a force where a length is wanted'],
    ['12°', measures.length, '"12°" is an angle where a length is wanted'],
    ['12 m', measures.angle, '"12 m" is a length where an angle is wanted'],
    ['12°', measures.number, '"12°" is an angle where a plain number is wanted'],
    ['12', measures.length, '"12" has no unit where a length is wanted: write for example "12 m"'],
    ['12', measures.angle, 'write for example "12°"'],
    ['300 lb', measures.force, '"300 lb" is a mass where a force is wanted (a force is in kN, N, lbf, kip)'],
    ['3 m³/s', measures.length, 'is a quantity in m³·s⁻¹ where a length is wanted'],
    ['9,5 m', measures.length, 'has a comma: write the decimal sign as a point and no thousands'],
    ['1e999 m', measures.length, 'is too large a figure'],
    ['3 parsecs', measures.length, '"parsecs" is no unit that is known here'],
    ['three m', measures.length, 'does not begin with a figure'],
    ['', measures.length, 'nothing is written: write a figure with its unit'],
    ['NaN', measures.number, 'does not begin with a figure'],
    ['Infinity m', measures.length, 'does not begin with a figure'],
    ['1/0 in', measures.length, 'divides an inch by nothing'],
    ['3 m constructor', measures.length, 'is no unit'],
  ])('%s is refused with what to write', (text, measure, words) => {
    expect(() => readMeasure(text, measure)).toThrow(QuantityError);
    expect(() => readMeasure(text, measure)).toThrow(words);
  });

  it('without a unit is in the unit of a system, where one is assumed', () => {
    expect(readMeasure('10', measures.length, 'US').value).toBeCloseTo(3.048, 12);
    expect(readMeasure('10', measures.force, 'SI').value).toBe(10_000);
  });
});

describe('what is printed', () => {
  it.each([
    [9.45, measures.length, 'SI', '9.450\u00a0m'],
    [9.45, measures.length, 'US', '31.00\u00a0ft'],
    [-151_234, measures.moment, 'SI', '−151.2\u00a0kN·m'],
    [1_234_567, measures.force, 'SI', '1235\u00a0kN'],
    [9.99996, measures.length, 'SI', '10.00\u00a0m'],
    [0.218166156, measures.angle, 'SI', '12.50°'],
    [1200, measures.areaLoad, 'US', '25.06\u00a0psf'],
    [0, measures.force, 'SI', '0\u00a0kN'],
    [3e-9, measures.length, 'SI', '0\u00a0m'],
    [-3e-9, measures.length, 'SI', '0\u00a0m'],
    [1.5e-16, measures.number, 'SI', '1.500×10⁻¹⁶'],
    [0.35, measures.number, 'SI', '0.3500'],
  ] as const)('%d is rounded, with its unit: %s', (value, measure, system, text) => {
    expect(printQuantity(value, measure, system)).toBe(text);
  });

  it('keeps what is small where it matters', () => {
    expect(printQuantity(3e-9, measures.length, 'SI', { fine: true })).toBe('3.000×10⁻⁹\u00a0m');
  });

  it('has as many figures as are asked for', () => {
    expect(printQuantity(1 / 3, measures.number, 'SI', { digits: 2 })).toBe('0.33');
  });

  it('is never a figure that is none', () => {
    expect(() => printQuantity(Number.NaN, measures.length, 'SI')).toThrow(RangeError);
    expect(() => writeQuantity(Number.POSITIVE_INFINITY, measures.length.units.SI)).toThrow(RangeError);
  });

  it('is written for a file in plain signs, as short as it can be', () => {
    expect(writeQuantity(9.4488, readQuantity('1 ft').unit)).toBe('31 ft');
    expect(writeQuantity(-12_500, measures.force.units.SI)).toBe('-12.5 kN');
    expect(writeQuantity(Math.PI / 6, measures.angle.units.SI)).toBe('30°');
    expect(writeQuantity(0.5, measures.number.units.SI)).toBe('0.5');
  });
});

describe('a dimension', () => {
  it('is one object, whichever way it is made', () => {
    expect(dimension(1, 0, 0)).toBe(LENGTH);
    expect(quotientDimension(dimension(2, 0, 0), LENGTH)).toBe(LENGTH);
    expect(dimension(0.1 + 0.2, 0, 0)).toBe(dimension(0.3, 0, 0));
    expect(dimension(-0, 0, 0)).toBe(dimension(0, 0, 0));
  });

  it('has a name, or its base units', () => {
    expect(nameDimension(LENGTH)).toBe('a length');
    expect(nameDimension(dimension(0.5, 1, -2))).toBe('a quantity in m^0.5·kg·s⁻²');
  });

  it('without a measure of its own is printed in base units, and reads back', () => {
    const odd = measureOf(dimension(4, 0, -1));
    const printed = printQuantity(2.5, odd, 'SI');
    expect(printed).toBe('2.500\u00a0m⁴·s⁻¹');
    expect(readQuantity(printed).value).toBe(2.5);
  });
});
