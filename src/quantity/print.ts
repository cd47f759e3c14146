import { superscript } from './dimension.ts';
import type { Measure, System } from './measure.ts';
import type { Unit } from './unit.ts';

/** How a figure is printed. */
export interface PrintOptions {
  /** Significant figures; 4 where nothing is said. */
  readonly digits?: number;
  /** True to keep the significant figures of what is too small to matter in practice (a gap of 3×10⁻⁹ m). */
  readonly fine?: boolean;
}

const NO_BREAK_SPACE = '\u00a0';

/**
 * Prints a value for a person: rounded, with its unit behind a non-breaking space and a true minus sign.
 * What is printed reads back (`readMeasure`) to within half of its last digit.
 *
 * @param value in SI units; it must be finite, since no NaN may reach a screen.
 */
export function printQuantity(value: number, measure: Measure, system: System, options: PrintOptions = {}) {
  const unit = measure.units[system];
  const decimals = options.fine ? Number.POSITIVE_INFINITY : measure.decimals;
  return withUnit(printNumber(inUnit(value, unit), options.digits ?? 4, decimals), unit);
}

/** The figure in a unit; one that would be beyond the machine's largest, as in degrees of 1e308 radians, is that. */
function inUnit(value: number, unit: Unit): number {
  const figure = value / unit.factor;
  return Number.isFinite(value) && !Number.isFinite(figure) ? Math.sign(figure) * Number.MAX_VALUE : figure;
}

function withUnit(figure: string, unit: Unit): string {
  if (unit.symbol === '') return figure;
  return unit.symbol === '°' ? `${figure}°` : `${figure}${NO_BREAK_SPACE}${unit.symbol}`;
}

function printNumber(value: number, digits: number, mostDecimals: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`${value} is no figure to print`);
  const size = Math.abs(value);
  const sign = value < 0 ? '−' : '';
  if (size === 0) return '0';
  // Rounding may carry into another digit (9.9996 → 10.00), so the exponent is taken after rounding.
  const exponent = Number(size.toExponential(digits - 1).split('e')[1]);
  const wanted = Math.max(0, digits - 1 - exponent);
  if (wanted <= mostDecimals && (exponent < -4 || exponent > 14)) {
    const mantissa = size.toExponential(digits - 1).split('e')[0];
    return `${sign}${mantissa}×10${superscript(exponent)}`;
  }
  const figure = size.toFixed(Math.min(wanted, mostDecimals, 100));
  return Number(figure) === 0 ? '0' : sign + figure;
}

/**
 * Writes a value in a unit for a file or a field: as many digits as it needs to read back as the same value
 * to fifteen significant figures, plain signs ("-12.5 kN").
 */
export function writeQuantity(value: number, unit: Unit): string {
  const figure = Number((value / unit.factor).toPrecision(15));
  // Tested after rounding, which carries the largest figures of the machine over to infinity.
  if (!Number.isFinite(figure)) throw new RangeError(`${value} is no figure to write`);
  if (unit.symbol === '') return String(figure);
  return unit.symbol === '°' ? `${figure}°` : `${figure} ${unit.symbol}`;
}
