import { describe, expect, it } from 'vitest';
import {
  AREA,
  AREA_LOAD,
  DENSITY,
  FORCE,
  LENGTH,
  LINE_LOAD,
  MOMENT,
  NONE,
  nameDimension,
  VOLUME,
} from '../../src/quantity/index.ts';
import {
  arctangent,
  derivative,
  evaluate,
  finish,
  gradient,
  guard,
  guardSlope,
  hypotenuse,
  Op,
  operationCount,
  printTape,
  Refusal,
  registerCount,
  type Scalar,
  say,
  sum,
  Trace,
} from '../../src/tape/index.ts';

function inputs() {
  const trace = new Trace();
  return {
    trace,
    x: trace.input('x', LENGTH),
    y: trace.input('y', LENGTH),
    f: trace.input('f', FORCE),
    n: trace.input('n', NONE),
  };
}

describe('quantities that do not go together', () => {
  const { x, y, f, n } = inputs();
  it.each<[string, () => unknown, string]>([
    ['a sum', () => x.plus(f), "a force can't be added to a length"],
    ['a difference', () => x.minus(f), "a force can't be taken from a length"],
    ['a comparison', () => x.below(f), "a force can't be compared with a length"],
    ['a comparison the other way', () => x.atLeast(f), "a force can't be compared with a length"],
    ['the least of two', () => f.least(x), "a length can't be compared with a force"],
    ['the greatest of two', () => f.most(x), "a length can't be compared with a force"],
    ['a hypotenuse', () => hypotenuse(x, f), "a quantity in m²·kg²·s⁻⁴ can't be added to an area"],
    ['a sum of several', () => sum([x, y, f]), "a force can't be added to a length"],
    [
      'a length and a number',
      () => x.plus(1),
      'a plain number is wanted where a length stands: divide it first',
    ],
    ['a length compared with a number', () => x.above(1), 'a plain number is wanted where a length stands'],
    ['a number and a length', () => n.plus(x), "a length can't be added to a plain number"],
    ['the sine of a length', () => x.sine(), 'the sine is wanted where a length stands: divide it first'],
    ['the cosine of an area', () => x.times(y).cosine(), 'the cosine is wanted where an area stands'],
    ['the exponential of a force', () => f.exponential(), 'the exponential is wanted where a force stands'],
    ['the logarithm of a force', () => f.logarithm(), 'the logarithm is wanted where a force stands'],
    ['a choice', () => n.below(0).choose(x, f), 'a choice between a length and a force has no one dimension'],
    ['an angle', () => arctangent(x, f), 'a length across and a force along have no angle'],
  ])('%s is refused in words', (_, act, words) => {
    expect(act).toThrow(words);
    expect(act).toThrow(Refusal);
    expect(act).toThrow(expect.objectContaining({ code: 'dimensions' }));
  });

  it('multiply and divide to what they are', () => {
    expect(x.times(f).dimension).toBe(MOMENT);
    expect(x.times(y).dimension).toBe(AREA);
    expect(x.squared().dimension).toBe(AREA);
    expect(x.power(3).dimension).toBe(VOLUME);
    expect(x.power(3).over(y).dimension).toBe(AREA);
    expect(x.times(y).squareRoot().dimension).toBe(LENGTH);
    expect(x.power(-0.5).power(-2).dimension).toBe(LENGTH);
    expect(f.over(x).dimension).toBe(LINE_LOAD);
    expect(f.over(x.squared()).dimension).toBe(AREA_LOAD);
    expect(f.times(0).dimension).toBe(FORCE);
    expect(x.over(y).dimension).toBe(NONE);
    expect(nameDimension(f.squared().dimension)).toBe('a quantity in m²·kg²·s⁻⁴');
    expect(nameDimension(x.squareRoot().dimension)).toBe('a quantity in m^0.5');
  });

  it('have plain numbers for their comparisons and angles', () => {
    expect(x.below(y).scalar.dimension).toBe(NONE);
    expect(arctangent(x, y).dimension).toBe(NONE);
    expect(hypotenuse(x, y).dimension).toBe(LENGTH);
    expect(x.least(y).dimension).toBe(LENGTH);
    expect(n.sine().times(f).dimension).toBe(FORCE);
  });

  it('take 0 for one of themselves', () => {
    expect(x.plus(0).index).toBe(x.index);
    expect(() => [x.above(0), f.most(0), x.squared().minus(0)]).not.toThrow();
  });
});

