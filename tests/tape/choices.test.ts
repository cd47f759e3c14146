import { describe, expect, it } from 'vitest';
import { LENGTH, NONE } from '../../src/quantity/index.ts';
import {
  type Condition,
  derivative,
  evaluate,
  failedGuards,
  finish,
  gradient,
  guard,
  guardSlope,
  queryText,
  registersFor,
  run,
  type Scalar,
  say,
  Trace,
} from '../../src/tape/index.ts';

/** Ways to have no figure, or none within bounds, at x < 0, written on x. */
const troubles: [string, (x: Scalar) => Scalar][] = [
  ['a root of what is negative', (x) => x.squareRoot()],
  ['a logarithm of what is negative', (x) => x.logarithm().times(x)],
  ['a division by 0', (x) => x.over(x.minus(x))],
  ['a root of 0, with a slope beyond bounds', (x) => x.plus(x.absolute()).squareRoot().times(x)],
  ['0 divided by 0', (x) => x.minus(x).over(x.plus(x.absolute()))],
  ['what grows beyond bounds', (x) => x.negated().plus(800).exponential().minus(x)],
  ['a guard that fails', (x) => guard(x.squared(), x.above(0), say('low')`x is ${x}`)],
  [
    'a slope whose guard fails',
    (x) => guardSlope(x, x.above(0), say('low')`x is ${x}`).absolute().squareRoot(),
  ],
  ['a choice that waits', (x) => x.squareRoot().below(1).choose(x.squared(), x.times(3))],
  ['the greater of two that wait', (x) => x.squareRoot().most(x.logarithm()).most(x)],
  [
    'choices within choices',
    (x) => {
      const [root, log] = [x.squareRoot(), x.logarithm()];
      return root.above(1).choose(log.below(root).choose(x, root.times(x)), root.atMost(log).choose(log, x));
    },
  ],
];

describe.each(troubles)('%s in the branch that is not chosen', (_, trouble) => {
  const trace = new Trace();
  const x = trace.input('x', NONE);
  const sound = x.squared().sine().plus(x.times(3));
  const placed: [string, Scalar][] = [
    ['as yes', x.above(0).choose(trouble(x), sound)],
    ['as no', x.atMost(0).choose(sound, trouble(x))],
    ['within a choice', x.above(-9).choose(x.above(0).choose(trouble(x), sound), trouble(x))],
    ['before more is computed', x.above(0).choose(trouble(x), sound.minus(3)).plus(3)],
  ];
  const at = -1.25;
  // By hand, of sin x² + 3x.
  const value = Math.sin(at * at) + 3 * at;
  const slope = 2 * at * Math.cos(at * at) + 3;
  const bend = 2 * Math.cos(at * at) - 4 * at * at * Math.sin(at * at);

  it('is a trouble where it is chosen', () => {
    const bare = trouble(x);
    const [shown = 0, itsSlope = 0] = evaluate(finish(trace, [bare, ...derivative([bare], x)]), [at]);
    expect(Number.isFinite(shown) && Number.isFinite(itsSlope)).toBe(false);
  });

  it.each(placed)('%s does no harm to the value and its slopes', (__, chosen) => {
    const [forward] = derivative([chosen], x) as [Scalar];
    const [backward] = gradient(chosen, [x]) as [Scalar];
    const tape = finish(trace, [
      ...[chosen, forward, backward],
      ...[...derivative([forward], x), ...derivative([backward], x), ...gradient(forward, [x])],
      ...gradient(backward, [x]),
    ]);
    const found = evaluate(tape, [at]);
    // Values of a few units, computed in another order than here.
    for (const [i, wanted] of [value, slope, slope, bend, bend, bend, bend].entries())
      expect(found[i]).toBeCloseTo(wanted, 13);
  });

  it('raises no query', () => {
    for (const [__, chosen] of placed) {
      const tape = finish(trace, [chosen, ...derivative([chosen], x), ...gradient(chosen, [x])]);
      const registers = registersFor(tape);
      run(tape, [at], registers);
      expect(failedGuards(tape, registers)).toEqual([]);
    }
  });
});

