import { all, create, type FactoryFunctionMap } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { allUnits, findUnit, readQuantity } from '../../src/quantity/index.ts';

/** Source: the unit tables of the npm package mathjs 15.2.0, an independent implementation. */
const math = create(all as FactoryFunctionMap);

/** A unit of ours in mathjs's names, put together from others where it has none, or none that is exact. */
const NAMES: Record<string, string> = {
  in: 'inch',
  t: 'tonne',
  lb: 'lbm',
  '°': 'deg',
  '%': '0.01',
  // Its own kip and psi are rounded to eight and eleven digits; see the last test.
  kip: '(1000 lbf)',
  psi: '(lbf/inch^2)',
  ksi: '(1000 lbf/inch^2)',
  psf: '(lbf/ft^2)',
  plf: '(lbf/ft)',
  klf: '(1000 lbf/ft)',
};

function expression(text: string): string {
  return text
    .replace(/[A-Za-z°%]+/g, (symbol) => NAMES[symbol] ?? symbol)
    .replace(/[⁻⁰¹²³⁴-⁹]+/g, (raised) => {
      const digits = [...raised].map((sign) => (sign === '⁻' ? '-' : '⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(sign)));
      return `^(${digits.join('')})`;
    })
    .replace(/[·\s]/g, '*');
}

interface Reference {
  readonly value: number;
  readonly length: number;
  readonly mass: number;
  readonly time: number;
  readonly angle: number;
}

/** The order in which mathjs keeps the exponents of its base units (its `UNITS`' `dimensions`). */
const [MASS, LENGTH, TIME, ANGLE] = [0, 1, 2, 7];

function reference(text: string): Reference {
  // A quotient of two lengths is a plain number there only after it has been multiplied.
  const found: unknown = math.multiply(1, math.evaluate(expression(text)));
  if (typeof found === 'number') return { value: found, length: 0, mass: 0, time: 0, angle: 0 };
  const unit = found as { toSI(): { toNumeric(): number }; dimensions: readonly number[] };
  const [mass, length, time, angle] = [MASS, LENGTH, TIME, ANGLE].map((i) => unit.dimensions[i] ?? 0);
  return { value: Number(unit.toSI().toNumeric()), length, mass, time, angle } as Reference;
}

const COMPOUND = [
  'ft²',
  'in²',
  'yd³',
  'in³',
  'in⁴',
  'm⁴',
  'mm⁴',
  'cm³',
  'kN/m',
  'N/mm',
  'kN/m²',
  'N/mm²',
  'kN·m',
  'N·mm',
  'kN·m²',
  'kN·m/rad',
  'kip·ft',
  'kip·in',
  'kip/ft',
  'kip/in²',
  'kip·ft²',
  'lbf·in',
  'lbf/yd',
  'psf·ft',
  'psi·in²',
  'klf·ft²',
  'lb/ft',
  'lb/ft²',
  'lb/ft³',
  'lb·ft/s²',
  'kg/m³',
  'kg·m⁻³',
  'kg·m/s²',
  't/m³',
  'g/cm³',
  'm/s²',
  'ft/s²',
  'm⁻¹',
  '1/m',
  'mrad/m',
  '°/ft',
  'mm/m',
  'in/ft',
  '%/m',
  'MPa·m^0.5',
  'ksi·in^0.5',
  'm^-2',
  'kN/m/m',
  'kN m',
  'kip*ft',
];

describe('one of a unit', () => {
  it.each([...allUnits.map(({ symbol }) => symbol), ...COMPOUND])(
    '(%s) has the value and the dimension that mathjs gives it',
    (text) => {
      const { value, unit } = readQuantity(`1 ${text}`);
      const there = reference(text);
      expect(Math.abs(value / there.value - 1)).toBeLessThan(1e-12);
      const { length, mass, time } = unit.dimension;
      expect({ length, mass, time }).toEqual({ length: there.length, mass: there.mass, time: there.time });
      const plain = length === 0 && mass === 0 && time === 0;
      expect(unit.angular).toBe(plain && there.angle === 1);
    },
  );

  it.each([
    ['kip', 1e-8],
    ['psi', 1e-10],
  ])('(%s) has its value there to as many digits as mathjs has', (symbol, digits) => {
    const there = math.unit(`1 ${symbol}`).toSI().toNumeric() as unknown as number;
    expect(Math.abs((findUnit(symbol)?.factor ?? Number.NaN) / there - 1)).toBeLessThan(digits);
  });
});
