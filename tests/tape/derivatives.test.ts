import { all, create, type FactoryFunctionMap, type MathJsInstance } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { NONE } from '../../src/quantity/index.ts';
import {
  arctangent,
  derivative,
  evaluate,
  finish,
  gradient,
  Op,
  operations,
  type Scalar,
  Trace,
} from '../../src/tape/index.ts';
import { randomFrom } from '../support/random.ts';

/** mathjs: symbolic derivatives, and arithmetic of 64 digits for differences. */
const math: MathJsInstance = create(all as FactoryFunctionMap);
const precise: MathJsInstance = create(all as FactoryFunctionMap, { number: 'BigNumber', precision: 64 });

interface Row {
  readonly op: keyof typeof Op;
  /** The operation as mathjs writes it, in x and y. */
  readonly formula: string;
  readonly write: (x: Scalar, y: Scalar) => Scalar;
  /** Where x and y are taken from: within the domain, off its edges. */
  readonly x: readonly [number, number];
  readonly y?: readonly [number, number];
}

const rows: readonly Row[] = [
  { op: 'add', formula: 'x + y', write: (x, y) => x.plus(y), x: [-5, 5], y: [-5, 5] },
  { op: 'subtract', formula: 'x - y', write: (x, y) => x.minus(y), x: [-5, 5], y: [-5, 5] },
  { op: 'multiply', formula: 'x * y', write: (x, y) => x.times(y), x: [-5, 5], y: [-5, 5] },
  { op: 'divide', formula: 'x / y', write: (x, y) => x.over(y), x: [-5, 5], y: [0.5, 5] },
  { op: 'negate', formula: '-x', write: (x) => x.negated(), x: [-5, 5] },
  { op: 'absolute', formula: 'abs(x)', write: (x) => x.absolute(), x: [0.1, 5] },
  { op: 'absolute', formula: 'abs(x)', write: (x) => x.absolute(), x: [-5, -0.1] },
  { op: 'squareRoot', formula: 'sqrt(x)', write: (x) => x.squareRoot(), x: [0.1, 20] },
  { op: 'sine', formula: 'sin(x)', write: (x) => x.sine(), x: [-7, 7] },
  { op: 'cosine', formula: 'cos(x)', write: (x) => x.cosine(), x: [-7, 7] },
  // For x > 0 the angle of (x, y) is the arc tangent of y/x, which mathjs can differentiate.
  { op: 'arctangent', formula: 'atan(y / x)', write: (x, y) => arctangent(y, x), x: [0.3, 5], y: [-5, 5] },
  { op: 'exponential', formula: 'exp(x)', write: (x) => x.exponential(), x: [-4, 4] },
  { op: 'logarithm', formula: 'log(x)', write: (x) => x.logarithm(), x: [0.1, 20] },
  { op: 'power', formula: 'x ^ 3', write: (x) => x.power(3), x: [-5, 5] },
  { op: 'power', formula: 'x ^ -2', write: (x) => x.power(-2), x: [0.4, 5] },
  { op: 'power', formula: 'x ^ 1.7', write: (x) => x.power(1.7), x: [0.2, 5] },
  { op: 'mark', formula: 'x * y', write: (x, y) => x.trace.mark(x).times(y), x: [-5, 5], y: [-5, 5] },
  {
    op: 'choose',
    formula: 'x * y',
    write: (x, y) => x.below(0).choose(x.times(y).negated(), x.times(y)),
    x: [0.1, 5],
    y: [-5, 5],
  },
  {
    op: 'damp',
    formula: 'x * y',
    write: (x, y) => x.trace.apply(Op.damp, x, y),
    x: [0.1, 5],
    y: [-5, 5],
  },
];

/** Operations that have no slope, or pass it through; guards have tests of their own. */
const WITHOUT = new Set(['input', 'constant', 'below', 'atMost', 'guard', 'guardSlope']);

/** What rounding may do to a derivative of a few operations of this size. */
const ROUNDING = 1e-12;