describe('a choice', () => {
  function rooted() {
    const trace = new Trace();
    const x = trace.input('x', NONE);
    // √x has no value below 0 and an unbounded slope at 0; where it is not chosen that must not be seen.
    const value = x.above(0).choose(x.squareRoot(), x.times(2));
    return { trace, x, value };
  }

  it.each([
    [4, 2, 0.25],
    [0, 0, 2],
    [-3, -6, 2],
  ])('at %d gives %d with the slope %d, forwards and backwards', (at, wanted, slope) => {
    const { trace, x, value } = rooted();
    const tape = finish(trace, [value, ...derivative([value], x), ...gradient(value, [x])]);
    expect([...evaluate(tape, [at])]).toEqual([wanted, slope, slope]);
  });

  it('at another place takes the branch of that place', () => {
    const { trace, x, value } = rooted();
    const tape = finish(trace, [...derivative([value], x, 4), ...derivative([value], x, -4)]);
    expect([...evaluate(tape, [-1])]).toEqual([0.25, 2]);
    expect([...evaluate(tape, [1])]).toEqual([0.25, 2]);
  });

  it('waits where its condition waits, and so do its slopes', () => {
    const { trace, x, value } = rooted();
    const tape = finish(trace, [value, ...derivative([value], x), ...gradient(value, [x])]);
    expect([...evaluate(tape, [Number.NaN])]).toEqual([Number.NaN, Number.NaN, Number.NaN]);
  });

  it('waits where the chosen branch waits, with the query of that branch', () => {
    const trace = new Trace();
    const x = trace.input('x', LENGTH);
    const branch = (code: string) =>
      guard(x, x.above(trace.constant(5, LENGTH)), say(code)`${code}: x is ${x}`);
    const tape = finish(trace, [x.below(0).choose(branch('left'), branch('right'))]);
    const registers = registersFor(tape);
    const said = [-1, 1, 6].map((at) => {
      run(tape, [at], registers);
      return failedGuards(tape, registers).map((query) => queryText(query));
    });
    expect(said).toEqual([['left: x is −1.000\u00a0m'], ['right: x is 1.000\u00a0m'], []]);
  });

  it('waits with the query of its condition', () => {
    const trace = new Trace();
    const x = trace.input('x', LENGTH);
    const held = guard(x, x.above(trace.constant(5, LENGTH)), say('low')`x is ${x}`);
    const tape = finish(trace, [held.below(0).choose(x, x.times(2))]);
    const registers = registersFor(tape);
    run(tape, [1], registers);
    expect(failedGuards(tape, registers).map((query) => queryText(query))).toEqual(['x is 1.000\u00a0m']);
  });

  it.each<[string, (x: Scalar) => Scalar]>([
    ['yes', (x) => x.below(5).choose(x, x.squared())],
    ['no', (x) => x.above(5).choose(x.squared(), x)],
  ])('within a choice has, as %s, its second derivative also where the slope is 0 by chance', (_, write) => {
    const trace = new Trace();
    const x = trace.input('x', NONE);
    const value = x.above(-9).choose(write(x).cosine(), x);
    const slopes = [...derivative([value], x), ...gradient(value, [x])];
    const tape = finish(trace, [
      ...slopes,
      ...slopes.flatMap((slope) => [...derivative([slope], x), ...gradient(slope, [x])]),
    ]);
    const found = [...evaluate(tape, [0])];
    // By hand, of cos x at 0. Adding 0 makes 0 of −0.
    expect(found.map((slope) => slope + 0)).toEqual([0, 0, -1, -1, -1, -1]);
  });

  it('of inputs that no branch reads has no slope', () => {
    const trace = new Trace();
    const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
    const [slope] = derivative([x.below(0).choose(y, y.times(2))], x) as [Scalar];
    expect(trace.constantAt(slope.index)).toBe(0);
  });
});

describe('conditions', () => {
  const trace = new Trace();
  const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
  const rows: [string, Condition, (a: number, b: number) => boolean][] = [
    ['below', x.below(y), (a, b) => a < b],
    ['at most', x.atMost(y), (a, b) => a <= b],
    ['above', x.above(y), (a, b) => a > b],
    ['at least', x.atLeast(y), (a, b) => a >= b],
    ['not', x.below(y).not(), (a, b) => !(a < b)],
    ['and', x.below(y).and(x.above(-1)), (a, b) => a < b && a > -1],
    ['or', x.below(y).or(x.above(1)), (a, b) => a < b || a > 1],
  ];

  it.each(rows)('%s is 1 or 0', (_, condition, wanted) => {
    const tape = finish(trace, [condition.scalar]);
    const figures = [-2, -1, -0, 0, 0.5, 1, 2, Number.POSITIVE_INFINITY];
    for (const a of figures) {
      for (const b of figures) expect(evaluate(tape, [a, b])[0], `${a}, ${b}`).toBe(wanted(a, b) ? 1 : 0);
    }
  });

  it.each(rows)('%s waits where what it compares waits', (_, condition) => {
    const tape = finish(trace, [condition.scalar]);
    expect(evaluate(tape, [Number.NaN, 1])[0]).toBeNaN();
    expect(evaluate(tape, [0, Number.NaN])[0]).toBeNaN();
  });

  it('give the least and the greatest of two', () => {
    const tape = finish(trace, [x.least(y), x.most(y), x.least(0), y.most(0)]);
    expect([...evaluate(tape, [-3, 2])]).toEqual([-3, 2, -3, 2]);
    expect([...evaluate(tape, [2, -3])]).toEqual([-3, 2, 0, 0]);
    expect([...evaluate(tape, [Number.NaN, 1])].slice(0, 2)).toEqual([Number.NaN, Number.NaN]);
  });
});
