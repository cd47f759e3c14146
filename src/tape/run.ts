import { registerCount, STRIDE, type Tape } from './tape.ts';

/** Registers for runs of a tape, the constants in their places. */
export function registersFor(tape: Tape): Float64Array {
  const registers = new Float64Array(registerCount(tape));
  registers.set(tape.constants, tape.inputs.length);
  return registers;
}

/**
 * Runs a tape once.
 *
 * @param inputs one value for each input, in SI units.
 * @param registers from `registersFor` this tape; they hold every result afterwards.
 */
export function run(tape: Tape, inputs: ArrayLike<number>, registers: Float64Array): void {
  if (inputs.length !== tape.inputs.length) {
    throw new RangeError(`the tape has ${tape.inputs.length} inputs, not ${inputs.length}`);
  }
  registers.set(inputs);
  const { series, first: a, second: b, third: c } = columnsOf(tape);
  const base = registers.length - a.length;
  const r = registers;
  let i = 0;
  for (let s = 0; s < series.length; s += 2) {
    const end = series[s + 1] as number;
    // Literal numbers in the order of `Op`; the conformance tests hold them to the table of operations. Every
    // index is right by construction: a tape names only registers that there are.
    switch (series[s]) {
      case 3:
        for (; i < end; i++) r[base + i] = r[a[i]!]! + r[b[i]!]!;
        break;
      case 4:
        for (; i < end; i++) r[base + i] = r[a[i]!]! - r[b[i]!]!;
        break;
      case 5:
        for (; i < end; i++) r[base + i] = r[a[i]!]! * r[b[i]!]!;
        break;
      case 6:
        for (; i < end; i++) r[base + i] = r[a[i]!]! / r[b[i]!]!;
        break;
      case 7:
        for (; i < end; i++) r[base + i] = -r[a[i]!]!;
        break;
      case 8:
        for (; i < end; i++) r[base + i] = Math.abs(r[a[i]!]!);
        break;
      case 9:
        for (; i < end; i++) r[base + i] = Math.sqrt(r[a[i]!]!);
        break;
      case 10:
        for (; i < end; i++) r[base + i] = Math.sin(r[a[i]!]!);
        break;
      case 11:
        for (; i < end; i++) r[base + i] = Math.cos(r[a[i]!]!);
        break;
      case 12:
        for (; i < end; i++) r[base + i] = Math.atan2(r[a[i]!]!, r[b[i]!]!);
        break;
      case 13:
        for (; i < end; i++) r[base + i] = Math.exp(r[a[i]!]!);
        break;
      case 14:
        for (; i < end; i++) r[base + i] = Math.log(r[a[i]!]!);
        break;
      case 15:
        for (; i < end; i++) r[base + i] = r[a[i]!]! ** r[b[i]!]!;
        break;
      case 16:
        for (; i < end; i++) r[base + i] = below(r[a[i]!]!, r[b[i]!]!);
        break;
      case 17:
        for (; i < end; i++) r[base + i] = atMost(r[a[i]!]!, r[b[i]!]!);
        break;
      case 18:
        for (; i < end; i++) r[base + i] = choose(r[a[i]!]!, r[b[i]!]!, r[c[i]!]!);
        break;
      case 19:
        for (; i < end; i++) r[base + i] = r[b[i]!] === 1 ? r[a[i]!]! : Number.NaN;
        break;
      case 21:
        for (; i < end; i++) r[base + i] = r[a[i]!] === 0 ? 0 : r[a[i]!]! * r[b[i]!]!;
        break;
      default:
        throw new Error(`no way to run operation ${series[s]}`);
    }
  }
}

/** The code of a tape as the loops of `run` read it. */
interface CodeColumns {
  /** For each series of one operation: the operation, and where the series ends. */
  readonly series: Int32Array;
  readonly first: Int32Array;
  readonly second: Int32Array;
  readonly third: Int32Array;
}

const columns = new WeakMap<Tape, CodeColumns>();

/** The columns of a tape, made once. */
function columnsOf(tape: Tape): CodeColumns {
  let made = columns.get(tape);
  if (made === undefined) {
    const { code } = tape;
    const count = code.length / STRIDE;
    const series: number[] = [];
    for (let i = 1; i <= count; i++) {
      const op = code[(i - 1) * STRIDE] as number;
      if (i === count || code[i * STRIDE] !== op) series.push(op, i);
    }
    const column = (k: number) =>
      Int32Array.from({ length: count }, (_, i) => code[i * STRIDE + k] as number);
    made = { series: Int32Array.from(series), first: column(1), second: column(2), third: column(3) };
    columns.set(tape, made);
  }
  return made;
}

function below(a: number, b: number): number {
  return a < b ? 1 : a >= b ? 0 : Number.NaN;
}

function atMost(a: number, b: number): number {
  return a <= b ? 1 : a > b ? 0 : Number.NaN;
}

function choose(condition: number, yes: number, no: number): number {
  return condition === 1 ? yes : condition === 0 ? no : Number.NaN;
}

/** The outputs of a tape after a run. */
export function outputsOf(tape: Tape, registers: Float64Array): Float64Array {
  return Float64Array.from(tape.outputs, (register) => registers[register] as number);
}

/** Runs a tape once, by itself: the outputs. For many runs keep the registers and call `run`. */
export function evaluate(tape: Tape, inputs: ArrayLike<number>): Float64Array {
  const registers = registersFor(tape);
  run(tape, inputs, registers);
  return outputsOf(tape, registers);
}
