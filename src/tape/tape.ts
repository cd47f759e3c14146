import type { Measure } from '../quantity/index.ts';
import { Op, type OpCode } from './operation.ts';
import { inSeries, STRIDE } from './order.ts';
import type { Query } from './query.ts';
import type { Scalar } from './scalar.ts';
import { NO_OPERAND, type TapeInput, type Trace, type TracedGuard } from './trace.ts';

export { STRIDE };

/**
 * A flat program. Its registers are, in this order: the inputs, the constants, and one for the result of each
 * instruction. Instructions of one operation stand in series (see `inSeries`). Plain data: it can be sent to a
 * worker as it is.
 */
export interface Tape {
  readonly inputs: readonly TapeInput[];
  readonly constants: Float64Array;
  /** Instructions of `STRIDE` numbers: operation, three registers (−1 where there is none). */
  readonly code: Int32Array;
  /** The register of each output. */
  readonly outputs: Int32Array;
  readonly guards: readonly TapeGuard[];
}

/** A guard on a tape: where its result and its condition stand, who it belongs to, what it says. */
export interface TapeGuard {
  readonly result: number;
  readonly condition: number;
  readonly owner: string | undefined;
  readonly code: string;
  readonly parts: readonly string[];
  readonly figures: readonly { readonly register: number; readonly measure: Measure }[];
}

/** How many registers a tape needs. */
export function registerCount(tape: Tape): number {
  return tape.inputs.length + tape.constants.length + tape.code.length / STRIDE;
}

/** How many operations a run of the tape carries out. */
export function operationCount(tape: Tape): number {
  return tape.code.length / STRIDE;
}

/**
 * The flat tape that gives `outputs`. What they do not read is dropped; marks and guards of slopes, which say
 * something to derivatives only, go too. Every input of the trace keeps its place, read or not.
 */
export function finish(trace: Trace, outputs: readonly Scalar[]): Tape {
  trace.mustOwn(outputs);
  const live = liveness(trace, outputs);
  const register = new Int32Array(trace.length).fill(NO_OPERAND);
  const constants: number[] = [];
  for (let i = 0; i < trace.length; i++) {
    if (trace.codes[i] === Op.input) register[i] = trace.first[i] ?? NO_OPERAND;
    if (trace.codes[i] !== Op.constant || live[i] !== 1) continue;
    register[i] = trace.inputs.length + constants.length;
    constants.push(trace.constantAt(i) ?? Number.NaN);
  }

  const base = trace.inputs.length + constants.length;
  const code: number[] = [];
  const guarded: number[] = [];
  const at = (index: number | undefined): number =>
    index === undefined || index < 0 ? NO_OPERAND : (register[index] ?? NO_OPERAND);
  for (let i = 0; i < trace.length; i++) {
    const op = trace.codes[i] as OpCode;
    if (live[i] !== 1 || op === Op.input || op === Op.constant) continue;
    if (op === Op.mark || op === Op.guardSlope) {
      register[i] = at(trace.first[i]);
      continue;
    }
    register[i] = base + code.length / STRIDE;
    const third = op === Op.guard ? NO_OPERAND : at(trace.third[i]);
    code.push(op, at(trace.first[i]), at(trace.second[i]), third);
    if (op === Op.guard) guarded.push(i);
  }

  const order = inSeries(code, base);
  const place = new Int32Array(order.length);
  for (const [to, from] of order.entries()) place[from] = to;
  const renumber = (old: number): number => (old < base ? old : base + (place[old - base] as number));
  const ordered = new Int32Array(code.length);
  for (const [to, from] of order.entries()) {
    ordered[to * STRIDE] = code[from * STRIDE] as number;
    for (let k = 1; k < STRIDE; k++) ordered[to * STRIDE + k] = renumber(code[from * STRIDE + k] as number);
  }
  return {
    inputs: [...trace.inputs],
    constants: Float64Array.from(constants),
    code: ordered,
    outputs: Int32Array.from(outputs, (output) => renumber(at(output.index))),
    guards: guarded.map((i) => {
      const { owner, query } = trace.guards[trace.third[i] as number] as TracedGuard;
      return {
        result: renumber(at(i)),
        condition: renumber(at(trace.second[i])),
        owner,
        code: query.code,
        parts: query.parts,
        figures: query.figures.map(({ scalar, measure }) => ({
          register: renumber(at(scalar.index)),
          measure,
        })),
      };
    }),
  };
}

function liveness(trace: Trace, outputs: readonly Scalar[]): Uint8Array {
  const live = new Uint8Array(trace.length);
  for (const output of outputs) live[output.index] = 1;
  for (let i = trace.length - 1; i >= 0; i--) {
    if (live[i] !== 1) continue;
    if (trace.codes[i] === Op.mark || trace.codes[i] === Op.guardSlope) {
      live[trace.first[i] ?? 0] = 1;
      continue;
    }
    trace.eachOperand(i, (operand) => {
      live[operand] = 1;
    });
  }
  return live;
}

/**
 * The queries of the guards that fail, after a run: each text of an owner once. A guard whose condition itself
 * waits is silent, since the query that it waits for stands elsewhere; and so is one that no output waits for,
 * as in a branch that was not chosen.
 *
 * @param registers as the run left them.
 */
export function failedGuards(tape: Tape, registers: Float64Array): Query[] {
  const failed = new Map<string, Query>();
  if (tape.guards.every((guard) => registers[guard.condition] !== 0)) return [];
  const waitedFor = waiting(tape, registers);
  for (const guard of tape.guards) {
    if (registers[guard.condition] !== 0 || waitedFor[guard.result] !== 1) continue;
    // The same guard of one owner may be written again where a derivative is taken: the first one speaks.
    const key = `${guard.owner}\n${guard.code}\n${guard.parts.join('\n')}`;
    if (failed.has(key)) continue;
    failed.set(key, {
      owner: guard.owner,
      code: guard.code,
      parts: guard.parts,
      figures: guard.figures.map(({ register, measure }) => ({
        value: registers[register] ?? Number.NaN,
        measure,
      })),
    });
  }
  return [...failed.values()];
}

/** Marks the registers that outputs wait for: those that wait and that nothing keeps from an output. */
function waiting({ code, outputs }: Tape, registers: Float64Array): Uint8Array {
  const base = registers.length - code.length / STRIDE;
  const met = new Uint8Array(registers.length);
  const stack: number[] = [];
  const visit = (register: number): void => {
    if (register < 0 || met[register] === 1 || !Number.isNaN(registers[register])) return;
    met[register] = 1;
    stack.push(register);
  };
  outputs.forEach(visit);
  for (let register = stack.pop(); register !== undefined; register = stack.pop()) {
    if (register < base) continue;
    const at = (register - base) * STRIDE;
    const [op, first = NO_OPERAND, second = NO_OPERAND, third = NO_OPERAND] = code.subarray(at, at + STRIDE);
    visit(first);
    // Of the two branches of a choice only the chosen one is waited for.
    if (op !== Op.choose || registers[first] === 1) visit(second);
    if (op !== Op.choose || registers[first] === 0) visit(third);
  }
  return met;
}
