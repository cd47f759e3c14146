import {
  type Dimension,
  NONE,
  powerDimension,
  productDimension,
  quotientDimension,
} from '../quantity/index.ts';
import type { Scalar } from './scalar.ts';

/** The operations by number, as tapes hold them. The interpreter's cases and the kernels follow this order. */
export const Op = {
  input: 0,
  constant: 1,
  mark: 2,
  add: 3,
  subtract: 4,
  multiply: 5,
  divide: 6,
  negate: 7,
  absolute: 8,
  squareRoot: 9,
  sine: 10,
  cosine: 11,
  arctangent: 12,
  exponential: 13,
  logarithm: 14,
  power: 15,
  below: 16,
  atMost: 17,
  choose: 18,
  guard: 19,
  guardSlope: 20,
  damp: 21,
} as const;

export type OpCode = (typeof Op)[keyof typeof Op];

/**
 * All that an operation is, apart from how fast it runs: its value (the reference that every way of running
 * is tested against), its dimension, and the partial derivative by each operand, written as operations.
 */
export interface Operation {
  readonly name: string;
  readonly operands: 0 | 1 | 2 | 3;
  /** True where a ∘ b is b ∘ a to the last bit. */
  readonly commutes?: true;
  value(a: number, b: number, c: number): number;
  dimension(a: Dimension, b: Dimension): Dimension;
  /**
   * Partial derivative by each operand, given the result and the operands. Undefined where it is none or where
   * `derivative.ts` and `gradient.ts` have a rule of their own (mark, choose, guards, damp).
   */
  partials?(result: Scalar, a: Scalar, b: Scalar): (Scalar | undefined)[];
}

const same = (a: Dimension): Dimension => a;
const none = (): Dimension => NONE;
const one = (like: Scalar): Scalar => like.trace.constant(1, NONE);

/** The table of operations, by number. */
export const operations: readonly Operation[] = [
  { name: 'input', operands: 0, value: () => Number.NaN, dimension: same },
  { name: 'constant', operands: 0, value: () => Number.NaN, dimension: same },
  // A value that is followed as a variable of its own: never shared with an equal one.
  { name: 'mark', operands: 1, value: (a) => a, dimension: same },
  {
    name: 'add',
    operands: 2,
    commutes: true,
    value: (a, b) => a + b,
    dimension: same,
    partials: (_, a) => [one(a), one(a)],
  },
  {
    name: 'subtract',
    operands: 2,
    value: (a, b) => a - b,
    dimension: same,
    partials: (_, a) => [one(a), one(a).negated()],
  },
  {
    name: 'multiply',
    operands: 2,
    commutes: true,
    value: (a, b) => a * b,
    dimension: productDimension,
    partials: (_, a, b) => [b, a],
  },
  {
    name: 'divide',
    operands: 2,
    value: (a, b) => a / b,
    dimension: quotientDimension,
    partials: (result, a, b) => [one(a).over(b), result.over(b).negated()],
  },
  {
    name: 'negate',
    operands: 1,
    value: (a) => -a,
    dimension: same,
    partials: (_, a) => [one(a).negated()],
  },
  {
    name: 'absolute',
    operands: 1,
    value: (a) => Math.abs(a),
    dimension: same,
    partials: (_, a) => [a.below(0).choose(one(a).negated(), one(a))],
  },
  {
    name: 'squareRoot',
    operands: 1,
    value: (a) => Math.sqrt(a),
    dimension: (a) => powerDimension(a, 0.5),
    partials: (result, a) => [a.trace.constant(0.5, NONE).over(result)],
  },
  {
    name: 'sine',
    operands: 1,
    value: (a) => Math.sin(a),
    dimension: none,
    partials: (_, a) => [a.cosine()],
  },
  {
    name: 'cosine',
    operands: 1,
    value: (a) => Math.cos(a),
    dimension: none,
    partials: (_, a) => [a.sine().negated()],
  },
  {
    name: 'arctangent',
    operands: 2,
    value: (a, b) => Math.atan2(a, b),
    dimension: none,
    partials: (_, y, x) => {
      const square = x.squared().plus(y.squared());
      return [x.over(square), y.over(square).negated()];
    },
  },
  {
    name: 'exponential',
    operands: 1,
    value: (a) => Math.exp(a),
    dimension: none,
    partials: (result) => [result],
  },
  {
    name: 'logarithm',
    operands: 1,
    value: (a) => Math.log(a),
    dimension: none,
    partials: (_, a) => [one(a).over(a)],
  },
  {
    // The exponent is a constant of the trace, since the dimension depends on it.
    name: 'power',
    operands: 2,
    value: (a, b) => a ** b,
    dimension: same,
    partials: (_, a, b) => {
      const exponent = a.trace.constantAt(b.index) ?? Number.NaN;
      return [a.power(exponent - 1).times(exponent), undefined];
    },
  },
  // A comparison with a value that waits is neither yes nor no: it waits too.
  { name: 'below', operands: 2, value: (a, b) => (a < b ? 1 : a >= b ? 0 : Number.NaN), dimension: none },
  { name: 'atMost', operands: 2, value: (a, b) => (a <= b ? 1 : a > b ? 0 : Number.NaN), dimension: none },
  {
    name: 'choose',
    operands: 3,
    value: (a, b, c) => (a === 1 ? b : a === 0 ? c : Number.NaN),
    dimension: (_, b) => b,
  },
  { name: 'guard', operands: 2, value: (a, b) => (b === 1 ? a : Number.NaN), dimension: same },
  { name: 'guardSlope', operands: 2, value: (a) => a, dimension: same },
  // A product in which 0 wins over infinity and NaN: what was not chosen passes nothing back.
  { name: 'damp', operands: 2, value: (a, b) => (a === 0 ? 0 : a * b), dimension: productDimension },
];

/** The table's row of a number. */
export function operation(code: number): Operation {
  const found = operations[code];
  if (found === undefined) throw new Error(`no operation has the number ${code}`);
  return found;
}

/** The dimension of a result, where the exponent of a power has to be known. */
export function resultDimension(code: number, a: Dimension, b: Dimension, exponent: number): Dimension {
  if (code === Op.power) return powerDimension(a, exponent);
  return operation(code).dimension(a, b);
}
