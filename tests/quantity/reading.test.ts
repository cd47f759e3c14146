import { describe, expect, it } from 'vitest';
import { allUnits, findUnit, measures, PLAIN, readMeasure, readQuantity } from '../../src/quantity/index.ts';

const { length, area, volume, mass, time, force, moment, lineLoad, areaLoad, density, angle, number } =
  measures;

/** Ten roundings' worth: a figure is parsed, scaled and, in feet and inches, added up. */
const ROUNDING = 10 * Number.EPSILON;

function expectClose(value: number, expected: number): void {
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(Math.abs(expected) * ROUNDING);
}

describe('a figure', () => {
  // Every way to write one and a half.
  it.each([
    '1.5',
    '+1.5',
    '01.50',
    '1.5e0',
    '15e-1',
    '15E-1',
    '.15e+1',
    '0.0015×10³',
    '1500×10⁻³',
    '0.15×10⁺¹',
    '1500x10^-3',
    '1500 × 10⁻³',
    '15×10^−1',
    '0.15e00001',
    `${'0'.repeat(500)}1.5`,
  ])('written %s is one and a half', (text) => {
    expectClose(readMeasure(text, number).value, 1.5);
    expectClose(readMeasure(`${text} m`, length).value, 1.5);
  });

  it.each([
    ['a hyphen', '-2.5 kN'],
    ['a true minus', '−2.5 kN'],
    ['a true minus and a non-breaking space', '−2.5\u00a0kN'],
    ['a thin space', '−2.5\u2009kN'],
    ['a narrow non-breaking space', '−2.5\u202fkN'],
    ['no space', '−2.5kN'],
    ['spaces around it', ' \t−2.5 kN\u00a0\n'],
  ])('with %s is the same force', (_, text) => {
    expect(readMeasure(text, force).value).toBe(-2500);
  });

  it('too small for the machine is nothing, not an error', () => {
    expect(readMeasure('1e-400 m', length).value).toBe(0);
  });
});

describe('feet and inches', () => {
  // 31 ft 6 1/2 in = 378.5 in = 378.5 × 0.0254 m.
  it.each([
    '31 ft 6 1/2 in',
    '31ft 6 1/2in',
    '31 feet 6 1/2 inches',
    '31 foot 6.5 inch',
    '31\'-6 1/2"',
    '31\' - 6 1/2"',
    '31\' 6.5"',
    '31′ 6 1/2″',
    '31′-6 1/2″',
    '378 1/2 in',
    '378 1/2 inches',
    '757/2"',
    '378.5 in',
    '31\u00a0ft\u00a06\u00a01/2\u00a0in',
    '30 ft 18 1/2 in',
  ])('%s is 378.5 inches', (text) => {
    expectClose(readMeasure(text, length).value, 378.5 * 0.0254);
  });

  it.each(['-1 ft 6 in', '−1 ft 6 in', '-1\'-6"', '−1′ 6″'])(
    'in %s the sign is that of the whole length',
    (text) => {
      expectClose(readMeasure(text, length).value, -18 * 0.0254);
    },
  );

  it('shorter than an inch needs no whole inches', () => {
    expectClose(readMeasure('31 ft 3/8 in', length).value, 372.375 * 0.0254);
    expectClose(readMeasure('-3/8 in', length).value, -0.375 * 0.0254);
  });

  it('keep the foot, or the inch, as the unit that was written', () => {
    expect(readQuantity('31 ft 6 in').unit).toBe(findUnit('ft'));
    expect(readQuantity('6 1/2"').unit).toBe(findUnit('in'));
  });
});

