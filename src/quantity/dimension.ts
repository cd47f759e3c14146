/**
 * The dimension of a quantity: its exponents of length, mass and time. An angle is a ratio of two lengths
 * and so has none. Dimensions are interned: two that are equal are the same object, so `===` compares them.
 */
export interface Dimension {
  readonly length: number;
  readonly mass: number;
  readonly time: number;
}

const interned = new Map<string, Dimension>();

/** The dimension length^`length` · mass^`mass` · time^`time`; exponents may be fractions (of a square root). */
export function dimension(length: number, mass: number, time: number): Dimension {
  const exponents = [length, mass, time].map(withoutRounding) as [number, number, number];
  const key = exponents.join();
  let known = interned.get(key);
  if (known === undefined) {
    const [l, m, t] = exponents;
    known = Object.freeze({ length: l, mass: m, time: t });
    interned.set(key, known);
  }
  return known;
}

/** An exponent to nine decimals: sums of fractions (0.1 + 0.2) must meet the fraction that they stand for (0.3). */
function withoutRounding(exponent: number): number {
  // Adding 0 turns −0 into 0.
  return Number.isInteger(exponent) ? exponent + 0 : Math.round(exponent * 1e9) / 1e9;
}

/** The dimension of a product. */
export function productDimension(a: Dimension, b: Dimension): Dimension {
  if (a === NONE) return b;
  if (b === NONE) return a;
  return dimension(a.length + b.length, a.mass + b.mass, a.time + b.time);
}

/** The dimension of a quotient. */
export function quotientDimension(a: Dimension, b: Dimension): Dimension {
  if (b === NONE) return a;
  return dimension(a.length - b.length, a.mass - b.mass, a.time - b.time);
}

/** The dimension of a power with the plain-number exponent `exponent`. */
export function powerDimension(a: Dimension, exponent: number): Dimension {
  return dimension(a.length * exponent, a.mass * exponent, a.time * exponent);
}

export const NONE: Dimension = dimension(0, 0, 0);
export const LENGTH: Dimension = dimension(1, 0, 0);
export const AREA: Dimension = dimension(2, 0, 0);
export const VOLUME: Dimension = dimension(3, 0, 0);
export const MASS: Dimension = dimension(0, 1, 0);
export const TIME: Dimension = dimension(0, 0, 1);
export const FORCE: Dimension = dimension(1, 1, -2);
/** Of a moment of a force, and of virtual work. */
export const MOMENT: Dimension = dimension(2, 1, -2);
/** Of a force per length. */
export const LINE_LOAD: Dimension = dimension(0, 1, -2);
/** Of a force per area: an area load, a pressure, a stress. */
export const AREA_LOAD: Dimension = dimension(-1, 1, -2);
export const DENSITY: Dimension = dimension(-3, 1, 0);

const names = new Map<Dimension, string>([
  [NONE, 'a plain number'],
  [LENGTH, 'a length'],
  [AREA, 'an area'],
  [VOLUME, 'a volume'],
  [MASS, 'a mass'],
  [TIME, 'a time'],
  [FORCE, 'a force'],
  [MOMENT, 'a moment'],
  [LINE_LOAD, 'a line load'],
  [AREA_LOAD, 'an area load'],
  [DENSITY, 'a density'],
]);

/** What a person calls the dimension, with its article: "a force", or "a quantity in m²·kg" where it has no name. */
export function nameDimension(d: Dimension): string {
  return names.get(d) ?? `a quantity in ${baseUnits(d)}`;
}

/** The dimension in SI base units, as a unit that can be read back: `m^2*kg/s^2` in signs, "m²·kg·s⁻²". */
export function baseUnits(d: Dimension): string {
  const parts = [
    ['m', d.length],
    ['kg', d.mass],
    ['s', d.time],
  ] as const;
  return parts
    .filter(([, exponent]) => exponent !== 0)
    .map(([symbol, exponent]) => (exponent === 1 ? symbol : symbol + superscript(exponent)))
    .join('·');
}

const RAISED: Record<string, string> = {
  '-': '⁻',
  0: '⁰',
  1: '¹',
  2: '²',
  3: '³',
  4: '⁴',
  5: '⁵',
  6: '⁶',
  7: '⁷',
  8: '⁸',
  9: '⁹',
};

/** An exponent in raised figures; a fraction, which has none, as `^0.5`. */
export function superscript(exponent: number): string {
  if (!Number.isInteger(exponent)) return `^${exponent}`;
  return [...String(exponent)].map((sign) => RAISED[sign] ?? sign).join('');
}
