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
  const { code } = tape;
  const inputCount = tape.inputs.length;
  if (inputs.length !== inputCount) {
    throw new RangeError(`the tape has ${inputCount} inputs, not ${inputs.length}`);
  }
  registers.set(inputs);
  const r = registers;
  let result = inputCount + tape.constants.length;
  for (let at = 0; at < code.length; at += STRIDE, result++) {
    const a = r[code[at + 1] as number] as number;
    const second = code[at + 2] as number;
    let value: number;
    // Literal numbers, in the order of `Op`, let the engine make one jump of the switch.
    switch (code[at]) {
      case 3:
        value = a + (r[second] as number);
        break;
      case 4:
        value = a - (r[second] as number);
        break;
      case 5:
        value = a * (r[second] as number);
        break;
      case 6:
        value = a / (r[second] as number);
        break;
      case 7:
        value = -a;
        break;
      case 8:
        value = Math.abs(a);
        break;
      case 9:
        value = Math.sqrt(a);
        break;
      case 10:
        value = Math.sin(a);
        break;
      case 11:
        value = Math.cos(a);
        break;
      case 12:
        value = Math.atan2(a, r[second] as number);
        break;
      case 13:
        value = Math.exp(a);
        break;
      case 14:
        value = Math.log(a);
        break;
      case 15:
        value = a ** (r[second] as number);
        break;
      case 16: {
        const b = r[second] as number;
        value = a < b ? 1 : a >= b ? 0 : Number.NaN;
        break;
      }
      case 17: {
        const b = r[second] as number;
        value = a <= b ? 1 : a > b ? 0 : Number.NaN;
        break;
      }
      case 18:
        value =
          a === 1 ? (r[second] as number) : a === 0 ? (r[code[at + 3] as number] as number) : Number.NaN;
        break;
      case 19:
        value = r[second] === 1 ? a : Number.NaN;
        break;
      case 21:
        value = a === 0 ? 0 : a * (r[second] as number);
        break;
      default:
        throw new Error(`no way to run operation ${code[at]}`);
    }
    r[result] = value;
  }
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