describe('a unit', () => {
  it.each(allUnits.map(({ symbol }) => symbol))('%s stands directly behind its figure or apart', (symbol) => {
    const unit = findUnit(symbol);
    for (const text of [`3${symbol}`, `3 ${symbol}`, `3\u00a0${symbol}`]) {
      expect(readQuantity(text)).toEqual({ value: 3 * (unit?.factor ?? Number.NaN), unit });
    }
  });

  it.each([
    [areaLoad, 1200, ['1.2 kN/m²', '1.2 kN/m2', '1.2 kN/m^2', '1.2 kN·m⁻²', '1.2 kN*m^-2', '1.2 kN m-2']],
    [areaLoad, 1200, ['1.2 kN / m²', '1.2 kN/m/m', '1.2 kPa', '1.2e-3 MPa', '1.2 kN\u00a0/\u00a0m²']],
    [moment, 3000, ['3 kN·m', '3 kN*m', '3 kN m', '3 kN ⋅ m', '3 m·kN', '3 kN\u00a0m', '3 kN * m']],
    [moment, 3000, ['3 kN/m^-1', '3 kN·m/rad']],
    [lineLoad, 2000, ['2 kN/m', '2 kN·m⁻¹', '2 N/mm', '2 kN·m/m²']],
    [density, 350, ['350 kg/m³', '350 kg/m3', '350 kg/m^3', '350 kg·m⁻³', '0.35 t/m³', '0.35 g/cm^3']],
    [area, 6, ['6 m²', '6 m2', '6 m·m', '6e6 mm²', '60000 cm2']],
    [volume, 6, ['6 m³', '6 m^3', '6 m²·m', '6e9 mm³']],
    [time, 2, ['2 s', '2 1/s^-1']],
    [mass, 2000, ['2 t', '2000 kg', '2e6 g']],
    [number, 0.35, ['0.35', '35 %', '35%', '0.35 m/m', '350 mm/m']],
    [angle, Math.PI / 6, ['30°', '30 °', '30 deg', '30 degrees', '30\u00a0°']],
    [angle, 0.03, ['0.03 rad', '30 mrad', '0.03 rad·m/m']],
  ] as const)('typed in several ways is one and the same', (measure, value, texts) => {
    for (const text of texts) expectClose(readMeasure(text, measure).value, value);
  });

  it.each([
    // Factors that are exact by definition: NIST SP 811 (2008), appendix B.8 and its footnotes 22 and 23.
    [length, '10 ft', 3.048],
    [length, '10 feet', 3.048],
    [length, '1 foot', 0.3048],
    [length, "10'", 3.048],
    [length, '10′', 3.048],
    [length, '10 in', 0.254],
    [length, '10 inches', 0.254],
    [length, '10″', 0.254],
    [length, '2 yd', 1.8288],
    [mass, '2 lb', 0.90718474],
    [force, '1000 lbf', 4448.2216152605],
    [force, '1 kip', 4448.2216152605],
    [force, '2 kips', 8896.443230521],
    [moment, '1 kip·ft', 4448.2216152605 * 0.3048],
    [moment, '12 kip in', 4448.2216152605 * 0.3048],
    [lineLoad, '1 klf', 4448.2216152605 / 0.3048],
    [lineLoad, '1 kip/ft', 4448.2216152605 / 0.3048],
    [lineLoad, '1000 plf', 4448.2216152605 / 0.3048],
    [areaLoad, '1 psf', 4.4482216152605 / 0.09290304],
    [areaLoad, '1 lbf/ft²', 4.4482216152605 / 0.09290304],
    [areaLoad, '144 psf', 4.4482216152605 / 0.00064516],
    [areaLoad, '1 psi', 4.4482216152605 / 0.00064516],
    [areaLoad, '1 ksi', 4448.2216152605 / 0.00064516],
    [density, '1 lb/ft³', 0.45359237 / 0.3048 ** 3],
  ] as const)('that is US customary gives %s: %s', (measure, text, value) => {
    expectClose(readMeasure(text, measure).value, value);
  });

  it('is kept as it was typed', () => {
    expect(readQuantity('1.2 kN/m2').unit.symbol).toBe('kN/m2');
    expect(readQuantity('2 kips').unit.symbol).toBe('kip');
    expect(readQuantity('30 deg').unit.symbol).toBe('°');
    expect(readQuantity('7').unit).toBe(PLAIN);
  });

  it('of which only the slash is written has nothing above it', () => {
    expect(readQuantity('0.5 1/m').value).toBe(0.5);
    expect(readQuantity('0.5 1/m').unit.dimension).toBe(readQuantity('0.5 m⁻¹').unit.dimension);
  });
});

describe('a figure without a unit', () => {
  it.each([
    ['10', length, 'SI', 10],
    ['10', length, 'US', 3.048],
    ['−10', force, 'SI', -10_000],
    ['1', force, 'US', 4448.2216152605],
    ['180', angle, 'SI', Math.PI],
    ['180', angle, 'US', Math.PI],
    ['0.4', number, 'US', 0.4],
  ] as const)('%s is taken in the unit of a system that is assumed', (text, measure, system, value) => {
    const read = readMeasure(text, measure, system);
    expectClose(read.value, value);
    expect(read.unit).toBe(measure.units[system]);
  });

  it('does not touch one that has a unit', () => {
    expect(readMeasure('10 m', length, 'US').value).toBe(10);
    expect(readMeasure('10%', number, 'US').value).toBe(0.1);
  });
});
