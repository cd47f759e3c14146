import { all, create, type FactoryFunctionMap } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { allUnits, findUnit, readQuantity } from '../../src/quantity/index.ts';

/**
 * Factors to the SI. Source: NIST Special Publication 811 (2008), appendix B.8; from memory. The foot, the inch, the
 * pound and the pound-force are exact by definition there; those marked with digits are rounded as printed.
 */
const NIST: readonly (readonly [symbol: string, factor: number, digits: number])[] = [
  ['ft', 0.3048, 16],
  ['in', 0.0254, 16],
  ['yd', 0.9144, 16],
  ['lb', 0.453_592_37, 16],
  ['t', 1e3, 16],
  ['lbf', 4.448_222, 7],
  ['kip', 4.448_222e3, 7],
  ['psf', 47.880_26, 7],
  ['psi', 6.894_757e3, 7],
  ['ksi', 6.894_757e6, 7],
  ['plf', 14.593_9, 6],
  ['°', 0.017_453_29, 7],
  ['lb/ft³', 16.018_46, 7],
  ['lbf*ft', 1.355_818, 7],
  ['in²', 6.4516e-4, 16],
];

describe('NIST SP 811', () => {
  it.each(NIST)('has 1 %s as %d in SI units', (symbol, factor, digits) => {
    const unit = findUnit(symbol);
    expect(Math.abs((unit?.factor ?? Number.NaN) / factor - 1)).toBeLessThan(
      0.51 * 10 ** (1 - digits) + 1e-15,
    );
  });
});

describe('the unit tables of mathjs', () => {
  const math = create(all as FactoryFunctionMap);

  /** The same unit there, where it goes by another name or has to be put together. */
  const NAMES: Record<string, string> = {
    t: '1 tonne',
    lb: '1 lbm',
    // Its own kip and psi are rounded to ten digits.
    kip: '1000 lbf',
    'kip*ft': '1000 lbf*ft',
    klf: '1000 lbf/ft',
    ksi: '1000 lbf/in^2',
    psi: '1 lbf/in^2',
    psf: '1 lbf/ft^2',
    plf: '1 lbf/ft',
    '°': '1 deg',
  };

  const rows = allUnits.filter(({ symbol }) => symbol !== '%').map(({ symbol }) => symbol);

  it.each([...rows, 'kN/m²', 'kN*m', 'kip*ft', 'lb/ft^3', 'kN/m', 'N/mm^2', 'm^4', 'kg/m³'])(
    'have the same value of 1 %s',
    (symbol) => {
      const written = NAMES[symbol] ?? `1 ${symbol.replace('²', '^2').replace('³', '^3')}`;
      const there = math.unit(written).toSI().toNumeric() as unknown as number;
      // Factors that were multiplied in another order differ by rounding.
      expect(Math.abs(readQuantity(`1 ${symbol}`).value / Number(there) - 1)).toBeLessThan(1e-14);
    },
  );
});
