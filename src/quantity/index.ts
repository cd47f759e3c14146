/** Floor 0: dimensions, units, reading and printing of quantities. */
export * from './dimension.ts';
export * as measures from './measure.ts';
export { type Measure, measureOf, type System } from './measure.ts';
export { type PrintOptions, printQuantity, writeQuantity } from './print.ts';
export { type Quantity, QuantityError, readMeasure, readQuantity } from './read.ts';
export { allUnits, findUnit, PLAIN, type Unit } from './unit.ts';