describe('scalars of two traces', () => {
  const [mine, other] = [inputs(), inputs()];
  it.each<[string, () => unknown]>([
    ['in a sum', () => mine.x.plus(other.x)],
    ['in a product', () => mine.x.times(other.f)],
    ['in a comparison', () => mine.x.below(other.x)],
    ['as a condition', () => other.n.below(0).choose(mine.x, mine.y)],
    ['in a choice', () => mine.n.below(0).choose(mine.x, other.y)],
    ['as the condition of a guard', () => guard(mine.x, other.x.below(0), say('a')`a`)],
    ['in the words of a guard', () => guard(mine.x, mine.x.below(0), say('a')`${other.x}`)],
    ['as a mark', () => mine.trace.mark(other.x)],
    ['in a derivative', () => derivative([mine.x.squared()], other.x)],
    ['as the place of a derivative', () => derivative([mine.x.squared()], mine.x, other.x)],
    ['in a gradient', () => gradient(mine.x.squared(), [mine.x, other.y])],
    ['on a tape', () => finish(mine.trace, [mine.x, other.x])],
  ])('do not mix %s', (_, act) => {
    expect(act).toThrow('scalars of two traces do not mix');
  });
});

describe('a constant', () => {
  it.each([Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])('can not be %d', (value) => {
    const { trace, n } = inputs();
    expect(() => trace.constant(value, NONE)).toThrow(`a constant must be finite, not ${value}`);
    expect(() => n.plus(value)).toThrow(RangeError);
    expect(() => n.power(value)).toThrow(RangeError);
  });

  it('is written once for each dimension', () => {
    const { trace } = inputs();
    expect(trace.constant(2, LENGTH).index).toBe(trace.constant(2, LENGTH).index);
    expect(trace.constant(2, LENGTH).index).not.toBe(trace.constant(2, FORCE).index);
    expect(trace.constant(2, FORCE).dimension).toBe(FORCE);
    expect(trace.constant(0, LENGTH).dimension).toBe(LENGTH);
  });

  it('of 0 has no sign, so that a vector that points back has the angle π whatever was traced before', () => {
    const { trace, x } = inputs();
    const first = trace.constant(-2, LENGTH).times(0);
    expect(trace.constantAt(first.index)).toBe(0);
    const angle = arctangent(trace.constant(0, LENGTH), x);
    expect(evaluate(finish(trace, [angle]), [-1, 0, 0, 0])[0]).toBe(Math.PI);
  });
});

