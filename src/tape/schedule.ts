import { registerCount, STRIDE, type Tape } from './tape.ts';

/**
 * The instructions of a tape in an order in which those of one operation follow each other in long series, each
 * behind what it reads. A series is one tight loop, where a program in the order of its tracing would choose
 * its way anew at every instruction.
 */
export interface Schedule {
  /** For each series: operation, and where it ends in the columns. */
  readonly series: Int32Array;
  /** Columns of registers, one entry an instruction; −1 where there is no operand. */
  readonly result: Int32Array;
  readonly first: Int32Array;
  readonly second: Int32Array;
  readonly third: Int32Array;
}

const schedules = new WeakMap<Tape, Schedule>();

/** The schedule of a tape, made once. */
export function scheduleOf(tape: Tape): Schedule {
  let schedule = schedules.get(tape);
  if (schedule === undefined) {
    schedule = makeSchedule(tape);
    schedules.set(tape, schedule);
  }
  return schedule;
}

function makeSchedule(tape: Tape): Schedule {
  const { code } = tape;
  const count = code.length / STRIDE;
  const base = registerCount(tape) - count;
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

  const order: number[] = [];
  const series: number[] = [];
  while (order.length < count) {
    let best = -1;
    for (const [op, list] of ready) {
      if (list.length > (ready.get(best)?.length ?? 0)) best = op;
    }
    const list = ready.get(best);
    if (list === undefined) throw new Error('the tape reads a register before it is written');
    // What becomes ready on the way joins the series at once if it is of the same operation.
    for (let i = list.pop(); i !== undefined; i = list.pop()) {
      order.push(i);
      for (const reader of readers[i] ?? []) {
        awaited[reader] = (awaited[reader] as number) - 1;
        if (awaited[reader] === 0) offer(reader);
      }
    }
    series.push(best, order.length);
  }
  const column = (k: number) => Int32Array.from(order, (i) => code[i * STRIDE + k] as number);
  return {
    series: Int32Array.from(series),
    result: Int32Array.from(order, (i) => base + i),
    first: column(1),
    second: column(2),
    third: column(3),
  };
}
