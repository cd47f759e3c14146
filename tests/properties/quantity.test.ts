import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  type Measure,
  measures,
  printQuantity,
  QuantityError,
  readMeasure,
  readQuantity,
  type System,
  writeQuantity,
} from '../../src/quantity/index.ts';

const measure = fc.constantFrom<Measure>(
  ...Object.values(measures).filter((one): one is Measure => typeof one === 'object'),
);
const system = fc.constantFrom<System>('SI', 'US');
/** Not so small that the figure itself has lost digits. */
const figure = fc
  .oneof(
    fc.double({ min: -1e6, max: 1e6, noNaN: true }),
    fc.double({ min: -1e-3, max: 1e-3, noNaN: true }),
    fc.double({ min: -1e15, max: 1e15, noNaN: true }),
  )
  .map((value) => (Math.abs(value) < 1e-290 ? 0 : value));

/** Half a step of the last digit that a printed figure shows, in SI units. */
function halfLastDigit(printed: string, factor: number): number {
  const [, mantissa = '', exponent = ''] =
    /^−?([\d.]+)(?:×10([⁻⁰¹²³⁴-⁹]*))?/.exec(printed.replace('\u00a0', ' ')) ?? [];
  const decimals = mantissa.split('.')[1]?.length ?? 0;
  const raised = '⁰¹²³⁴⁵⁶⁷⁸⁹';
  const power = Number([...exponent].map((sign) => (sign === '⁻' ? '-' : raised.indexOf(sign))).join(''));
  return 0.5 * 10 ** (power - decimals) * factor;
}

describe('what is printed', () => {
  it('reads back to within half of its last digit, and prints the same again', () => {
    fc.assert(
      fc.property(
        figure,
        measure,
        system,
        fc.integer({ min: 2, max: 9 }),
        fc.boolean(),
        (value, m, s, digits, fine) => {
          const printed = printQuantity(value, m, s, { digits, fine });
          const read = readMeasure(printed, m).value;
          const { factor } = m.units[s];
          const decimals = fine ? Number.POSITIVE_INFINITY : m.decimals;
          // A figure that is cut at the decimals of its measure shows no digits behind them.
          const cut = Number.isFinite(decimals) ? 0.5 * 10 ** -decimals * factor : 0;
          expect(Math.abs(read - value)).toBeLessThanOrEqual(
            Math.max(halfLastDigit(printed, factor) * 1.000001, cut) + Math.abs(value) * 1e-14,
          );
          expect(printQuantity(read, m, s, { digits, fine })).toBe(printed);
        },
      ),
      { numRuns: 3000 },
    );
  });
});

describe('what is written', () => {
  it('reads back as the same value to fourteen figures', () => {
    fc.assert(
      fc.property(figure, measure, system, (value, m, s) => {
        const read = readMeasure(writeQuantity(value, m.units[s]), m).value;
        expect(Math.abs(read - value)).toBeLessThanOrEqual(Math.abs(value) * 1e-14);
      }),
      { numRuns: 2000 },
    );
  });
});

describe('any text at all', () => {
  const signs = fc.string({
    unit: fc.constantFrom(...'0123456789.,-−+eE×^/*·° \'"′″²³⁻mkNftinpsrad%'),
    maxLength: 24,
  });

  it('is a finite quantity or an error in words', () => {
    fc.assert(
      fc.property(fc.oneof(signs, fc.string({ maxLength: 40 })), (text) => {
        try {
          expect(Number.isFinite(readQuantity(text).value)).toBe(true);
        } catch (error) {
          expect(error).toBeInstanceOf(QuantityError);
        }
      }),
      { numRuns: 5000 },
    );
  });
});