describe('constants', () => {
  it('are folded through every operation', () => {
    const trace = new Trace();
    const [a, b] = [trace.constant(0.75, NONE), trace.constant(-2.5, NONE)];
    const folded: [Scalar, number][] = [
      [a.plus(b), 0.75 - 2.5],
      [a.minus(b), 0.75 + 2.5],
      [a.times(b), 0.75 * -2.5],
      [a.over(b), 0.75 / -2.5],
      [b.negated(), 2.5],
      [b.absolute(), 2.5],
      [a.squareRoot(), Math.sqrt(0.75)],
      [a.sine(), Math.sin(0.75)],
      [a.cosine(), Math.cos(0.75)],
      [arctangent(a, b), Math.atan2(0.75, -2.5)],
      [a.exponential(), Math.exp(0.75)],
      [a.logarithm(), Math.log(0.75)],
      [a.power(-3), 0.75 ** -3],
      [a.below(b).scalar, 0],
      [b.atMost(a).scalar, 1],
      [a.below(b).choose(a, b), -2.5],
      [a.above(b).choose(a, b), 0.75],
      [trace.apply(Op.damp, a, b), 0.75 * -2.5],
    ];
    for (const [scalar, value] of folded) expect(trace.constantAt(scalar.index)).toBe(value);
    expect(
      operationCount(
        finish(
          trace,
          folded.map(([scalar]) => scalar),
        ),
      ),
    ).toBe(0);
  });

  it('without a finite result stay operations, and show when they run', () => {
    const trace = new Trace();
    const [zero, one] = [trace.constant(0, NONE), trace.constant(1, NONE)];
    const unbounded = [one.over(zero), zero.logarithm(), one.negated().squareRoot(), zero.power(-1)];
    for (const scalar of unbounded) expect(trace.constantAt(scalar.index)).toBeUndefined();
    const [a, b, c, d] = evaluate(finish(trace, unbounded), []);
    expect([a, b, c, d]).toEqual([Infinity, -Infinity, Number.NaN, Infinity]);
  });

  it('keep their dimension', () => {
    const trace = new Trace();
    const area = trace.constant(3, LENGTH).times(trace.constant(4, LENGTH));
    expect([trace.constantAt(area.index), area.dimension]).toEqual([12, AREA]);
    const side = area.squareRoot();
    expect([trace.constantAt(side.index), side.dimension]).toEqual([Math.sqrt(12), LENGTH]);
  });
});

describe('equal subexpressions', () => {
  it('are computed once', () => {
    const { trace, x, y, n } = inputs();
    const write = () => [
      x.minus(y),
      x.over(y),
      x.negated(),
      x.absolute(),
      x.squareRoot(),
      n.sine(),
      n.power(3),
      arctangent(x, y),
      hypotenuse(x, y),
      x.below(y).choose(x, y),
      guard(x, x.below(y), say('long')`${x} is too long`),
    ];
    const first = write().map(({ index }) => index);
    const { length } = trace;
    expect(write().map(({ index }) => index)).toEqual(first);
    expect(trace.length).toBe(length);
    expect(n.power(2).index).toBe(n.times(n).index);
    expect(n.power(0.5).index).toBe(n.squareRoot().index);
  });

  it('are found whichever way round they are written, where that makes no difference', () => {
    const { x, y } = inputs();
    expect(x.plus(y).index).toBe(y.plus(x).index);
    expect(x.times(y).index).toBe(y.times(x).index);
    expect(x.minus(y).index).not.toBe(y.minus(x).index);
    expect(x.over(y).index).not.toBe(y.over(x).index);
    expect(arctangent(x, y).index).not.toBe(arctangent(y, x).index);
    expect(x.below(y).scalar.index).not.toBe(y.below(x).scalar.index);
    expect(x.below(y).choose(x, y).index).not.toBe(x.below(y).choose(y, x).index);
    // Written in other words, the same comparison.
    expect(x.above(y).scalar.index).toBe(y.below(x).scalar.index);
  });

  it('are found among many thousands', () => {
    const { trace, n } = inputs();
    const write = () => {
      let value = n;
      for (let i = 0; i < 5000; i++) value = value.plus(i % 7).sine();
      return value.index;
    };
    const first = write();
    const { length } = trace;
    expect(write()).toBe(first);
    expect(trace.length).toBe(length);
  });

  it('are not what only looks alike: guards with other words, of other nodes or on other values', () => {
    const { trace, x, y } = inputs();
    const write = (value: Scalar, words: string) =>
      guard(value, x.below(y), say('long')`${words}: ${x}`).index;
    const all = [write(x, 'a'), write(x, 'b'), write(y, 'a')];
    trace.owner = 'node 2';
    all.push(write(x, 'a'));
    expect(new Set(all).size).toBe(4);
  });

  it('are not marks: each is a variable of its own', () => {
    const { trace, x } = inputs();
    const [p, q] = [trace.mark(x), trace.mark(x)];
    expect(p.index).not.toBe(q.index);
    expect(p.dimension).toBe(LENGTH);
    const tape = finish(trace, [...derivative([p.times(q)], p), p.times(q)]);
    expect([...evaluate(tape, [5, 0, 0, 0])]).toEqual([5, 25]);
  });
});

