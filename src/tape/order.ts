import { NO_OPERAND } from './trace.ts';

/** How many numbers an instruction has in a tape's code: the operation and three operands. */
export const STRIDE = 4;

/**
 * Orders instructions so that those of one operation follow each other in long series, each behind what it
 * reads. A series is one tight loop, where a program in the order of its tracing would choose its way anew at
 * every instruction.
 *
 * @param code instructions, their operands being registers.
 * @param base the register of the first instruction's result; the others follow.
 * @returns the numbers of the instructions in their new order.
 */
export function inSeries(code: ArrayLike<number>, base: number): Int32Array {
  const count = code.length / STRIDE;
  const readers: number[][] = Array.from({ length: count }, () => []);
  const awaited = new Int32Array(count);
  const ready = new Map<number, number[]>();
  const offer = (i: number): void => {
    const op = code[i * STRIDE] as number;
    const list = ready.get(op);
    if (list === undefined) ready.set(op, [i]);
    else list.push(i);
  };
  for (let i = 0; i < count; i++) {
    for (let k = 1; k < STRIDE; k++) {
      const source = (code[i * STRIDE + k] as number) - base;
      if (source < 0) continue;
      awaited[i] = (awaited[i] as number) + 1;
      readers[source]?.push(i);
    }
    if (awaited[i] === 0) offer(i);
  }
  const order = new Int32Array(count);
  for (let placed = 0; placed < count; ) {
    let most: number[] = [];
    for (const list of ready.values()) if (list.length > most.length) most = list;
    if (most.length === 0) throw new Error('an instruction reads what is not written before it');
    // What becomes ready on the way joins the series at once if it is of the same operation.
    for (let next = 0; next < most.length; next++) {
      const i = most[next] as number;
      order[placed++] = i;
      for (const reader of readers[i] ?? []) {
        awaited[reader] = (awaited[reader] as number) - 1;
        if (awaited[reader] === 0) offer(reader);
      }
    }
    most.length = 0;
  }
  return order;
}

/**
 * Orders instructions depth first from the outputs: each result is read soon after it is written, so that few
 * are alive at a time.
 *
 * @param outputs registers that must be written in the end.
 * @returns the numbers of the instructions in their new order.
 */
export function depthFirst(code: ArrayLike<number>, base: number, outputs: ArrayLike<number>): Int32Array {
  const count = code.length / STRIDE;
  const order = new Int32Array(count);
  const met = new Uint8Array(count);
  let placed = 0;
  const stack: number[] = [];
  const visit = (register: number): void => {
    const i = register - base;
    if (register !== NO_OPERAND && i >= 0 && met[i] === 0) stack.push(i);
  };
  for (let o = 0; o < outputs.length; o++) {
    visit(outputs[o] as number);
    while (stack.length > 0) {
      const i = stack[stack.length - 1] as number;
      if (met[i] === 2) {
        stack.pop();
      } else if (met[i] === 1) {
        stack.pop();
        met[i] = 2;
        order[placed++] = i;
      } else {
        met[i] = 1;
        for (let k = STRIDE - 1; k >= 1; k--) visit(code[i * STRIDE + k] as number);
      }
    }
  }
  return order.subarray(0, placed);
}
