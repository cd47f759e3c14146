import { describe, expect, it } from 'vitest';
import { FORCE, LENGTH, NONE } from '../../src/quantity/index.ts';
import {
  asAngle,
  derivative,
  failedGuards,
  finish,
  gradient,
  guard,
  guardSlope,
  plainQuery,
  queryText,
  registersFor,
  run,
  type Scalar,
  say,
  substitute,
  Trace,
} from '../../src/tape/index.ts';

/** What an output that waits holds inside. */
const WAITS = Number.NaN;

/** Outputs and queries after a run. */
function runOn(trace: Trace, outputs: readonly Scalar[], inputs: readonly number[]) {
  const tape = finish(trace, outputs);
  const registers = registersFor(tape);
  run(tape, inputs, registers);
  const queries = failedGuards(tape, registers);
  return {
    values: Array.from(tape.outputs, (register) => registers[register] as number),
    queries,
    texts: queries.map((query) => queryText(query)),
  };
}

function lengths() {
  const trace = new Trace();
  return { trace, x: trace.input('x', LENGTH), y: trace.input('y', LENGTH) };
}

describe('a guard', () => {
  it('passes its value on while it holds', () => {
    const { trace, x, y } = lengths();
    const held = guard(x, x.above(y), say('short')`x is short by ${y.minus(x)}`);
    expect(runOn(trace, [held.times(2)], [5, 3])).toEqual({ values: [10], queries: [], texts: [] });
  });

  it('that fails raises its query with live figures, and what depends on it waits', () => {
    const { trace, x, y } = lengths();
    trace.owner = 'node 7';
    const held = guard(x, x.above(y), say('short')`x is short by ${y.minus(x)}: lengthen it`);
    trace.owner = 'node 8';
    const after = held.plus(y).absolute().most(y).squared();
    const found = runOn(trace, [held, after, held.below(y).scalar, y.times(2)], [3, 5.5]);
    expect(found.values).toEqual([WAITS, WAITS, WAITS, 11]);
    expect(found.texts).toEqual(['x is short by 2.500\u00a0m: lengthen it']);
    expect(found.queries).toMatchObject([{ owner: 'node 7', code: 'short', figures: [{ value: 2.5 }] }]);
  });

  it('speaks only as long as it fails', () => {
    const { trace, x, y } = lengths();
    const tape = finish(trace, [guard(x, x.above(y), say('short')`short by ${y.minus(x)}`)]);
    const registers = registersFor(tape);
    const said = [1, 5, 2].map((value) => {
      run(tape, [value, 3], registers);
      return failedGuards(tape, registers).map((query) => queryText(query));
    });
    expect(said).toEqual([['short by 2.000\u00a0m'], [], ['short by 1.000\u00a0m']]);
  });

  it('is silent where its own condition waits', () => {
    const { trace, x, y } = lengths();
    const first = guard(x, x.above(0), say('first')`x is ${x}`);
    const second = guard(first.plus(y), first.above(y), say('second')`too short`);
    expect(runOn(trace, [second], [-1, 5]).texts).toEqual(['x is −1.000\u00a0m']);
    expect(runOn(trace, [second], [1, 5]).texts).toEqual(['too short']);
    expect(runOn(trace, [second], [WAITS, 5]).texts).toEqual([]);
  });

  it('speaks beside another one that fails on the same way', () => {
    const { trace, x, y } = lengths();
    const first = guard(x, x.above(0), say('first')`x is ${x}`);
    const second = guard(first, y.above(0), say('second')`y is ${y}`);
    expect(runOn(trace, [second], [-1, -2]).texts).toEqual(['x is −1.000\u00a0m', 'y is −2.000\u00a0m']);
  });

  it('speaks once, however often it is written', () => {
    const { trace, x } = lengths();
    const write = (factor: number) => guard(x.times(factor), x.above(0), say('low')`x is ${x}`);
    expect(write(2).index).toBe(write(2).index);
    const all = [write(2), write(2), write(3), guard(x, x.above(0), say('other')`something else`)];
    expect(runOn(trace, all, [-1, 0])).toMatchObject({
      values: [WAITS, WAITS, WAITS, WAITS],
      texts: ['x is −1.000\u00a0m', 'something else'],
    });
  });

  it('speaks once for each node that wrote it', () => {
    const { trace, x } = lengths();
    const held = ['a', 'b', 'a'].map((owner) => {
      trace.owner = owner;
      return guard(x, x.above(0), say('low')`x is ${x}`);
    });
    expect(runOn(trace, held, [-1, 0]).queries.map(({ owner }) => owner)).toEqual(['a', 'b']);
  });

  it('is not written where it is known to hold, and always speaks where it is known to fail', () => {
    const { trace, x } = lengths();
    const known = trace.constant(2, LENGTH);
    expect(guard(x, known.above(0), say('never')`never`).index).toBe(x.index);
    const failing = guard(x, known.below(0), say('always')`${known} is not below 0`);
    expect(runOn(trace, [failing], [1, 1])).toMatchObject({
      values: [WAITS],
      texts: ['2.000\u00a0m is not below 0'],
    });
  });

  it('is dropped with its query where nothing reads it', () => {
    const { trace, x, y } = lengths();
    guard(x, x.above(y), say('short')`short by ${y.minus(x)}`);
    expect(finish(trace, [x.plus(y)]).guards).toEqual([]);
  });
});

