import { describe, expect, it } from 'vitest';
import { NONE } from '../../src/quantity/index.ts';
import {
  Block,
  evaluate,
  finish,
  operation,
  registersFor,
  run,
  STRIDE,
  type Tape,
  Trace,
} from '../../src/tape/index.ts';
import { randomFrom } from '../support/random.ts';
import { randomProgram, SPECIAL } from './programs.ts';

/** One way of running a tape for a list of variants; the suite below serves every one of them. */
interface Way {
  readonly name: string;
  run(tape: Tape, variants: readonly (readonly number[])[]): number[][];
}

const ways: readonly Way[] = [
  {
    name: 'one by one',
    run: (tape, variants) => variants.map((inputs) => [...evaluate(tape, inputs)]),
  },
  ...[1, 7, 64, 1024].map((width) => ({
    name: `in plain JavaScript blocks of ${width}`,
    run(tape: Tape, variants: readonly (readonly number[])[]) {
      const block = new Block(tape, width);
      const results: number[][] = [];
      for (let start = 0; start < variants.length; start += width) {
        const part = variants.slice(start, start + width);
        const rows = tape.inputs.map((_, k) => part.map((inputs) => inputs[k] as number));
        const outputs = block.run(rows, part.length);
        results.push(...part.map((_, i) => outputs.map((row) => row[i] as number)));
      }
      return results;
    },
  })),
];

/** The reference: the table of operations, one instruction after the other. */
function reference(tape: Tape, inputs: readonly number[]): number[] {
  const registers = [...inputs, ...tape.constants];
  for (let at = 0; at < tape.code.length; at += STRIDE) {
    const [code = -1, a = -1, b = -1, c = -1] = tape.code.subarray(at, at + STRIDE);
    const value = (register: number): number => registers[register] ?? Number.NaN;
    registers.push(operation(code).value(value(a), value(b), value(c)));
  }
  return Array.from(tape.outputs, (register) => registers[register] as number);
}

describe.each(ways)('running $name', (way) => {
  it('gives the same bits as the table of operations on 200 random programs with special values', () => {
    for (let seed = 0; seed < 200; seed++) {
      const tape = randomProgram(seed);
      const random = randomFrom(seed + 1e6);
      const variants = Array.from({ length: 20 }, () =>
        tape.inputs.map(() =>
          random(0, 1) < 0.4 ? (SPECIAL[random.whole(0, SPECIAL.length - 1)] as number) : random(-10, 10),
        ),
      );
      for (const [i, found] of way.run(tape, variants).entries()) {
        const wanted = reference(tape, variants[i] as number[]);
        const wrong = found.findIndex((value, k) => !Object.is(value, wanted[k]));
        expect(wrong, `program ${seed}, variant ${i}: ${found[wrong]}, not ${wanted[wrong]}`).toBe(-1);
      }
    }
  });
});

describe('a block', () => {
  const trace = new Trace();
  const [x, y] = [trace.input('x', NONE), trace.input('y', NONE)];
  const tape = finish(trace, [x.times(y).plus(1), x.times(y).squared(), y]);

  it('takes one value for all variants or one for each, and can be run again', () => {
    const block = new Block(tape, 8);
    expect([...(block.run([3, [1, 2, 4]], 3)[0] ?? [])]).toEqual([4, 7, 13]);
    expect([...(block.run([[1, 2], -1], 2)[1] ?? [])]).toEqual([1, 4]);
    expect([...(block.run([0, 5], 1)[2] ?? [])]).toEqual([5]);
  });

  it('says how many variants and inputs it takes', () => {
    const block = new Block(tape, 8);
    expect(() => block.run([1, 2], 9)).toThrow('8 variants at a time, not 9');
    expect(() => block.run([1], 1)).toThrow('2 inputs, not 1');
    expect(() => block.run([1, [1, 2]], 3)).toThrow('input 1 has 2 values, not 3');
    expect(() => run(tape, [1], registersFor(tape))).toThrow('2 inputs, not 1');
  });

  it('uses rows again that nothing reads any more', () => {
    const long = new Trace();
    let value = long.input('x', NONE);
    for (let i = 0; i < 1000; i++) value = value.sine().plus(1);
    expect(new Block(finish(long, [value]), 4).rows).toBeLessThan(6);
  });
});
