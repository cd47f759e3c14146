import { all, type BigNumber, create, type MathJsInstance, type MathNode } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { type Dimension, FORCE, LENGTH, MOMENT, NONE, quotientDimension } from '../../src/quantity/index.ts';
import {
  arctangent,
  derivative,
  evaluate,
  finish,
  gradient,
  guard,
  guardSlope,
  Op,
  operations,
  type Scalar,
  say,
  substitute,
  Trace,
} from '../../src/tape/index.ts';
import { randomFrom } from '../support/random.ts';

/** The reference: mathjs, its formulas differentiated by symbols and evaluated in 64 digits. */
const math: MathJsInstance = create(all, { number: 'BigNumber', precision: 64 });

interface Row {
  readonly op: keyof typeof Op | 'several';
  /** The operation as mathjs writes it, in x and y. */
  readonly formula: string;
  readonly write: (x: Scalar, y: Scalar) => Scalar;
  /** Where x and y are taken from: within the domain, off its edges. */
  readonly x: readonly [number, number];
  readonly y?: readonly [number, number];
  /** How many roundings of the largest term a second derivative may gather, where it is more than usual. */
  readonly roundings?: number;
}

const wide = [-5, 5] as const;
const never = say('never')`never`;

const rows: readonly Row[] = [
  { op: 'mark', formula: 'x * y', write: (x, y) => x.trace.mark(x).times(y), x: wide, y: wide },
  { op: 'add', formula: 'x + y', write: (x, y) => x.plus(y), x: wide, y: wide },
  { op: 'add', formula: '2 * x', write: (x) => x.plus(x), x: wide },
  { op: 'subtract', formula: 'x - y', write: (x, y) => x.minus(y), x: wide, y: wide },
  { op: 'multiply', formula: 'x * y', write: (x, y) => x.times(y), x: wide, y: wide },
  { op: 'multiply', formula: 'x ^ 2', write: (x) => x.squared(), x: wide },
  { op: 'divide', formula: 'x / y', write: (x, y) => x.over(y), x: wide, y: [0.5, 5] },
  { op: 'divide', formula: '3 / y', write: (x, y) => x.trace.constant(3, NONE).over(y), x: wide, y: [-5, -0.5] },
  { op: 'negate', formula: '-x', write: (x) => x.negated(), x: wide },
  { op: 'absolute', formula: 'abs(x)', write: (x) => x.absolute(), x: [0.1, 5] },
  { op: 'absolute', formula: 'abs(x)', write: (x) => x.absolute(), x: [-5, -0.1] },
  { op: 'absolute', formula: 'abs(x * y)', write: (x, y) => x.times(y).absolute(), x: [0.1, 5], y: [-5, -0.1] },
  { op: 'squareRoot', formula: 'sqrt(x)', write: (x) => x.squareRoot(), x: [0.1, 20] },
  { op: 'sine', formula: 'sin(x)', write: (x) => x.sine(), x: [-7, 7] },
  { op: 'cosine', formula: 'cos(x)', write: (x) => x.cosine(), x: [-7, 7] },
  // mathjs differentiates the arc tangent of one number only. The first formula holds right of the y axis, the
  // second (the half angle) everywhere but on the x axis.
  { op: 'arctangent', formula: 'atan(y / x)', write: (x, y) => arctangent(y, x), x: [0.3, 5], y: wide },
  {
    op: 'arctangent',
    formula: '2 * atan((sqrt(x^2 + y^2) - x) / y)',
    write: (x, y) => arctangent(y, x),
    x: wide,
    y: [0.3, 5],
  },
  {
    op: 'arctangent',
    formula: '2 * atan((sqrt(x^2 + y^2) - x) / y)',
    write: (x, y) => arctangent(y, x),
    x: wide,
    y: [-5, -0.3],
  },
  { op: 'exponential', formula: 'exp(x)', write: (x) => x.exponential(), x: [-4, 4] },
  { op: 'logarithm', formula: 'log(x)', write: (x) => x.logarithm(), x: [0.1, 20] },
  ...[3, 4, 7, 0, 1].map((exponent) => power(exponent, wide)),
  ...[-1, -2, -3].flatMap((exponent) => [power(exponent, [0.4, 5]), power(exponent, [-5, -0.4])]),
  ...[0.5, 1.5, 2.5, -0.5, 1.7, 0.3].map((exponent) => power(exponent, [0.2, 5])),
  // Both sides of a choice, the other one without a value.
  {
    op: 'choose',
    formula: 'x * y',
    write: (x, y) => x.below(0).choose(x.squareRoot(), x.times(y)),
    x: [0.1, 5],
    y: wide,
  },
  {
    op: 'choose',
    formula: 'x * y',
    write: (x, y) => x.below(0).choose(x.times(y), x.squareRoot()),
    x: [-5, -0.1],
    y: wide,
  },
  { op: 'choose', formula: 'x ^ 2', write: (x, y) => x.times(x.most(y)), x: [2, 5], y: [-5, 1.9] },
  { op: 'choose', formula: 'x * y', write: (x, y) => x.times(x.least(y)), x: [2, 5], y: [-5, 1.9] },
  { op: 'guard', formula: 'x * y', write: (x, y) => guard(x, x.below(9), never).times(y), x: wide, y: wide },
  {
    op: 'guardSlope',
    formula: 'x * y',
    write: (x, y) => guardSlope(x, x.below(9), never).times(y),
    x: wide,
    y: wide,
  },
  {
    op: 'damp',
    formula: 'x ^ 2 * y',
    write: (x, y) => x.trace.apply(Op.damp, x.squared(), y),
    x: [0.1, 5],
    y: wide,
  },
  {
    op: 'several',
    formula: 'sin(x * y) / (1 + x^2)',
    write: (x, y) => x.times(y).sine().over(x.squared().plus(1)),
    x: [-2, 2],
    y: [-2, 2],
  },
  {
    op: 'several',
    formula: 'sqrt(x^2 + y^2) * exp(-x)',
    write: (x, y) => x.squared().plus(y.squared()).squareRoot().times(x.negated().exponential()),
    x: [0.5, 3],
    y: [-3, 3],
  },
  {
    op: 'several',
    formula: 'log(1 + exp(x - y)) ^ 3',
    write: (x, y) => x.minus(y).exponential().plus(1).logarithm().power(3),
    x: [-3, 3],
    y: [-3, 3],
  },
  {
    op: 'several',
    formula: 'atan(x * cos(y)) - x / (2 + sin(y))',
    write: (x, y) =>
      arctangent(x.times(y.cosine()), x.trace.constant(1, NONE)).minus(x.over(y.sine().plus(2))),
    x: [-3, 3],
    y: [-7, 7],
  },
];

