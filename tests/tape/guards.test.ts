import { describe, expect, it } from 'vitest';
import { LENGTH, NONE } from '../../src/quantity/index.ts';
import {
  asAngle,
  derivative,
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

/** Outputs and texts of queries after a run. */
function runOn(
  trace: Trace,
  outputs: readonly Scalar[],
  inputs: readonly number[],
  system: 'SI' | 'US' = 'SI',
) {
  const tape = finish(trace, outputs);
  const registers = registersFor(tape);
  run(tape, inputs, registers);
  return {
    values: Array.from(tape.outputs, (register) => registers[register] as number),
    queries: failedGuards(tape, registers).map((query) => queryText(query, system)),
    owners: failedGuards(tape, registers).map(({ owner }) => owner),
  };
}

function lengths() {
  const trace = new Trace();
  const [x, y] = [trace.input('x', LENGTH), trace.input('y', LENGTH)];
  return { trace, x, y };
}

describe('a guard', () => {
  it('passes its value on while it holds', () => {
    const { trace, x, y } = lengths();
    const held = guard(x, x.above(y), say('short')`x is short by ${y.minus(x)}`);
    expect(runOn(trace, [held.times(2)], [5, 3])).toMatchObject({ values: [10], queries: [] });
  });

  it('raises its query with live figures in either system, and what depends on it waits', () => {
    const { trace, x, y } = lengths();
    trace.owner = 'node 7';
    const held = guard(x, x.above(y), say('short')`x is short by ${y.minus(x)}: lengthen it`);
    const after = held.plus(y);
    const si = runOn(trace, [after, y.times(2)], [3, 5.5]);
    expect(si.values).toEqual([Number.NaN, 11]);
    expect(si.queries).toEqual(['x is short by 2.500\u00a0m: lengthen it']);
    expect(si.owners).toEqual(['node 7']);
    expect(runOn(trace, [after], [3, 3.3048], 'US').queries).toEqual([
      'x is short by 1.000\u00a0ft: lengthen it',
    ]);
  });

  it('is silent where its own condition waits', () => {
    const { trace, x, y } = lengths();
    const first = guard(x, x.above(0), say('first')`x is ${x}`);
    const second = guard(first.plus(y), first.above(y), say('second')`too short`);
    expect(runOn(trace, [second], [-1, 5]).queries).toEqual(['x is −1.000\u00a0m']);
  });

  it('speaks once, however often it is written', () => {
    const { trace, x } = lengths();
    const again = () => guard(x.times(2), x.above(0), say('low')`x is ${x}`);
    const other = guard(x.times(3), x.above(0), say('low')`x is ${x}`);
    expect(runOn(trace, [again(), again(), other], [-1, 0]).queries).toHaveLength(1);
  });

  it('prints an angle in degrees', () => {
    const trace = new Trace();
    const a = trace.input('a', NONE);
    const held = guard(a, a.below(0), say('steep')`it is turned by ${asAngle(a)}`);
    expect(runOn(trace, [held], [Math.PI / 6]).queries).toEqual(['it is turned by 30.00°']);
  });

  it('is not written where it is known to hold', () => {
    const { trace, x } = lengths();
    const known = trace.constant(2, LENGTH);
    expect(guard(x, known.above(0), say('never')`never`).index).toBe(x.index);
  });

  it('in a derivative taken elsewhere says the figures of that place', () => {
    const { trace, x, y } = lengths();
    const p = trace.mark(x);
    const held = guard(p.squared(), p.above(y), say('low')`p is ${p}, below ${y}`);
    const [slope] = derivative([held], p, 1) as [Scalar];
    expect(runOn(trace, [slope], [10, 0.5])).toMatchObject({ values: [2], queries: [] });
    expect(runOn(trace, [slope], [10, 4])).toMatchObject({
      values: [Number.NaN],
      queries: ['p is 1.000\u00a0m, below 4.000\u00a0m'],
    });
  });
});

describe('a guard of slopes', () => {
  function root() {
    const { trace, x, y } = lengths();
    const inside = guardSlope(x.times(y), x.above(0), say('edge')`x is ${x}, where the slope has no bound`);
    return { trace, x, y, value: inside.squareRoot() };
  }

  it('says nothing of the value', () => {
    const { trace, value } = root();
    expect(runOn(trace, [value], [0, 5])).toMatchObject({ values: [0], queries: [] });
  });

  it('speaks in a derivative, forwards and backwards', () => {
    for (const slopes of [
      ({ value, x }: ReturnType<typeof root>) => derivative([value], x),
      ({ value, x }: ReturnType<typeof root>) => gradient(value, [x]),
    ]) {
      const made = root();
      const [slope] = slopes(made) as [Scalar];
      const found = runOn(made.trace, [slope], [0, 5]);
      expect(found.values).toEqual([Number.NaN]);
      expect(found.queries).toEqual(['x is 0\u00a0m, where the slope has no bound']);
      expect(runOn(made.trace, [slope], [5, 5]).values[0]).toBeCloseTo(0.5, 14);
    }
  });
});

describe('what waits', () => {
  it('has a gradient that waits too', () => {
    const { trace, x, y } = lengths();
    const held = guard(x, x.above(0), say('low')`low`).plus(y.times(3));
    const slopes = gradient(held, [x, y]);
    expect(runOn(trace, slopes, [-1, 1]).values).toEqual([Number.NaN, Number.NaN]);
    expect(runOn(trace, slopes, [1, 1]).values).toEqual([1, 3]);
  });

  it('does no harm in a branch that is not chosen, in value and slopes', () => {
    const { trace, x, y } = lengths();
    const broken = guard(x.squared().over(y.minus(y)), x.below(0), say('odd')`odd`);
    const value = x.above(0).choose(x.squared().over(y), broken);
    const [forward] = derivative([value], x) as [Scalar];
    const [byX, byY] = gradient(value, [x, y]) as [Scalar, Scalar];
    expect(runOn(trace, [value, forward, byX, byY], [3, 2]).values).toEqual([4.5, 3, 3, -2.25]);
  });
});
