import { describe, expect, it } from 'vitest';
import { NONE } from '../../src/quantity/index.ts';
import {
  type BlockInput,
  Op,
  operation,
  operations,
  registerCount,
  STRIDE,
  type Tape,
} from '../../src/tape/index.ts';
import { randomFrom } from '../support/random.ts';
import { gradientProgram, randomProgram, SPECIAL } from './programs.ts';

/** A tape made ready by one way of running. */
export interface Runner {
  /** How many variants a run takes at the most. */
  readonly width: number;
  /** For each output its `count` values, copied: a later run must not change them. */
  run(inputs: readonly BlockInput[], count: number): number[][];
}

/** One way of running tapes, as the suite below calls it. */
export interface Way {
  readonly name: string;
  prepare(tape: Tape): Runner;
}

/**
 * What every way of running holds: the same bits as the table of operations. A new way (SIMD, say) joins by an
 * adapter of type `Way`.
 */
export function conforms(way: Way): void {
  describe(`running ${way.name}`, () => {
    it.each(runnable)(
      'carries out $name on special values as the table says, to the bit',
      ({ code, operands }) => {
        const tape = single(code, operands);
        const cases = combinations(operands);
        expectSame(runAll(way, tape, cases), tape, cases);
      },
    );

    it('gives the bits of the table on random programs with special values', () => {
      for (let seed = 0; seed < 150; seed++) {
        const tape = randomProgram(seed);
        const cases = someInputs(tape, seed, 20);
        expectSame(runAll(way, tape, cases), tape, cases, `program ${seed}`);
      }
    });

    it('gives the bits of the table on random derivatives and gradients', () => {
      for (let seed = 0; seed < 40; seed++) {
        const tape = gradientProgram(seed);
        const cases = someInputs(tape, seed, 20);
        expectSame(runAll(way, tape, cases), tape, cases, `program ${seed}`);
      }
    });

    it('takes one value for all variants and one for each side by side', () => {
      const random = randomFrom(7);
      for (let seed = 0; seed < 40; seed++) {
        const tape = randomProgram(seed);
        const runner = way.prepare(tape);
        const count = Math.min(runner.width, 13);
        const cases = someInputs(tape, seed, count);
        const inputs = tape.inputs.map((_, k): BlockInput => {
          const row = cases.map((values) => values[k] as number);
          const kind = random.whole(0, 2);
          if (kind === 0) {
            for (const values of cases) values[k] = row[0] as number;
            return row[0] as number;
          }
          // A row may be longer than what is run of it, and any list of numbers.
          return kind === 1 ? Float64Array.of(...row, Number.NaN, 7) : row;
        });
        expectSame(transposed(runner.run(inputs, count), count), tape, cases, `program ${seed}`);
      }
    });

    it('can be run again: nothing of an earlier run is left, nor of how many variants it took', () => {
      for (let seed = 0; seed < 30; seed++) {
        const tape = randomProgram(seed);
        const runner = way.prepare(tape);
        const nothing = tape.inputs.map(() => Number.NaN);
        for (const wanted of [1, runner.width, 3, 1, runner.width]) {
          const count = Math.min(wanted, runner.width, 100);
          const cases = someInputs(tape, seed + count, count);
          const inputs = tape.inputs.map((_, k) => cases.map((values) => values[k] as number));
          expectSame(transposed(runner.run(inputs, count), count), tape, cases, `program ${seed}`);
          runner.run(nothing, Math.min(runner.width, 100));
        }
      }
    });

    it('runs two tapes in turns, and one tape prepared twice', () => {
      const [one, other] = [randomProgram(1), randomProgram(2)];
      const runners = [one, other, one].map((tape) => ({ tape, runner: way.prepare(tape) }));
      for (let turn = 0; turn < 6; turn++) {
        for (const [k, { tape, runner }] of runners.entries()) {
          const cases = someInputs(tape, 10 * turn + k, 1);
          expectSame(transposed(runner.run(cases[0] as number[], 1), 1), tape, cases, `turn ${turn}`);
        }
      }
    });

    it('gives the same bits when it has run so often that it is compiled', () => {
      const tape = randomProgram(3);
      const runner = way.prepare(tape);
      const count = Math.min(runner.width, 64);
      const cases = someInputs(tape, 3, count);
      const inputs = tape.inputs.map((_, k) => cases.map((values) => values[k] as number));
      for (let i = 0; i < 10_000; i += count) runner.run(inputs, count);
      expectSame(transposed(runner.run(inputs, count), count), tape, cases);
    });

    it('gives inputs and constants as outputs, and one result as several', () => {
      const tape: Tape = {
        ...single(Op.add, 2),
        constants: Float64Array.of(7),
        outputs: Int32Array.of(1, 2, 3, 3, 0),
      };
      // One operation, of the two inputs, its result behind the constant.
      expect(way.prepare(tape).run([5, [4]], 1)).toEqual([[4], [7], [9], [9], [5]]);
    });

    it('gives nothing for no variants', () => {
      expect(way.prepare(single(Op.add, 2)).run([1, []], 0)).toEqual([[]]);
    });

    it('runs a tape that has been through the post to a worker', () => {
      const tape = randomProgram(4);
      const cases = someInputs(tape, 4, 5);
      expectSame(runAll(way, structuredClone(tape), cases), tape, cases);
    });

    it('says how many inputs the tape takes', () => {
      const runner = way.prepare(single(Op.add, 2));
      expect(() => runner.run([1], 1)).toThrow('the tape has 2 inputs, not 1');
      expect(() => runner.run([1, 2, 3], 1)).toThrow('the tape has 2 inputs, not 3');
      expect(runner.run([1, 2], 1), 'after a refusal').toEqual([[3]]);
    });
  });
}