function power(exponent: number, x: readonly [number, number]): Row {
  return { op: 'power', formula: `x ^ ${exponent}`, write: (base) => base.power(exponent), x };
}
export { rows, math };
describe('probe', () => {
  it('measures', () => {
    for (const row of rows) {
      const trace = new Trace();
      const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
      const value = row.write(x, y);
      const first = derivative([value], x).concat(derivative([value], y));
      const g = gradient(value, [x, y]);
      const second = [x, y].flatMap((by) => derivative(first, by));
      const back2 = first.flatMap((f) => gradient(f, [x, y]));
      const gg = g.flatMap((f) => gradient(f, [x, y]));
      const tape = finish(trace, [value, ...first, ...second, ...g, ...back2, ...gg]);
      const random = randomFrom(rows.indexOf(row));
      const f = math.parse(row.formula);
      const fx = math.derivative(f, 'x'), fy = math.derivative(f, 'y');
      const refs = [f, fx, fy, math.derivative(fx, 'x'), math.derivative(fy, 'x'), math.derivative(fx, 'y'), math.derivative(fy, 'y')];
      const want = [0, 1, 2, 3, 4, 5, 6, 1, 2, 3, 5, 4, 6, 3, 5, 4, 6];
      const worst = want.map(() => 0);
      for (let i = 0; i < 40; i++) {
        const a = Math.round(random(...row.x) * 1024) / 1024, b = Math.round(random(...(row.y ?? [1, 2])) * 1024) / 1024;
        const at = { x: math.bignumber(a), y: math.bignumber(b) };
        const got = evaluate(tape, [a, b]);
        const w = refs.map((r) => Number(r.evaluate(at)));
        want.forEach((k, j) => {
          const e = Math.abs(got[j]! - w[k]!) / Math.max(1, Math.abs(w[k]!)) / 2 ** -52;
          if (!(e <= worst[j]!)) worst[j] = e;
        });
      }
      console.log(row.op, row.formula, worst.map((w) => w.toFixed(1)).join(' '));
    }
  });
});