describe('what changes nothing', () => {
  it.each<[string, (x: Scalar) => Scalar]>([
    ['x + 0', (x) => x.plus(0)],
    ['0 + x', (x) => x.trace.constant(0, LENGTH).plus(x)],
    ['x − 0', (x) => x.minus(0)],
    ['1 · x', (x) => x.trace.constant(1, NONE).times(x)],
    ['x · 1', (x) => x.times(1)],
    ['x ÷ 1', (x) => x.over(1)],
    ['x¹', (x) => x.power(1)],
    ['−(−x)', (x) => x.negated().negated()],
    ['−1 · (−x)', (x) => x.negated().times(-1)],
    ['(−x) ÷ −1', (x) => x.negated().over(-1)],
    ['0 − (−x)', (x) => x.trace.constant(0, LENGTH).minus(x.negated())],
    ['a choice known to be yes', (x) => x.trace.constant(1, NONE).above(0).choose(x, x.times(2))],
    ['a choice known to be no', (x) => x.trace.constant(1, NONE).below(0).choose(x.times(2), x)],
    ['a choice between x and x', (x) => x.below(0).choose(x, x)],
  ])('%s is x itself', (_, write) => {
    const { x } = inputs();
    const scalar = write(x);
    expect(scalar.index).toBe(x.index);
    expect(scalar.dimension).toBe(LENGTH);
  });

  it('turns into a shorter form where a sign is turned', () => {
    const { trace, x, y } = inputs();
    expect(x.plus(y.negated()).index).toBe(x.minus(y).index);
    expect(x.minus(y.negated()).index).toBe(x.plus(y).index);
    expect(x.times(-1).index).toBe(x.negated().index);
    expect(x.over(-1).index).toBe(x.negated().index);
    expect(trace.constant(0, LENGTH).minus(x).index).toBe(x.negated().index);
  });

  it('is not the product with a unit: 1 m · x is an area', () => {
    const { trace, x, n } = inputs();
    const metre = trace.constant(1, LENGTH);
    expect(metre.times(x).index).not.toBe(x.index);
    expect(metre.times(x).dimension).toBe(AREA);
    expect(x.over(metre).dimension).toBe(NONE);
    expect(n.times(metre).dimension).toBe(LENGTH);
  });

  it.each<[string, (x: Scalar) => Scalar]>([
    ['0 · x', (x) => x.times(0)],
    ['x · 0', (x) => x.trace.constant(0, NONE).times(x)],
    ['0 ÷ x', (x) => x.trace.constant(0, AREA).over(x)],
    ['0 damping x', (x) => x.trace.apply(Op.damp, x.trace.constant(0, NONE), x)],
  ])('%s is 0 of the right dimension, even where x waits', (_, write) => {
    const { trace, x } = inputs();
    const scalar = write(x);
    expect(trace.constantAt(scalar.index)).toBe(0);
    expect(scalar.dimension).toBe(LENGTH);
    expect([...evaluate(finish(trace, [scalar]), [Number.NaN, 0, 0, 0])]).toEqual([0]);
  });

  it('makes 1 of x⁰, a plain number', () => {
    const { trace, x } = inputs();
    expect(trace.constantAt(x.power(0).index)).toBe(1);
    expect(x.power(0).dimension).toBe(NONE);
  });
});

