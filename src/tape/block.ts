import { type Kernels, plainKernels } from './kernels.ts';
import { operation } from './operation.ts';
import { depthFirst } from './order.ts';
import { STRIDE, type Tape } from './tape.ts';

/** A value of a block's input: one for all variants, or one for each. */
export type BlockInput = number | ArrayLike<number>;

/**
 * A tape prepared for runs of many variants at once: every operation is carried out on a row of `width`
 * variants before the next one. Rows that nothing reads any more are used again, so that the whole block
 * stays in the processor's cache.
 */
export class Block {
  readonly width: number;
  /** How many rows the block needs at a time. */
  readonly rows: number;
  private readonly tape: Tape;
  private readonly memory: Float64Array;
  private readonly program: Int32Array;
  private readonly outputRows: Int32Array;
  private readonly kernels: Kernels;

  /**
   * @param width how many variants a run takes at the most.
   * @param kernels the way of carrying out the operations.
   */
  constructor(tape: Tape, width: number, kernels: Kernels = plainKernels) {
    this.tape = tape;
    this.width = width;
    this.kernels = kernels;
    const plan = planRows(tape);
    this.rows = plan.rows;
    this.program = plan.program;
    this.outputRows = plan.outputRows;
    this.memory = new Float64Array(plan.rows * width);
    for (const [i, constant] of tape.constants.entries()) {
      const row = tape.inputs.length + i;
      this.memory.fill(constant, row * width, (row + 1) * width);
    }
  }

  /**
   * Runs `count` variants.
   *
   * @param inputs one entry for each input of the tape.
   * @returns for each output its `count` values. They are views into the block: copy what must outlast the
   *   next run.
   */
  run(inputs: readonly BlockInput[], count: number): readonly Float64Array[] {
    const { memory, width, program } = this;
    if (count > width) throw new RangeError(`the block takes ${width} variants at a time, not ${count}`);
    if (inputs.length !== this.tape.inputs.length) {
      throw new RangeError(`the tape has ${this.tape.inputs.length} inputs, not ${inputs.length}`);
    }
    for (const [row, input] of inputs.entries()) {
      if (typeof input === 'number') memory.fill(input, row * width, row * width + count);
      else {
        if (input.length < count)
          throw new RangeError(`input ${row} has ${input.length} values, not ${count}`);
        for (let i = 0; i < count; i++) memory[row * width + i] = input[i] as number;
      }
    }
    for (let at = 0; at < program.length; at += STRIDE + 1) {
      const kernel = this.kernels.get(program[at] as number);
      if (kernel === undefined) throw new Error(`no kernel for ${operation(program[at] ?? -1).name}`);
      kernel(
        memory,
        (program[at + 1] as number) * width,
        (program[at + 2] as number) * width,
        (program[at + 3] as number) * width,
        (program[at + 4] as number) * width,
        count,
      );
    }
    return Array.from(this.outputRows, (row) => memory.subarray(row * width, row * width + count));
  }
}

interface RowPlan {
  readonly rows: number;
  /** For each instruction: operation, row of the result, rows of three operands. */
  readonly program: Int32Array;
  readonly outputRows: Int32Array;
}

/** Gives each register a row, and each row to another register once its value has been read for the last time. */
function planRows({ inputs, constants, code, outputs }: Tape): RowPlan {
  const base = inputs.length + constants.length;
  const order = depthFirst(code, base, outputs);
  const registers = base + code.length / STRIDE;
  const lastRead = new Int32Array(registers).fill(-1);
  for (const [step, i] of order.entries()) {
    for (let k = 1; k < STRIDE; k++) {
      const register = code[i * STRIDE + k] as number;
      if (register >= 0) lastRead[register] = step;
    }
  }
  // Inputs and constants keep their rows from run to run; outputs must last to the end of one.
  for (let register = 0; register < base; register++) lastRead[register] = order.length;
  for (const register of outputs) lastRead[register] = order.length;

  const rowOf = Int32Array.from({ length: registers }, (_, register) => register);
  const free: number[] = [];
  let rows = base;
  const program: number[] = [];
  for (const [step, i] of order.entries()) {
    const operands = code.subarray(i * STRIDE + 1, (i + 1) * STRIDE);
    const operandRows = Array.from(operands, (register) => (register < 0 ? 0 : (rowOf[register] as number)));
    // An operand's row may take the result: kernels read a place before they write it.
    for (const register of new Set(operands)) {
      if (register >= base && lastRead[register] === step) free.push(rowOf[register] as number);
    }
    const row = free.pop() ?? rows++;
    rowOf[base + i] = row;
    program.push(code[i * STRIDE] as number, row, ...operandRows);
  }
  return {
    rows,
    program: Int32Array.from(program),
    outputRows: Int32Array.from(outputs, (register) => rowOf[register] as number),
  };
}
