import { describe, expect, it } from 'vitest';
import { allUnits, findUnit } from '../../src/quantity/index.ts';

/**
 * Factors to the SI as NIST Special Publication 811 (2008 edition) prints them. The rows marked B8 were compared with
 * public transcriptions of the table in appendix B.8 (two, which agree where both have the row), and N22, N23 with
 * quotations of those footnotes; the publication itself was not at hand. The others are from memory.
 */
const B8 = 'NIST SP 811, appendix B.8';
const N22 = 'NIST SP 811, appendix B.8, footnote 22';
const N23 = 'NIST SP 811, appendix B.8, footnote 23';
const PREFIXES = 'NIST SP 811, table 5 (SI prefixes), from memory';
const COHERENT = 'NIST SP 811, tables 1 and 3 (SI units are coherent), from memory';
const ACCEPTED = 'NIST SP 811, table 6 (units accepted for use with the SI), from memory';

/** Printed as there: in bold type where it is exact (here "exact"), otherwise rounded to the digits that are shown. */
type Row = readonly [text: string, printed: string, source: string, exact?: 'exact'];

const rows: readonly Row[] = [
  ['m', '1 E+00', COHERENT, 'exact'],
  ['kg', '1 E+00', COHERENT, 'exact'],
  ['s', '1 E+00', COHERENT, 'exact'],
  ['N', '1 E+00', COHERENT, 'exact'],
  ['Pa', '1 E+00', COHERENT, 'exact'],
  ['rad', '1 E+00', COHERENT, 'exact'],
  ['mm', '1 E-03', PREFIXES, 'exact'],
  ['cm', '1 E-02', PREFIXES, 'exact'],
  ['km', '1 E+03', PREFIXES, 'exact'],
  ['g', '1 E-03', PREFIXES, 'exact'],
  ['kN', '1 E+03', PREFIXES, 'exact'],
  ['MN', '1 E+06', PREFIXES, 'exact'],
  ['kPa', '1 E+03', PREFIXES, 'exact'],
  ['MPa', '1 E+06', PREFIXES, 'exact'],
  ['GPa', '1 E+09', PREFIXES, 'exact'],
  ['mrad', '1 E-03', PREFIXES, 'exact'],
  ['t', '1.0 E+03', B8, 'exact'],
  ['°', '1.745 329 E-02', ACCEPTED],
  ['%', '1 E-02', 'NIST SP 811, section 7.10.2 (the symbol % is the number 0.01), from memory', 'exact'],

  ['ft', '3.048 E-01', B8, 'exact'],
  ['in', '2.54 E-02', B8, 'exact'],
  ['yd', '9.144 E-01', B8, 'exact'],
  ['ft²', '9.290 304 E-02', B8, 'exact'],
  ['in²', '6.4516 E-04', B8, 'exact'],
  ['yd²', '8.361 274 E-01', B8],
  ['ft³', '2.831 685 E-02', B8],
  ['lb', '4.535 924 E-01', B8],
  ['lb', '4.535 923 7 E-01', N22, 'exact'],
  ['lb/ft', '1.488 164 E+00', B8],
  ['lb/in', '1.785 797 E+01', B8],
  ['lb/ft²', '4.882 428 E+00', B8],
  ['lb/ft³', '1.601 846 E+01', B8],
  ['lb/in³', '2.767 990 E+04', B8],
  ['lb/yd³', '5.932 764 E-01', B8],
  ['lb·ft²', '4.214 011 E-02', B8],
  ['lbf', '4.448 222 E+00', B8],
  ['lbf', '4.448 221 615 260 5 E+00', N23, 'exact'],
  ['lbf/lb', '9.806 65 E+00', B8, 'exact'],
  ['kip', '4.448 222 E+03', B8],
  ['psi', '6.894 757 E+03', B8],
  ['lbf/in²', '6.894 757 E+03', B8],
  ['ksi', '6.894 757 E+06', B8],
  ['kip/in²', '6.894 757 E+06', B8],
  ['psf', '4.788 026 E+01', B8],
  ['lbf/ft²', '4.788 026 E+01', B8],
  ['plf', '1.459 390 E+01', B8],
  ['lbf/ft', '1.459 390 E+01', B8],
  ['lbf/in', '1.751 268 E+02', B8],
  ['lbf·ft', '1.355 818 E+00', B8],
  ['lbf·in', '1.129 848 E-01', B8],
  ['lbf·ft/in', '5.337 866 E+01', B8],
  ['lbf·in/in', '4.448 222 E+00', B8],
  // A thousand times the row of lbf/ft: the kip per foot has no row of its own.
  ['klf', '1.459 390 E+04', B8],
];

/** The figure of "1.459 390 E+01" and half a unit of its last digit. */
function printedFigure(printed: string): { figure: number; half: number } {
  const [mantissa = '', power = ''] = printed.replace(/ (?=\d)/g, '').split(' E');
  const decimals = mantissa.split('.')[1]?.length ?? 0;
  return { figure: Number(`${mantissa}e${power}`), half: 0.5 * 10 ** (Number(power) - decimals) };
}

describe('one of a unit in SI units', () => {
  it.each(rows.map(([text, printed, source, exact]) => ({ text, printed, source, exact })))(
    '$text is $printed ($source)',
    ({ text, printed, exact }) => {
      const factor = findUnit(text)?.factor ?? Number.NaN;
      const { figure, half } = printedFigure(printed);
      // What is exact is a product of definitions, each multiplication of which rounds once.
      const allowed = exact === 'exact' ? figure * 4 * Number.EPSILON : half * (1 + 1e-9);
      expect(Math.abs(factor - figure)).toBeLessThanOrEqual(allowed);
    },
  );

  it('is checked for every unit that can be typed', () => {
    const checked = new Set(rows.map(([text]) => text));
    expect(allUnits.map(({ symbol }) => symbol).filter((symbol) => !checked.has(symbol))).toEqual([]);
  });
});
