import { baseUnits } from '../quantity/index.ts';
import { operation } from './operation.ts';
import { STRIDE, type Tape } from './tape.ts';

/** A tape as text, one instruction a line, for whoever has to see what was traced. */
export function printTape(tape: Tape): string {
  const lines: string[] = [];
  const base = tape.inputs.length + tape.constants.length;
  for (const [i, input] of tape.inputs.entries()) {
    lines.push(`r${i} = input ${input.name} [${baseUnits(input.dimension)}]`);
  }
  for (const [i, constant] of tape.constants.entries())
    lines.push(`r${tape.inputs.length + i} = ${constant}`);
  for (let at = 0; at < tape.code.length; at += STRIDE) {
    const operands = [...tape.code.subarray(at + 1, at + STRIDE)].filter((register) => register >= 0);
    const name = operation(tape.code[at] ?? -1).name;
    lines.push(`r${base + at / STRIDE} = ${name} ${operands.map((register) => `r${register}`).join(' ')}`);
  }
  lines.push(`outputs ${[...tape.outputs].map((register) => `r${register}`).join(' ')}`);
  return lines.join('\n');
}
