import {
  AREA,
  AREA_LOAD,
  baseUnits,
  DENSITY,
  type Dimension,
  FORCE,
  LENGTH,
  LINE_LOAD,
  MASS,
  MOMENT,
  NONE,
  nameDimension,
  TIME,
  VOLUME,
} from './dimension.ts';
import { findUnit, PLAIN, type Unit } from './unit.ts';

/** The two systems of units that the program speaks: the SI and US customary. */
export type System = 'SI' | 'US';

/**
 * What sort of quantity a figure is, for reading and printing. Two measures may share a dimension
 * (an angle and a plain number; an area load and a stress) and yet be printed in other units.
 */
export interface Measure {
  readonly name: string;
  /** With its article, for queries: "a length". */
  readonly called: string;
  readonly dimension: Dimension;
  readonly units: Readonly<Record<System, Unit>>;
  /** The coherent SI unit, in which values are kept and written to JSON: "N·m". */
  readonly coherent: string;
  /** Decimals beyond which a figure means nothing to a person: 3 of a metre is a millimetre. */
  readonly decimals: number;
}

function unit(symbol: string): Unit {
  const found = symbol === '' ? PLAIN : findUnit(symbol);
  if (found === undefined) throw new Error(`no unit ${symbol}`);
  return found;
}

function measure(
  name: string,
  dim: Dimension,
  coherent: string,
  [si, us]: readonly [si: string, us: string],
  decimals: number,
  called = nameDimension(dim),
): Measure {
  const made: Measure = {
    name,
    called,
    coherent,
    dimension: dim,
    units: { SI: unit(si), US: unit(us) },
    decimals,
  };
  return Object.freeze(made);
}

export const number = measure('number', NONE, '1', ['', ''], Number.POSITIVE_INFINITY);
export const angle = measure('angle', NONE, 'rad', ['°', '°'], 3, 'an angle');
export const length = measure('length', LENGTH, 'm', ['m', 'ft'], 3);
export const area = measure('area', AREA, 'm²', ['m²', 'ft²'], 4);
export const volume = measure('volume', VOLUME, 'm³', ['m³', 'ft³'], 4);
export const mass = measure('mass', MASS, 'kg', ['kg', 'lb'], 2);
export const time = measure('time', TIME, 's', ['s', 's'], 3);
export const force = measure('force', FORCE, 'N', ['kN', 'kip'], 3);
export const moment = measure('moment', MOMENT, 'N·m', ['kN·m', 'kip·ft'], 3);
export const lineLoad = measure('line load', LINE_LOAD, 'N/m', ['kN/m', 'klf'], 4);
export const areaLoad = measure('area load', AREA_LOAD, 'N/m²', ['kN/m²', 'psf'], 4);
export const density = measure('density', DENSITY, 'kg/m³', ['kg/m³', 'lb/ft³'], 2);

const byDimension = new Map<Dimension, Measure>(
  [number, length, area, volume, mass, time, force, moment, lineLoad, areaLoad, density].map((m) => [
    m.dimension,
    m,
  ]),
);

/** The measure that a bare dimension is taken for: force × length is a moment, force ÷ area an area load. */
export function measureOf(dim: Dimension): Measure {
  let known = byDimension.get(dim);
  if (known === undefined) {
    const base = baseUnits(dim);
    const si: Unit = { symbol: base, factor: 1, dimension: dim, angular: false };
    const decimals = Number.POSITIVE_INFINITY;
    const units = { SI: si, US: si };
    known = { name: base, called: nameDimension(dim), dimension: dim, units, coherent: base, decimals };
    byDimension.set(dim, known);
  }
  return known;
}
