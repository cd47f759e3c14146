const EMPTY = -1;

/**
 * Finds an operation that the trace already holds, so that equal subexpressions are computed once: a hash
 * table of indices with open addressing. The operations themselves stay in the trace's columns.
 */
export class Sharing {
  private slots = new Int32Array(1024).fill(EMPTY);
  private count = 0;
  private readonly columns: Columns;

  constructor(columns: Columns) {
    this.columns = columns;
  }

  /** The index of an equal operation, or undefined. */
  find(code: number, a: number, b: number, c: number): number | undefined {
    const { codes, first, second, third } = this.columns;
    const mask = this.slots.length - 1;
    for (let slot = hash(code, a, b, c) & mask; ; slot = (slot + 1) & mask) {
      const index = this.slots[slot] ?? EMPTY;
      if (index === EMPTY) return undefined;
      if (codes[index] === code && first[index] === a && second[index] === b && third[index] === c)
        return index;
    }
  }

  /** Remembers the operation at an index; the caller has seen that none equal is known. */
  remember(index: number): void {
    if (this.count * 2 >= this.slots.length) this.grow();
    this.place(index);
    this.count += 1;
  }

  private place(index: number): void {
    const { codes, first, second, third } = this.columns;
    const mask = this.slots.length - 1;
    let slot = hash(codes[index] ?? 0, first[index] ?? 0, second[index] ?? 0, third[index] ?? 0) & mask;
    while (this.slots[slot] !== EMPTY) slot = (slot + 1) & mask;
    this.slots[slot] = index;
  }

  private grow(): void {
    const known = this.slots.filter((index) => index !== EMPTY);
    this.slots = new Int32Array(this.slots.length * 2).fill(EMPTY);
    for (const index of known) this.place(index);
  }
}

/** The operations of a trace, column by column: code and up to three operands. */
export interface Columns {
  readonly codes: readonly number[];
  readonly first: readonly number[];
  readonly second: readonly number[];
  readonly third: readonly number[];
}

function hash(code: number, a: number, b: number, c: number): number {
  // Multiplicative mixing with odd constants: neighbouring indices must not land in neighbouring slots only.
  let h = Math.imul(code + 1, 0x9e3779b1);
  h = Math.imul(h ^ a, 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 15) ^ b, 0xc2b2ae35);
  h = Math.imul(h ^ (h >>> 13) ^ c, 0x27d4eb2f);
  return (h ^ (h >>> 16)) >>> 0;
}
