import { nameDimension } from './dimension.ts';
import type { Measure, System } from './measure.ts';
import { findUnit, PLAIN, type Unit } from './unit.ts';

/** Thrown where a text is no quantity, or another one than is wanted; the message says what to write. */
export class QuantityError extends Error {
  override name = 'QuantityError';
}

/** A quantity as it was written. */
export interface Quantity {
  /** In SI units. */
  readonly value: number;
  readonly unit: Unit;
}

const NUMBER =
  /^([-+]?)(\d+(?:\.\d*)?|\.\d+)(?:[eE]([-+]?\d+)|\s*[×x]\s*10(?:\^([-+]?\d+)|([⁻⁺]?[⁰¹²³⁴-⁹]+)))?/;
const FEET = String.raw`\s*(?:ft|foot|feet|'|′)`;
const INCHES = String.raw`\s*(?:in|inch|inches|"|″)`;
const FRACTION = String.raw`(\d+)/(\d+)`;
const FEET_AND_INCHES = new RegExp(
  String.raw`^([-+]?)(\d+)${FEET}[\s-]*(?:(\d+(?:\.\d+)?)(?:\s+${FRACTION})?|${FRACTION})${INCHES}$`,
);
const INCHES_AND_FRACTION = new RegExp(String.raw`^([-+]?)(?:(\d+)\s+)?${FRACTION}${INCHES}$`);
const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/**
 * Reads a quantity with its unit: "32 m", "105 ft", "31 ft 6 in", "1.2 kN/m²", "25 psf", "12.5°", "−3e-2 kN".
 *
 * @throws QuantityError where it is no number with a known unit.
 */
export function readQuantity(text: string): Quantity {
  const tidy = text
    .trim()
    .replace(/[\u00a0\u2009\u202f]/g, ' ')
    .replace(/\u2212/g, '-');
  const imperial = readFeetAndInches(tidy);
  if (imperial !== undefined) return imperial;
  const match = NUMBER.exec(tidy);
  if (match === null) {
    throw new QuantityError(
      tidy === ''
        ? 'nothing is written: write a figure with its unit'
        : `"${clip(text)}" does not begin with a figure`,
    );
  }
  const rest = tidy.slice(match[0].length);
  if (/^\s*,\s*\d/.test(rest)) {
    throw new QuantityError(
      `"${clip(text)}" has a comma: write the decimal sign as a point and no thousands`,
    );
  }
  const raised = (match[5] ?? '')
    .replace(/[⁰¹²³⁴-⁹]/g, (digit) => String(SUPERSCRIPTS.indexOf(digit)))
    .replace('⁻', '-')
    .replace('⁺', '+');
  const exponent = match[3] ?? match[4] ?? raised;
  const figure = finite(Number(`${match[1]}${match[2]}${exponent === '' ? '' : `e${exponent}`}`), text);
  const symbol = rest.trim();
  const unit = symbol === '' ? PLAIN : findUnit(symbol);
  if (unit === undefined) {
    throw new QuantityError(
      `"${clip(symbol)}" is no unit that is known here: write for example m, ft, kN, kip or °`,
    );
  }
  return { value: finite(figure * unit.factor, text), unit };
}

function readFeetAndInches(tidy: string): Quantity | undefined {
  const both = FEET_AND_INCHES.exec(tidy);
  const inches = both === null ? INCHES_AND_FRACTION.exec(tidy) : null;
  const found = both ?? inches;
  if (found === null) return undefined;
  const [sign, feet, whole, above, below] =
    both !== null
      ? [both[1], both[2], both[3] ?? 0, both[4] ?? both[6] ?? 0, both[5] ?? both[7] ?? 1]
      : [found[1], 0, found[2] ?? 0, found[3], found[4]];
  if (Number(below) === 0) throw new QuantityError(`"${clip(tidy)}" divides an inch by nothing`);
  const total = Number(feet) * 12 + Number(whole) + Number(above) / Number(below);
  const value = (sign === '-' ? -total : total) * 0.0254;
  return { value: finite(value, tidy), unit: findUnit(both !== null ? 'ft' : 'in') ?? PLAIN };
}

/**
 * Reads a quantity of the measure that is wanted.
 *
 * @param assume the system whose unit a figure without one is in; without it a missing unit is an error.
 * @throws QuantityError that says what was found and what is wanted: "a force where a length is wanted".
 */
export function readMeasure(text: string, wanted: Measure, assume?: System): Quantity {
  const found = readQuantity(text);
  const bare = found.unit === PLAIN;
  if (bare && wanted.units.SI !== PLAIN) {
    const unit = wanted.units[assume ?? 'SI'];
    if (assume === undefined) {
      const gap = unit.symbol === '°' ? '' : ' ';
      throw new QuantityError(
        `"${clip(text)}" has no unit where ${wanted.called} is wanted: write for example "${clip(text.trim())}${gap}${unit.symbol}"`,
      );
    }
    return { value: finite(found.value * unit.factor, text), unit };
  }
  if (found.unit.dimension !== wanted.dimension || found.unit.angular !== (wanted.name === 'angle')) {
    const is = found.unit.angular ? 'an angle' : nameDimension(found.unit.dimension);
    const hint =
      wanted.name === 'force' && /^(kg|g|t|lb)$/.test(found.unit.symbol)
        ? ' (a force is in kN, N, lbf, kip)'
        : '';
    throw new QuantityError(`"${clip(text)}" is ${is} where ${wanted.called} is wanted${hint}`);
  }
  return found;
}

/** The value, where it is one: a figure that is too large for the machine would pass for infinity. */
function finite(value: number, text: string): number {
  if (!Number.isFinite(value)) throw new QuantityError(`"${clip(text)}" is too large a figure`);
  return value;
}

function clip(text: string): string {
  return text.length <= 40 ? text : `${text.slice(0, 39)}…`;
}
