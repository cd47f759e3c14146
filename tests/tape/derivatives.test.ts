import {
  all,
  type BigNumber,
  create,
  type FactoryFunctionMap,
  type MathJsInstance,
  type MathNode,
} from 'mathjs';
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
const math: MathJsInstance = create(all as FactoryFunctionMap, { number: 'BigNumber', precision: 64 });

/**
 * How far a slope may be from the reference, as a share of it or of 1: a slope of the table takes a handful of
 * operations, each off by one unit in the last place at the most. The worst that was seen is three.
 */
const ROUNDING = 8 * 2 ** -52;

interface Row {
  readonly op: keyof typeof Op | 'several';
  /** The operation as mathjs writes it, in x and y. */
  readonly formula: string;
  readonly write: (x: Scalar, y: Scalar) => Scalar;
  /** Where x and y are taken from: within the domain, off its edges. */
  readonly x: readonly [number, number];
  readonly y?: readonly [number, number];
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
  {
    op: 'divide',
    formula: '3 / y',
    write: (x, y) => x.trace.constant(3, NONE).over(y),
    x: wide,
    y: [-5, -0.5],
  },
  { op: 'negate', formula: '-x', write: (x) => x.negated(), x: wide },
  { op: 'absolute', formula: 'abs(x)', write: (x) => x.absolute(), x: [0.1, 5] },
  { op: 'absolute', formula: 'abs(x)', write: (x) => x.absolute(), x: [-5, -0.1] },
  {
    op: 'absolute',
    formula: 'abs(x * y)',
    write: (x, y) => x.times(y).absolute(),
    x: [0.1, 5],
    y: [-5, -0.1],
  },
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

/** Operations whose result does not follow their operands: sources, and comparisons, which are steps. */
const WITHOUT_SLOPE = ['input', 'constant', 'below', 'atMost'];

it('is tested for every operation that has a slope', () => {
  const tested = new Set<string>([...rows.map(({ op }) => op), ...WITHOUT_SLOPE]);
  expect(operations.map(({ name }) => name).filter((name) => !tested.has(name))).toEqual([]);
  // The lists go by the names in `Op`, the ways of running by its numbers: they must be the same operations.
  expect(operations.map(({ name }) => name)).toEqual(Object.keys(Op));
  expect(operations.map((_, code) => code)).toEqual(Object.values(Op));
});

interface Place {
  readonly x: number;
  readonly y: number;
}

/** A value and its derivatives: `xy` is first by x, then by y. */
const NAMES = ['value', 'x', 'y', 'xx', 'xy', 'yx', 'yy'] as const;
type Slopes = Record<(typeof NAMES)[number], number>;

function expectNear(found: number | undefined, wanted: number, what: string): void {
  const gap = Math.abs((found ?? Number.NaN) - wanted) / Math.max(1, Math.abs(wanted));
  expect(gap, `${what}: ${found}, not ${wanted}`).toBeLessThanOrEqual(ROUNDING);
}

/** The derivatives of a formula, found by the rules of calculus. */
function bySymbols(formula: string): (place: Place) => Slopes {
  // Simplifying takes mathjs most of a second for some, and changes no value.
  const by = (node: MathNode, name: string) => math.derivative(node, name, { simplify: false });
  const value = math.parse(formula);
  const [x, y] = [by(value, 'x'), by(value, 'y')];
  const all = { value, x, y, xx: by(x, 'x'), xy: by(x, 'y'), yx: by(y, 'x'), yy: by(y, 'y') };
  const compiled = NAMES.map((name) => [name, all[name].compile()] as const);
  return (place) => {
    const at = { x: math.bignumber(place.x), y: math.bignumber(place.y) };
    return Object.fromEntries(compiled.map(([name, code]) => [name, Number(code.evaluate(at))])) as Slopes;
  };
}

/** The derivatives of a formula as central differences: of 64 digits, a step of 10⁻¹⁶ leaves 32 that are right. */
function byDifferences(formula: string, place: Place): Slopes {
  const compiled = math.compile(formula);
  const step = math.bignumber('1e-16');
  const f = (i: number, j: number): BigNumber =>
    compiled.evaluate({
      x: math.bignumber(place.x).plus(step.times(i)),
      y: math.bignumber(place.y).plus(step.times(j)),
    });
  const value = f(0, 0);
  const [right, left, up, down] = [f(1, 0), f(-1, 0), f(0, 1), f(0, -1)];
  const mixed = f(1, 1).minus(f(1, -1)).minus(f(-1, 1)).plus(f(-1, -1)).div(step.times(step).times(4));
  const twice = (a: BigNumber, b: BigNumber): number =>
    Number(a.minus(value.times(2)).plus(b).div(step.times(step)));
  return {
    value: Number(value),
    x: Number(right.minus(left).div(step.times(2))),
    y: Number(up.minus(down).div(step.times(2))),
    xx: twice(right, left),
    xy: Number(mixed),
    yx: Number(mixed),
    yy: twice(up, down),
  };
}

describe.each(rows)('$op as $formula with x in $x', (row) => {
  const trace = new Trace();
  const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
  const value = row.write(x, y);
  const first = [...derivative([value], x), ...derivative([value], y)];
  const forward = [
    value,
    ...first,
    ...first.flatMap((slope) => [x, y].flatMap((by) => derivative([slope], by))),
  ];
  const random = randomFrom(rows.indexOf(row));
  // In 1024ths, which a decimal number holds exactly: the reference is then taken at the very same place.
  const figure = (from: number, to: number): number => Math.round(random(from, to) * 1024) / 1024;
  const places = Array.from({ length: 16 }, () => ({ x: figure(...row.x), y: figure(...(row.y ?? [1, 2])) }));
  const symbols = bySymbols(row.formula);
  const wanted = new Map(places.map((place) => [place, symbols(place)]));

  it('has the value and the derivatives, first and second, of its formula', () => {
    const tape = finish(trace, forward);
    for (const [place, slopes] of wanted) {
      const found = evaluate(tape, [place.x, place.y]);
      for (const [i, name] of NAMES.entries())
        expectNear(found[i], slopes[name], `${name} at ${place.x}, ${place.y}`);
    }
  });

  it('has the slopes of differences in 64 digits', () => {
    const tape = finish(trace, forward);
    for (const place of places.slice(0, 3)) {
      const found = evaluate(tape, [place.x, place.y]);
      const slopes = byDifferences(row.formula, place);
      for (const [i, name] of NAMES.entries())
        expectNear(found[i], slopes[name], `${name} at ${place.x}, ${place.y}`);
    }
  });

  it('has the same slopes backwards, and backwards of either', () => {
    const backward = gradient(value, [x, y]);
    const second = ['xx', 'xy', 'yx', 'yy'] as const;
    const ways: [string, readonly Scalar[]][] = [
      ['backwards of forwards', first.flatMap((slope) => gradient(slope, [x, y]))],
      ['forwards of backwards', backward.flatMap((slope) => [x, y].flatMap((by) => derivative([slope], by)))],
      ['backwards of backwards', backward.flatMap((slope) => gradient(slope, [x, y]))],
    ];
    const tape = finish(trace, [...backward, ...ways.flatMap(([, slopes]) => slopes)]);
    for (const [place, slopes] of wanted) {
      const found = evaluate(tape, [place.x, place.y]);
      expectNear(found[0], slopes.x, `x at ${place.x}, ${place.y}`);
      expectNear(found[1], slopes.y, `y at ${place.x}, ${place.y}`);
      for (const [i, [way]] of ways.entries()) {
        for (const [k, name] of second.entries())
          expectNear(found[2 + 4 * i + k], slopes[name], `${name} ${way} at ${place.x}, ${place.y}`);
      }
    }
  });

  it('moves in any direction by the gradient along it', () => {
    const [east, north] = [1.25, -0.75];
    const along = trace.mark(trace.constant(0, NONE));
    const moved = row.write(x.plus(along.times(east)), y.plus(along.times(north)));
    const tape = finish(trace, [...derivative([moved], along), ...gradient(value, [x, y])]);
    for (const place of places) {
      const [slope = Number.NaN, byX = Number.NaN, byY = Number.NaN] = evaluate(tape, [place.x, place.y]);
      const size = Math.max(1, Math.abs(byX * east) + Math.abs(byY * north));
      expect(Math.abs(slope - (byX * east + byY * north)) / size).toBeLessThanOrEqual(ROUNDING);
    }
  });

  it('has at another place the slope of that place, whatever the input is', () => {
    const other = new Trace();
    const [x2, y2, there] = [other.input('x', NONE), other.input('y', NONE), other.input('there', NONE)];
    const again = row.write(x2, y2);
    const [atInput] = derivative([again], x2, there) as [Scalar];
    const atConstants = places.map((place) => derivative([again], x2, place.x)[0] as Scalar);
    const elsewhere = finish(other, [atInput, ...atConstants]);
    const here = finish(trace, derivative([value], x));
    for (const [i, place] of places.entries()) {
      const [slope] = evaluate(here, [place.x, place.y]);
      const found = evaluate(elsewhere, [Number.NaN, place.y, place.x]);
      expect(found[0]).toBe(slope);
      // With a constant for its place the slope is folded while tracing, by the same operations.
      expect(found[1 + i]).toBe(slope);
    }
  });
});

describe('a comparison', () => {
  it('is a step: its slope is 0 both ways', () => {
    const trace = new Trace();
    const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
    for (const condition of [x.below(y), x.atMost(y), x.above(y).not(), x.below(0).and(y.below(0))]) {
      const slopes = [...derivative([condition.scalar], x), ...gradient(condition.scalar, [x, y])];
      expect(slopes.map((slope) => trace.constantAt(slope.index))).toEqual([0, 0, 0]);
    }
  });
});

describe('the absolute value', () => {
  it('has at 0 the slope of its right side, forwards and backwards', () => {
    const trace = new Trace();
    const x = trace.input('x', NONE);
    const value = x.absolute();
    const tape = finish(trace, [...derivative([value], x), ...gradient(value, [x])]);
    expect([...evaluate(tape, [0])]).toEqual([1, 1]);
    expect([...evaluate(tape, [-0])]).toEqual([1, 1]);
  });
});

describe('a damped product', () => {
  const trace = new Trace();
  const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
  const value = trace.apply(Op.damp, x, y);
  const tape = finish(trace, [value, ...derivative([value], y), ...gradient(value, [y])]);

  it.each([Number.POSITIVE_INFINITY, Number.NaN, 3])(
    'is 0 where its first factor is, whatever %d does',
    (b) => {
      expect([...evaluate(tape, [0, b])]).toEqual([0, 0, 0]);
    },
  );

  it('is a product elsewhere', () => {
    expect([...evaluate(tape, [2, 3])]).toEqual([6, 2, 2]);
    expect([...evaluate(tape, [2, Number.NaN])].slice(0, 1)).toEqual([Number.NaN]);
  });
});

describe('a derivative', () => {
  function lengths() {
    const trace = new Trace();
    return { trace, x: trace.input('x', LENGTH), y: trace.input('y', LENGTH), f: trace.input('f', FORCE) };
  }

  it('has the dimension of the output over the input, both ways and twice', () => {
    const { trace, x, f } = lengths();
    const moment = f.times(x.squared()).over(x.plus(trace.constant(1, LENGTH)));
    expect(moment.dimension).toBe(MOMENT);
    const expectDimension = (slope: Scalar | undefined, wanted: Dimension) =>
      expect(slope?.dimension).toBe(wanted);
    const [byX] = derivative([moment], x) as [Scalar];
    expectDimension(byX, FORCE);
    expectDimension(derivative([moment], f)[0], LENGTH);
    expectDimension(derivative([byX], x)[0], quotientDimension(FORCE, LENGTH));
    expectDimension(gradient(moment, [x])[0], FORCE);
    expectDimension(gradient(byX, [f])[0], NONE);
    // Also where there is nothing to differentiate.
    expectDimension(derivative([f], x)[0], quotientDimension(FORCE, LENGTH));
    expectDimension(gradient(f, [x])[0], quotientDimension(FORCE, LENGTH));
  });

  it('of what does not depend on the input is 0, and of the input itself 1', () => {
    const { trace, x, y } = lengths();
    const known = (slopes: readonly Scalar[]) => slopes.map((slope) => trace.constantAt(slope.index));
    expect(known(derivative([y, y.squared(), trace.constant(2, LENGTH), x], x))).toEqual([0, 0, 0, 1]);
    expect(known(gradient(y.squared(), [x]))).toEqual([0]);
    expect(known(gradient(y, [x, y]))).toEqual([0, undefined]);
    expect([...evaluate(finish(trace, gradient(y, [x, y])), [2, 3, 4])]).toEqual([0, 1]);
  });

  it('by a mark does not reach what else the same input drives; by the input it reaches both', () => {
    const { trace, x } = lengths();
    const p = trace.mark(x);
    const area = p.times(x);
    const tape = finish(trace, [
      ...derivative([area], p),
      ...derivative([area], x),
      ...gradient(area, [p, x]),
    ]);
    expect([...evaluate(tape, [5, 0, 0])]).toEqual([5, 10, 5, 10]);
  });

  it('by the input can be differentiated again by a mark of it, in either order', () => {
    const { trace, x } = lengths();
    const p = trace.mark(x);
    const volume = p.power(3);
    const [byX, byP] = [...derivative([volume], x), ...derivative([volume], p)] as [Scalar, Scalar];
    const tape = finish(trace, [...derivative([byX], p), ...derivative([byP], x)]);
    expect([...evaluate(tape, [2, 0, 0])]).toEqual([12, 12]);
  });

  it('at the present place computes nothing again', () => {
    const { trace, x, y } = lengths();
    const p = trace.mark(x);
    const sum = p.squared().plus(y.squared());
    const value = sum.squareRoot();
    const before = trace.length;
    derivative([value], p);
    // 2p, ½ ÷ √, and their product, with the constants 2 and ½ at the most.
    expect(trace.length - before).toBeLessThanOrEqual(6);
  });

  it('can be taken at a place that depends on the input', () => {
    const { trace, x, y } = lengths();
    const tape = finish(trace, derivative([x.squared().times(y)], x, x.plus(y)));
    // By hand: 2·x·y at x + y.
    expect([...evaluate(tape, [3, 2, 0])]).toEqual([2 * (3 + 2) * 2]);
  });

  it('takes its place as a number of the dimension of the input', () => {
    const { trace, x, f } = lengths();
    const [slope] = derivative([f.times(x.squared())], x, 4) as [Scalar];
    expect([...evaluate(finish(trace, [slope]), [1, 1, 3])]).toEqual([24]);
  });

  it('follows an input that is itself a result', () => {
    const { trace, x, y } = lengths();
    const middle = x.times(y);
    const value = middle.squared().plus(y.squared().squared());
    const tape = finish(trace, [...derivative([value], middle), ...gradient(value, [middle, x, y])]);
    // By hand, with m = x·y: ∂/∂m = 2m, ∂/∂x = 2m·y, ∂/∂y = 2m·x + 4y³.
    expect([...evaluate(tape, [3, 2, 0])]).toEqual([12, 12, 24, 68]);
  });
});

describe('a substitution', () => {
  it('gives outputs as they would be with the input elsewhere', () => {
    const trace = new Trace();
    const [x, y] = [trace.input('x', LENGTH), trace.input('y', LENGTH)];
    const sum = x.plus(y);
    const [moved, itself, untouched] = substitute([sum.squared(), x, y.squared()], x, y.times(2));
    const tape = finish(trace, [moved, itself, untouched] as Scalar[]);
    expect([...evaluate(tape, [Number.NaN, 3])]).toEqual([81, 6, 9]);
    expect(untouched?.index).toBe(y.squared().index);
  });
});