describe('the text of a query', () => {
  it('has its figures in the units of the system that is asked for', () => {
    const trace = new Trace();
    const [gap, force] = [trace.input('gap', LENGTH), trace.input('force', FORCE)];
    const words = say('both')`It misses by ${gap} under ${force}, ${force.times(gap)} in all: move it`;
    const [query] = runOn(
      trace,
      [guard(gap, gap.above(force.over(force).times(gap)), words)],
      [0.3048, 4448.2216152605],
    ).queries;
    if (query === undefined) throw new Error('no query');
    expect(queryText(query)).toBe(
      'It misses by 0.3048\u00a0m under 4.448\u00a0kN, 1.356\u00a0kN·m in all: move it',
    );
    // A foot is 0.3048 m and a kip 4448.2216152605 N by definition (NIST SP 811, appendix B).
    expect(queryText(query, 'US')).toBe(
      'It misses by 1.000\u00a0ft under 1.000\u00a0kip, 1.000\u00a0kip·ft in all: move it',
    );
  });

  it('keeps the figures of a gap that is too small to matter elsewhere', () => {
    const { trace, x } = lengths();
    const held = guard(x, x.atMost(0), say('gap')`off by ${x}`);
    expect(runOn(trace, [held], [3e-9, 0]).texts).toEqual(['off by 3.000×10⁻⁹\u00a0m']);
  });

  it('prints an angle in degrees, and the same figure as a number where it is not one', () => {
    const trace = new Trace();
    const a = trace.input('a', NONE);
    const steep = guard(a, a.below(0), say('steep')`turned by ${asAngle(a)}`);
    const large = guard(a, a.below(0), say('large')`turned by ${a}`);
    expect(runOn(trace, [steep, large], [Math.PI / 6]).texts).toEqual([
      'turned by 30.00°',
      'turned by 0.5236',
    ]);
  });

  it('prints an angle in degrees even if the same words were written with a number before', () => {
    const trace = new Trace();
    const a = trace.input('a', NONE);
    guard(a, a.below(0), say('turn')`turned by ${a}`);
    const held = guard(a, a.below(0), say('turn')`turned by ${asAngle(a)}`);
    expect(runOn(trace, [held], [Math.PI / 6]).texts).toEqual(['turned by 30.00°']);
  });

  it('can hold words and counts of the structure', () => {
    const { trace, x } = lengths();
    const held = guard(x, x.above(0), say('low')`${'Segment'} ${3} of ${5} is ${x} long${'!'}`);
    expect(runOn(trace, [held], [-2, 0]).texts).toEqual(['Segment 3 of 5 is −2.000\u00a0m long!']);
  });

  it('never shows a figure that is no number', () => {
    const { trace, x, y } = lengths();
    const held = guard(x, x.above(0), say('low')`${x.over(y)} of it, ${x} in all`);
    expect(runOn(trace, [held], [-1, 0]).texts).toEqual(['? of it, −1.000\u00a0m in all']);
  });

  it('may have no figures at all', () => {
    const query = plainQuery('node 3', 'loop', 'These nodes feed each other');
    expect(queryText(query, 'US')).toBe('These nodes feed each other');
  });
});

