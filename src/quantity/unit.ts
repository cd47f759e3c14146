import {
  AREA_LOAD,
  type Dimension,
  FORCE,
  LENGTH,
  LINE_LOAD,
  MASS,
  NONE,
  powerDimension,
  productDimension,
  TIME,
} from './dimension.ts';

/** A unit as it is written, and how many SI units one of it is. */
export interface Unit {
  readonly symbol: string;
  /** Value in SI = figure × factor. */
  readonly factor: number;
  readonly dimension: Dimension;
  /** True of the degree and the radian, which have no dimension and yet are not plain numbers. */
  readonly angular: boolean;
}

// Exact by definition: the international foot and pound, and the standard acceleration of free fall that
// makes a pound of mass a pound-force (NIST SP 811, appendix B).
const FOOT = 0.3048;
const INCH = 0.0254;
const POUND = 0.45359237;
const POUND_FORCE = POUND * 9.80665;

/** Symbol, factor to SI, dimension, other ways that people type it. */
type Row = readonly [symbol: string, factor: number, dimension: Dimension, ...aliases: string[]];

const rows: readonly Row[] = [
  ['m', 1, LENGTH],
  ['mm', 1e-3, LENGTH],
  ['cm', 1e-2, LENGTH],
  ['km', 1e3, LENGTH],
  ['ft', FOOT, LENGTH, "'", '′', 'foot', 'feet'],
  ['in', INCH, LENGTH, '"', '″', 'inch', 'inches'],
  ['yd', 3 * FOOT, LENGTH],
  ['kg', 1, MASS],
  ['g', 1e-3, MASS],
  ['t', 1e3, MASS],
  ['lb', POUND, MASS],
  ['s', 1, TIME],
  ['N', 1, FORCE],
  ['kN', 1e3, FORCE],
  ['MN', 1e6, FORCE],
  ['lbf', POUND_FORCE, FORCE],
  ['kip', 1e3 * POUND_FORCE, FORCE, 'kips'],
  ['Pa', 1, AREA_LOAD],
  ['kPa', 1e3, AREA_LOAD],
  ['MPa', 1e6, AREA_LOAD],
  ['GPa', 1e9, AREA_LOAD],
  ['psf', POUND_FORCE / FOOT ** 2, AREA_LOAD],
  ['psi', POUND_FORCE / INCH ** 2, AREA_LOAD],
  ['ksi', (1e3 * POUND_FORCE) / INCH ** 2, AREA_LOAD],
  ['plf', POUND_FORCE / FOOT, LINE_LOAD],
  ['klf', (1e3 * POUND_FORCE) / FOOT, LINE_LOAD],
  ['%', 1e-2, NONE],
  ['°', Math.PI / 180, NONE, 'deg', 'degrees'],
  ['rad', 1, NONE],
  ['mrad', 1e-3, NONE],
];

const ANGULAR = new Set(['°', 'rad', 'mrad']);

const units = new Map<string, Unit>();
for (const [symbol, factor, dim, ...aliases] of rows) {
  const unit: Unit = Object.freeze({ symbol, factor, dimension: dim, angular: ANGULAR.has(symbol) });
  for (const spelling of [symbol, ...aliases]) units.set(spelling, unit);
}

/** Every unit that can be read, once each, in the order of the table. */
export const allUnits: readonly Unit[] = [...new Set(units.values())];

/** The plain number's unit: none at all. */
export const PLAIN: Unit = Object.freeze({ symbol: '', factor: 1, dimension: NONE, angular: false });

const LOWERED: Record<string, string> = {
  '⁻': '-',
  '⁰': '0',
  '¹': '1',
  '²': '2',
  '³': '3',
  '⁴': '4',
  '⁵': '5',
  '⁶': '6',
  '⁷': '7',
  '⁸': '8',
  '⁹': '9',
};

const FACTOR = /^([^\d\s^*·/.⁻⁰¹²³⁴-⁹-]+)(?:\^?(-?\d{1,2}(?:\.\d+)?)|([⁻⁰¹²³⁴-⁹]{1,3}))?$/;

/**
 * Reads a unit such as `kN/m²`, `kN·m`, `kip*ft`, `m^2`. Everything behind the first slash divides.
 * Returns undefined where it is no unit.
 */
export function findUnit(text: string): Unit | undefined {
  const plain = units.get(text);
  if (plain !== undefined) return plain;
  const [above = '', ...below] = text.split('/');
  let factor = 1;
  let dim = NONE;
  let angle = 0;
  for (const [part, sign] of [[above, 1] as const, ...below.map((part) => [part, -1] as const)]) {
    // "1/m" has nothing above its slash; anywhere else a 1 is a figure that went astray.
    if (sign === 1 && part.trim() === '1' && below.length > 0) continue;
    for (const piece of part.trim().split(/[*·⋅\s]+/)) {
      const match = FACTOR.exec(piece);
      const unit = match === null ? undefined : units.get(match[1] ?? '');
      if (match === null || unit === undefined) return undefined;
      const raised = [...(match[3] ?? '')].map((digit) => LOWERED[digit]).join('');
      const exponent = sign * Number(match[2] ?? (raised || 1));
      if (!Number.isFinite(exponent)) return undefined;
      factor *= unit.factor ** exponent;
      dim = productDimension(dim, powerDimension(unit.dimension, exponent));
      if (unit.angular) angle += exponent;
    }
  }
  // Powers that leave the range of the machine would turn every figure into 0 or infinity.
  if (factor === 0 || !Number.isFinite(factor)) return undefined;
  return { symbol: text, factor, dimension: dim, angular: angle === 1 && dim === NONE };
}