/** The operations that stand on tapes. The others say something to derivatives or to the tape's making only. */
const runnable = operations
  .map(({ name, operands }, code) => ({ name, code, operands }))
  .filter(({ name }) => !['input', 'constant', 'mark', 'guardSlope'].includes(name));

/** A tape of one operation on so many inputs. */
function single(code: number, operands: number): Tape {
  return {
    inputs: Array.from({ length: operands }, (_, i) => ({ name: `input ${i}`, dimension: NONE })),
    constants: new Float64Array(),
    code: Int32Array.from({ length: STRIDE }, (_, k) => (k === 0 ? code : k <= operands ? k - 1 : -1)),
    outputs: Int32Array.of(operands),
    guards: [],
  };
}

function combinations(length: number): number[][] {
  if (length === 0) return [[]];
  return combinations(length - 1).flatMap((start) => SPECIAL.map((value) => [...start, value]));
}

function someInputs(tape: Tape, seed: number, count: number): number[][] {
  const random = randomFrom(seed + 1e6);
  return Array.from({ length: count }, () =>
    tape.inputs.map(() =>
      random(0, 1) < 0.4 ? (SPECIAL[random.whole(0, SPECIAL.length - 1)] as number) : random(-10, 10),
    ),
  );
}

/** The reference: the table of operations, one instruction after the other. */
function byTable(tape: Tape, inputs: readonly number[]): number[] {
  const registers = new Float64Array(registerCount(tape));
  registers.set([...inputs, ...tape.constants]);
  const value = (register = -1): number => registers[register] ?? Number.NaN;
  const base = inputs.length + tape.constants.length;
  for (let i = 0; i < tape.code.length / STRIDE; i++) {
    const [code = -1, a, b, c] = tape.code.subarray(i * STRIDE, (i + 1) * STRIDE);
    registers[base + i] = operation(code).value(value(a), value(b), value(c));
  }
  return Array.from(tape.outputs, value);
}

/** All cases, as many at a time as the way takes: for each its outputs. */
function runAll(way: Way, tape: Tape, cases: readonly (readonly number[])[]): number[][] {
  const runner = way.prepare(tape);
  const results: number[][] = [];
  for (let start = 0; start < cases.length; start += runner.width) {
    const part = cases.slice(start, start + runner.width);
    const rows = tape.inputs.map((_, k) => part.map((values) => values[k] as number));
    results.push(...transposed(runner.run(rows, part.length), part.length));
  }
  return results;
}

function transposed(rows: readonly (readonly number[])[], count: number): number[][] {
  return Array.from({ length: count }, (_, i) => rows.map((row) => row[i] as number));
}

function expectSame(
  results: readonly (readonly number[])[],
  tape: Tape,
  cases: readonly (readonly number[])[],
  where = 'tape',
): void {
  expect(results.length).toBe(cases.length);
  for (const [i, found] of results.entries()) {
    const inputs = cases[i] as readonly number[];
    const wanted = byTable(tape, inputs);
    const wrong = wanted.findIndex((value, k) => !Object.is(value, found[k]));
    if (wrong >= 0) {
      expect.fail(
        `${where}, output ${wrong} of (${inputs.join(', ')}): ${found[wrong]}, not ${wanted[wrong]}`,
      );
    }
  }
}