describe.each(rows)('$op as $formula', (row) => {
  const trace = new Trace();
  const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
  const value = row.write(x, y);
  const [byX] = derivative([value], x) as [Scalar];
  const [byY] = derivative([value], y) as [Scalar];
  const [byXX] = derivative([byX], x) as [Scalar];
  const [byXY] = derivative([byX], y) as [Scalar];
  const [backX, backY] = gradient(value, [x, y]) as [Scalar, Scalar];
  const tape = finish(trace, [value, byX, byY, byXX, byXY, backX, backY]);
  const random = randomFrom(rows.indexOf(row));
  const points = Array.from({ length: 40 }, () => [random(...row.x), random(...(row.y ?? [1, 2]))] as const);
  const close = (found: number | undefined, wanted: number): void => {
    expect(Math.abs((found ?? Number.NaN) - wanted)).toBeLessThanOrEqual(
      ROUNDING * Math.max(1, Math.abs(wanted)),
    );
  };

  it("has mathjs's symbolic first and second derivatives", () => {
    const first = { x: math.derivative(row.formula, 'x'), y: math.derivative(row.formula, 'y') };
    const second = { xx: math.derivative(first.x, 'x'), xy: math.derivative(first.x, 'y') };
    for (const [a, b] of points) {
      const at = { x: a, y: b };
      const [v, dx, dy, dxx, dxy] = evaluate(tape, [a, b]);
      close(v, math.evaluate(row.formula, at));
      close(dx, first.x.evaluate(at));
      close(dy, first.y.evaluate(at));
      close(dxx, second.xx.evaluate(at));
      close(dxy, second.xy.evaluate(at));
    }
  });

  it('has the slope of central differences in 64 digits', () => {
    const compiled = precise.compile(row.formula);
    const step = precise.bignumber('1e-20');
    for (const [a, b] of points.slice(0, 12)) {
      const [, dx, dy] = evaluate(tape, [a, b]);
      const at = { x: precise.bignumber(a), y: precise.bignumber(b) };
      for (const [name, found] of [
        ['x', dx],
        ['y', dy],
      ] as const) {
        const above = compiled.evaluate({ ...at, [name]: precise.add(at[name], step) });
        const below = compiled.evaluate({ ...at, [name]: precise.subtract(at[name], step) });
        close(found, Number(precise.divide(precise.subtract(above, below), precise.multiply(step, 2))));
      }
    }
  });

  it('gives backwards what it gives forwards', () => {
    for (const [a, b] of points) {
      const [, dx, dy, , , gx, gy] = evaluate(tape, [a, b]);
      close(gx, dx as number);
      close(gy, dy as number);
    }
  });
});

it('is tested for every operation that has a slope', () => {
  const tested = new Set<string>(rows.map(({ op }) => op));
  expect(
    operations.map(({ name }) => name).filter((name) => !tested.has(name) && !WITHOUT.has(name)),
  ).toEqual([]);
});

describe('a derivative', () => {
  it('taken at another place is the derivative there', () => {
    const trace = new Trace();
    const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
    const p = trace.mark(x);
    const value = p
      .sine()
      .times(y)
      .plus(p.squared().over(y.plus(p)));
    const [there] = derivative([value], p, 0.3) as [Scalar];
    const [here] = derivative([value], p) as [Scalar];
    const tape = finish(trace, [there, here]);
    // Whatever x is, the first is the second's value at x = 0.3.
    expect(evaluate(tape, [1.7, 2])[0]).toBeCloseTo(evaluate(tape, [0.3, 2])[1] as number, 14);
    expect(evaluate(tape, [-8, 2])[0]).toBeCloseTo(evaluate(tape, [0.3, 2])[1] as number, 14);
  });

  it('by a mark does not reach what else the same input drives', () => {
    const trace = new Trace();
    const x = trace.input('x', NONE);
    const p = trace.mark(x);
    const [slope] = derivative([p.times(x)], p) as [Scalar];
    expect(evaluate(finish(trace, [slope]), [5])[0]).toBe(5);
    const [whole] = gradient(p.times(x), [x]) as [Scalar];
    expect(evaluate(finish(trace, [whole]), [5])[0]).toBe(10);
  });

  it('has the dimension of the output over the input', () => {
    const trace = new Trace();
    const x = trace.input('x', NONE);
    const [slope] = derivative([x.times(3)], x) as [Scalar];
    expect(slope.dimension).toBe(NONE);
  });
});

describe('a choice', () => {
  const trace = new Trace();
  const x = trace.input('x', NONE);
  // √x has no value below 0 and an unbounded slope at 0; where it is not chosen that must not be seen.
  const value = x.above(0).choose(x.squareRoot(), x.times(2));
  const [forward] = derivative([value], x) as [Scalar];
  const [backward] = gradient(value, [x]) as [Scalar];
  const tape = finish(trace, [value, forward, backward]);

  it.each([
    [4, 2, 0.25],
    [0, 0, 2],
    [-3, -6, 2],
  ])('at %d gives %d with the slope %d, forwards and backwards', (at, wanted, slope) => {
    expect([...evaluate(tape, [at])]).toEqual([wanted, slope, slope]);
  });
});
