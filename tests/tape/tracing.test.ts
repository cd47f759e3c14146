import { describe, expect, it } from 'vitest';
import { AREA, FORCE, LENGTH, MOMENT, NONE } from '../../src/quantity/index.ts';
import {
  arctangent,
  Condition,
  evaluate,
  finish,
  hypotenuse,
  operationCount,
  printTape,
  type Scalar,
  Trace,
} from '../../src/tape/index.ts';

function inputs() {
  const trace = new Trace();
  return { trace, x: trace.input('x', LENGTH), y: trace.input('y', LENGTH), f: trace.input('f', FORCE) };
}

describe('quantities that do not go together', () => {
  const { x, f } = inputs();
  it.each([
    ['a sum', () => x.plus(f), "a force can't be added to a length"],
    ['a difference', () => x.minus(f), "a force can't be taken from a length"],
    ['a comparison', () => x.below(f), "a force can't be compared with a length"],
    ['a length and a number', () => x.plus(1), 'a plain number is wanted where a length stands'],
    ['the sine of a length', () => x.sine(), 'the sine is wanted where a length stands: divide it first'],
    ['the logarithm of a force', () => f.logarithm(), 'where a force stands'],
    ['a choice', () => x.below(0).choose(x, f), 'a choice between a length and a force'],
    ['an angle', () => arctangent(x, f), 'a length across and a force along have no angle'],
  ])('%s is refused in words', (_, act, words) => {
    expect(act).toThrow(words);
  });

  it('multiply to what they are', () => {
    expect(x.times(f).dimension).toBe(MOMENT);
    expect(x.times(x).dimension).toBe(AREA);
    expect(x.times(x).squareRoot().dimension).toBe(LENGTH);
    expect(x.power(3).over(x).dimension).toBe(AREA);
    expect(x.over(x).dimension).toBe(NONE);
  });

  it('take 0 for one of themselves', () => {
    expect(x.plus(0).index).toBe(x.index);
    expect(x.above(0)).toBeInstanceOf(Condition);
  });
});

describe('a trace', () => {
  it('computes equal subexpressions once, whichever way round they are written', () => {
    const { x, y } = inputs();
    expect(x.plus(y).index).toBe(y.plus(x).index);
    expect(x.times(y).index).toBe(y.times(x).index);
    expect(x.minus(y).index).not.toBe(y.minus(x).index);
    expect(hypotenuse(x, y).index).toBe(hypotenuse(x, y).index);
  });

  it('folds constants', () => {
    const trace = new Trace();
    const three = trace.constant(3, NONE).times(2).minus(3);
    expect(trace.constantAt(three.index)).toBe(3);
    // What has no finite value stays an operation, and shows when it runs.
    const none = trace.constant(1, NONE).over(0);
    expect(trace.constantAt(none.index)).toBeUndefined();
  });

  it('leaves out what changes nothing', () => {
    const { trace, x } = inputs();
    const same: Scalar[] = [x.plus(0), x.minus(0), x.times(1), x.over(1), x.power(1), x.negated().negated()];
    for (const scalar of same) expect(scalar.index).toBe(x.index);
    expect(trace.constantAt(x.times(0).index)).toBe(0);
    expect(x.power(0).dimension).toBe(NONE);
  });

  it('gives a mark to each asker, and never shares it', () => {
    const { trace, x } = inputs();
    expect(trace.mark(x).index).not.toBe(trace.mark(x).index);
  });

  it('takes finite constants and its own scalars only', () => {
    const { trace, x } = inputs();
    expect(() => trace.constant(Number.NaN, NONE)).toThrow('finite');
    expect(() => x.plus(inputs().x)).toThrow('two traces');
  });
});

describe('a finished tape', () => {
  it('drops what nothing reads, and keeps the place of every input', () => {
    const { trace, x, y } = inputs();
    hypotenuse(x, y);
    const tape = finish(trace, [x.minus(y)]);
    expect(operationCount(tape)).toBe(1);
    expect(tape.inputs.map(({ name }) => name)).toEqual(['x', 'y', 'f']);
    expect([...evaluate(tape, [5, 3, 0])]).toEqual([2]);
  });

  it('can give an input or a constant as an output', () => {
    const { trace, x } = inputs();
    const tape = finish(trace, [x, trace.constant(7, NONE), trace.mark(x)]);
    expect([...evaluate(tape, [5, 3, 0])]).toEqual([5, 7, 5]);
  });

  it('can be read', () => {
    const { trace, x, y } = inputs();
    expect(printTape(finish(trace, [x.plus(y).times(2)]))).toBe(
      [
        'r0 = input x [m]',
        'r1 = input y [m]',
        'r2 = input f [m·kg·s⁻²]',
        'r3 = 2',
        'r4 = add r0 r1',
        'r5 = multiply r4 r3',
        'outputs r5',
      ].join('\n'),
    );
  });
});