describe('a guard in a derivative', () => {
  it('taken elsewhere fails by the figures of that place, and says them', () => {
    const { trace, x, y } = lengths();
    const p = trace.mark(x);
    const held = guard(p.squared(), p.above(y), say('low')`p is ${p}, below ${y}`);
    const [slope] = derivative([held], p, 1) as [Scalar];
    expect(runOn(trace, [slope], [10, 0.5])).toMatchObject({ values: [2], texts: [] });
    expect(runOn(trace, [slope], [10, 4])).toMatchObject({
      values: [WAITS],
      texts: ['p is 1.000\u00a0m, below 4.000\u00a0m'],
    });
  });

  it('or in a value taken elsewhere speaks for the node that wrote it', () => {
    const { trace, x, y } = lengths();
    trace.owner = 'node 1';
    const held = guard(x.squared(), x.above(y), say('low')`x is ${x}`);
    trace.owner = 'node 2';
    const [slope, value] = [...derivative([held], x, 1), ...substitute([held], x, 2)] as [Scalar, Scalar];
    for (const [output, words] of [
      [slope, 'x is 1.000\u00a0m'] as const,
      [value, 'x is 2.000\u00a0m'] as const,
    ]) {
      const found = runOn(trace, [output], [10, 4]);
      expect(found.texts).toEqual([words]);
      expect(found.queries.map(({ owner }) => owner)).toEqual(['node 1']);
    }
  });

  it('says the figures of that place beside a value that holds where it is', () => {
    const { trace, x, y } = lengths();
    const held = guard(x.squared(), x.above(y), say('low')`x is ${x}, below ${y}`);
    const [slope] = derivative([held], x, 1) as [Scalar];
    expect(runOn(trace, [held, slope], [10, 4])).toMatchObject({
      values: [100, WAITS],
      texts: ['x is 1.000\u00a0m, below 4.000\u00a0m'],
    });
  });

  it('makes the slope wait with the value, and speaks once for both', () => {
    const { trace, x } = lengths();
    const held = guard(x.squared(), x.above(0), say('low')`x is ${x}`);
    const slopes = [...derivative([held], x), ...gradient(held, [x])];
    expect(runOn(trace, [held, ...slopes], [-1, 0])).toMatchObject({
      values: [WAITS, WAITS, WAITS],
      texts: ['x is −1.000\u00a0m'],
    });
    expect(runOn(trace, [held, ...slopes], [3, 0])).toMatchObject({ values: [9, 6, 6], texts: [] });
  });

  it('speaks in a second derivative too', () => {
    const { trace, x } = lengths();
    const held = guard(x.power(3), x.above(0), say('low')`x is ${x}`);
    const [first] = derivative([held], x) as [Scalar];
    const second = derivative([first], x);
    expect(runOn(trace, second, [-1, 0])).toMatchObject({ values: [WAITS], texts: ['x is −1.000\u00a0m'] });
    expect(runOn(trace, second, [2, 0])).toMatchObject({ values: [12], texts: [] });
  });
});

describe('a gradient', () => {
  it('waits where the output waits, by every input that moves it', () => {
    const { trace, x, y } = lengths();
    const held = guard(x, x.above(0), say('low')`low`).plus(y.times(3));
    const slopes = gradient(held, [x, y]);
    expect(runOn(trace, slopes, [-1, 1]).values).toEqual([WAITS, WAITS]);
    expect(runOn(trace, slopes, [1, 1]).values).toEqual([1, 3]);
  });

  it('raises the query of what the output waits for', () => {
    const { trace, x, y } = lengths();
    const held = guard(x, x.above(0), say('low')`x is ${x}`).plus(y);
    expect(runOn(trace, gradient(held, [y]), [-1, 1]).texts).toEqual(['x is −1.000\u00a0m']);
  });
});

describe('a guard of slopes', () => {
  const slopes: [string, (value: Scalar, by: Scalar) => readonly Scalar[]][] = [
    ['forwards', (value, by) => derivative([value], by)],
    ['backwards', (value, by) => gradient(value, [by])],
  ];

  function root() {
    const { trace, x, y } = lengths();
    const inside = guardSlope(x.times(y), x.above(0), say('edge')`x is ${x}, where the slope has no bound`);
    return { trace, x, y, value: inside.squareRoot() };
  }

  it('says nothing of the value, and is no operation on its tape', () => {
    const { trace, value } = root();
    expect(runOn(trace, [value], [0, 5])).toEqual({ values: [0], queries: [], texts: [] });
    expect(finish(trace, [value]).guards).toEqual([]);
  });

  it.each(slopes)('speaks in a derivative %s where it fails', (_, by) => {
    const { trace, x, value } = root();
    const found = runOn(trace, by(value, x), [0, 5]);
    expect(found.values).toEqual([WAITS]);
    expect(found.texts).toEqual(['x is 0\u00a0m, where the slope has no bound']);
  });

  it.each(slopes)('passes a derivative %s on where it holds', (_, by) => {
    const { trace, x, value } = root();
    // By hand: d√(xy)/dx = ½ √(y/x).
    expect(runOn(trace, by(value, x), [5, 20])).toMatchObject({ values: [1], texts: [] });
  });

  it.each(slopes)('says nothing in a derivative %s that does not go through it', (_, by) => {
    const { trace, x, y } = lengths();
    const inside = guardSlope(x, x.above(0), say('edge')`edge`);
    const area = inside.times(y);
    expect(runOn(trace, by(area, y), [0, 5])).toEqual({ values: [0], queries: [], texts: [] });
  });

  it('speaks at the place where the derivative is taken', () => {
    const { trace, x, value } = root();
    expect(runOn(trace, derivative([value], x, 0), [5, 20]).texts).toEqual([
      'x is 0\u00a0m, where the slope has no bound',
    ]);
    expect(runOn(trace, derivative([value], x, 5), [0, 20])).toMatchObject({ values: [1], texts: [] });
  });

  it.each(slopes)('lets a slope be differentiated again %s', (_, by) => {
    const { trace, x, value } = root();
    const [slope] = by(value, x) as [Scalar];
    const found = runOn(trace, by(slope, x), [1, 4]);
    // By hand: d²√(xy)/dx² = −¼ √y x^(−3/2).
    expect(found).toMatchObject({ values: [-0.5], texts: [] });
    expect(runOn(trace, by(slope, x), [0, 4]).texts).toEqual(['x is 0\u00a0m, where the slope has no bound']);
  });
});