describe('a finished tape', () => {
  it('drops what nothing reads, constants too', () => {
    const { trace, x, y, f } = inputs();
    hypotenuse(x, y).times(f).times(17);
    const tape = finish(trace, [x.minus(y)]);
    expect(operationCount(tape)).toBe(1);
    expect([...tape.constants]).toEqual([]);
    expect(registerCount(tape)).toBe(4 + 1);
    expect([...evaluate(tape, [5, 3, 0, 0])]).toEqual([2]);
  });

  it('keeps the place of every input, read or not, and traced early or late', () => {
    const { trace, x, n } = inputs();
    const half = x.times(0.5);
    const late = trace.input('late', LENGTH);
    const tape = finish(trace, [half.plus(late)]);
    expect(tape.inputs).toEqual([
      { name: 'x', dimension: LENGTH },
      { name: 'y', dimension: LENGTH },
      { name: 'f', dimension: FORCE },
      { name: 'n', dimension: NONE },
      { name: 'late', dimension: LENGTH },
    ]);
    expect([...evaluate(tape, [6, 1000, 1000, 1000, 7])]).toEqual([10]);
    expect([...evaluate(finish(trace, [n]), [1, 2, 3, 4, 5])]).toEqual([4]);
  });

  it('is not changed by what is traced after it', () => {
    const { trace, x } = inputs();
    const tape = finish(trace, [x.times(2)]);
    trace.input('late', DENSITY);
    x.times(3).plus(x);
    expect(tape.inputs.length).toBe(4);
    expect([...evaluate(tape, [5, 0, 0, 0])]).toEqual([10]);
  });

  it('drops marks and guards of slopes, and keeps what they mark', () => {
    const { trace, x } = inputs();
    const twice = trace.mark(guardSlope(trace.mark(x.times(2)), x.above(0), say('edge')`edge`));
    const tape = finish(trace, [twice, twice.plus(x)]);
    expect(operationCount(tape)).toBe(2);
    expect([...evaluate(tape, [5, 0, 0, 0])]).toEqual([10, 15]);
  });

  it('can give an input, a constant or one value twice as outputs, or nothing', () => {
    const { trace, x } = inputs();
    const half = x.times(0.5);
    const tape = finish(trace, [x, trace.constant(7, NONE), trace.mark(x), half, half]);
    expect([...evaluate(tape, [5, 3, 0, 0])]).toEqual([5, 7, 5, 2.5, 2.5]);
    expect([...evaluate(finish(trace, []), [5, 3, 0, 0])]).toEqual([]);
  });

  it('keeps the figures of its queries, though no output reads them', () => {
    const { trace, x, y } = inputs();
    const held = guard(x, x.below(y), say('long')`${x.minus(y)} too long`);
    const tape = finish(trace, [held]);
    // The comparison, the difference and the guard.
    expect(operationCount(tape)).toBe(3);
    expect(tape.guards).toMatchObject([{ code: 'long', parts: ['', ' too long'], owner: undefined }]);
  });
});

describe('a printed tape', () => {
  it('has a line for each input with its unit, each constant, each operation, and the outputs', () => {
    const { trace, x, y } = inputs();
    hypotenuse(x, y);
    expect(printTape(finish(trace, [trace.mark(x.plus(y)).times(2), y]))).toBe(
      [
        'r0 = input x [m]',
        'r1 = input y [m]',
        'r2 = input f [m·kg·s⁻²]',
        'r3 = input n []',
        'r4 = 2',
        'r5 = add r0 r1',
        'r6 = multiply r5 r4',
        'outputs r6 r1',
      ].join('\n'),
    );
  });

  it('shows operations of one sort in series, guards with their conditions and choices with both branches', () => {
    const trace = new Trace();
    const [a, b] = [trace.input('a', NONE), trace.input('b', NONE)];
    const held = guard(a.sine(), a.below(b), say('large')`${a} is too large`);
    expect(printTape(finish(trace, [b.atMost(0.5).choose(held, b.sine())]))).toBe(
      [
        'r0 = input a []',
        'r1 = input b []',
        'r2 = 0.5',
        'r3 = sine r0',
        'r4 = sine r1',
        'r5 = below r0 r1',
        'r6 = atMost r1 r2',
        'r7 = guard r3 r5',
        'r8 = choose r6 r7 r4',
        'outputs r8',
      ].join('\n'),
    );
  });
});
