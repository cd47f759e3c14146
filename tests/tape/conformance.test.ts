import { describe, expect, it } from 'vitest';
import { NONE } from '../../src/quantity/index.ts';
import {
  Block,
  finish,
  type Kernels,
  Op,
  operations,
  outputsOf,
  plainKernels,
  registersFor,
  run,
  type Scalar,
  Trace,
} from '../../src/tape/index.ts';
import { conforms, type Way } from './conformance.ts';

const oneByOne: Way = {
  name: 'one by one',
  prepare(tape) {
    const registers = registersFor(tape);
    return {
      width: 64,
      run(inputs, count) {
        const results = Array.from(tape.outputs, (): number[] => []);
        for (let i = 0; i < count; i++) {
          const given = inputs.map((input) => (typeof input === 'number' ? input : (input[i] as number)));
          run(tape, given, registers);
          for (const [k, value] of outputsOf(tape, registers).entries()) results[k]?.push(value);
        }
        return results;
      },
    };
  },
};

function inBlocks(width: number, name: string, kernels?: Kernels): Way {
  return {
    name: `in ${name} of ${width}`,
    prepare(tape) {
      const block = new Block(tape, width, kernels);
      return { width, run: (inputs, count) => block.run(inputs, count).map((row) => [...row]) };
    },
  };
}

conforms(oneByOne);
for (const width of [1, 7, 64, 1024]) conforms(inBlocks(width, 'plain JavaScript blocks'));

describe('a block', () => {
  const trace = new Trace();
  const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
  const tape = finish(trace, [x.times(y).plus(1), x.times(y).squared(), y]);

  it('takes no more variants than its width, and no fewer values than variants', () => {
    const block = new Block(tape, 8);
    expect(() => block.run([1, 2], 9)).toThrow('the block takes 8 variants at a time, not 9');
    expect(() => block.run([1, [1, 2]], 3)).toThrow('input 1 has 2 values, not 3');
    expect(() => block.run([new Float64Array(), 1], 1)).toThrow('input 0 has 0 values, not 1');
    // A refusal leaves it fit for the next run.
    expect(block.run([3, [1, 2, 4]], 3).map((row) => [...row])).toEqual([
      [4, 7, 13],
      [9, 36, 144],
      [1, 2, 4],
    ]);
  });

  it('leaves the rows that it is given as they are', () => {
    const block = new Block(tape, 4);
    const row = Float64Array.of(1, 2, 3, 4);
    block.run([row, 2], 4);
    expect([...row]).toEqual([1, 2, 3, 4]);
  });

  it('uses rows again that nothing reads any more', () => {
    const long = new Trace();
    let value = long.input('x', NONE);
    for (let i = 0; i < 1000; i++) value = value.sine().plus(1);
    // The input, the constant 1, and the two results that are alive at a time at the most.
    expect(new Block(finish(long, [value]), 4).rows).toBeLessThanOrEqual(4);
  });

  it('keeps a row for each value that is still wanted', () => {
    const wide = new Trace();
    const input = wide.input('x', NONE);
    const values: Scalar[] = [];
    for (let i = 1; i <= 50; i++) values.push(input.times(i).sine());
    const [first, ...others] = [...values, ...values.toReversed()] as [Scalar, ...Scalar[]];
    const total = others.reduce((sum, term) => sum.times(0.5).plus(term), first);
    const [row] = new Block(finish(wide, [total, ...values]), 2).run([[0.3, 0.7]], 2);
    for (const [i, at] of [0.3, 0.7].entries()) {
      const sines = Array.from({ length: 50 }, (_, k) => Math.sin(at * (k + 1)));
      expect(row?.[i]).toBe([...sines, ...sines.toReversed()].reduce((sum, term) => sum * 0.5 + term));
    }
  });

  it('says which operation its kernels lack', () => {
    const kernels = new Map([...plainKernels].filter(([code]) => code !== Op.multiply));
    expect(() => new Block(tape, 4, kernels).run([1, 2], 1)).toThrow('no kernel for multiply');
  });
});

describe('the plain kernels', () => {
  it('are there for every operation of the table that can stand on a tape', () => {
    const never = new Set<number>([Op.input, Op.constant, Op.mark, Op.guardSlope]);
    expect([...plainKernels.keys()]).toEqual(
      operations.map((_, code) => code).filter((code) => !never.has(code)),
    );
  });
});

describe('running one by one', () => {
  it('refuses an operation that it does not know, as of a tape of a later version', () => {
    const trace = new Trace();
    const tape = finish(trace, [trace.input('x', NONE).sine()]);
    const later = { ...tape, code: Int32Array.from(tape.code, (part, k) => (k === 0 ? 99 : part)) };
    expect(() => run(later, [1], registersFor(later))).toThrow('no way to run operation 99');
  });

  it('keeps the constants in the registers from run to run', () => {
    const trace = new Trace();
    const tape = finish(trace, [trace.input('x', NONE).times(3)]);
    const registers = registersFor(tape);
    run(tape, [Number.NaN], registers);
    run(tape, [2], registers);
    expect([...outputsOf(tape, registers)]).toEqual([6]);
  });
});
