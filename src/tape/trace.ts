import type { Dimension } from '../quantity/index.ts';
import { Op, type OpCode, operation, resultDimension } from './operation.ts';
import type { QueryDraft } from './query.ts';
import { type Condition, Scalar } from './scalar.ts';
import { Sharing } from './sharing.ts';
import { simplify } from './simplify.ts';

/** A guard as it was traced. */
export interface TracedGuard {
  readonly owner: string | undefined;
  readonly query: QueryDraft;
}

/** A value that comes from outside each time a tape runs. */
export interface TapeInput {
  readonly name: string;
  readonly dimension: Dimension;
}

/** Marks the place of an operand that an operation does not have. */
export const NO_OPERAND = -1;

const MIXED = 'scalars of two traces do not mix';

/**
 * Operations while they are being recorded. A trace only grows; `finish` makes the flat tape from what given
 * outputs need. Constants are folded and equal operations shared as they are written.
 */
export class Trace {
  /** Who the guards that are written now belong to: the id of the node that is being traced. */
  owner: string | undefined;

  readonly inputs: TapeInput[] = [];
  readonly guards: TracedGuard[] = [];

  /** Columns of the operations. `third` holds the guard's number where the code is a guard. */
  readonly codes: number[] = [];
  readonly first: number[] = [];
  readonly second: number[] = [];
  readonly third: number[] = [];
  private readonly dimensions: Dimension[] = [];
  private readonly constants = new Map<number, number>();

  private readonly guardNumbers = new Map<string, number>();
  private readonly sharing = new Sharing(this);
  private readonly constantIndex = new Map<Dimension, Map<number, number>>();

  /** How many operations have been written. */
  get length(): number {
    return this.codes.length;
  }

  /** A value from outside, in SI units. */
  input(name: string, dim: Dimension): Scalar {
    this.inputs.push({ name, dimension: dim });
    return this.write(Op.input, this.inputs.length - 1, NO_OPERAND, NO_OPERAND, dim);
  }

  /** A number that is known while tracing. It must be finite; −0 is taken as 0. */
  constant(number: number, dim: Dimension): Scalar {
    if (!Number.isFinite(number)) throw new RangeError(`a constant must be finite, not ${number}`);
    // Both zeros are one constant, and which was written first must not turn an angle of π into −π.
    const value = number === 0 ? 0 : number;
    let ofDimension = this.constantIndex.get(dim);
    if (ofDimension === undefined) {
      ofDimension = new Map();
      this.constantIndex.set(dim, ofDimension);
    }
    const known = ofDimension.get(value);
    if (known !== undefined) return new Scalar(this, known);
    const written = this.write(Op.constant, NO_OPERAND, NO_OPERAND, NO_OPERAND, dim);
    this.constants.set(written.index, value);
    ofDimension.set(value, written.index);
    return written;
  }

  /** The same value as a variable of its own, for derivatives by it alone. */
  mark(value: Scalar): Scalar {
    this.mustOwn([value]);
    return this.write(Op.mark, value.index, NO_OPERAND, NO_OPERAND, value.dimension);
  }

  /** The result of an operation: folded, simplified or shared where that can be, else written. */
  apply(code: OpCode, a: Scalar, b?: Scalar, c?: Scalar): Scalar {
    // Written out, not `mustOwn`: this is where tracing spends its time.
    if (a.trace !== this || (b !== undefined && b.trace !== this) || (c !== undefined && c.trace !== this)) {
      throw new Error(MIXED);
    }
    const exponent =
      code === Op.power && b !== undefined ? (this.constantAt(b.index) ?? Number.NaN) : Number.NaN;
    const dim = resultDimension(code, a.dimension, (b ?? a).dimension, exponent);
    const folded = this.fold(code, a, b, c);
    if (folded !== undefined) return this.constant(folded, dim);
    const simpler = simplify(this, code, dim, a, b, c);
    if (simpler !== undefined) return simpler;
    let first = a.index;
    let second = b?.index ?? NO_OPERAND;
    if (operation(code).commutes && second < first) [first, second] = [second, first];
    return this.share(code, first, second, c?.index ?? NO_OPERAND, dim);
  }

  /** See `guard` and `guardSlope` in scalar.ts, which are the ones to call. */
  guard(
    code: typeof Op.guard | typeof Op.guardSlope,
    value: Scalar,
    condition: Condition,
    query: QueryDraft,
    owner = this.owner,
  ): Scalar {
    this.mustOwn([value, condition.scalar, ...query.figures.map(({ scalar }) => scalar)]);
    if (this.constantAt(condition.scalar.index) === 1) return value;
    const figures = query.figures.map(({ scalar, measure }) => [scalar.index, measure.name]);
    const key = JSON.stringify([owner, query.code, query.parts, figures]);
    let number = this.guardNumbers.get(key);
    if (number === undefined) {
      number = this.guards.push({ owner, query }) - 1;
      this.guardNumbers.set(key, number);
    }
    return this.share(code, value.index, condition.scalar.index, number, value.dimension);
  }

  /** Throws where a scalar belongs to another trace: its index would name something else here. */
  mustOwn(scalars: readonly Scalar[]): void {
    for (const scalar of scalars) if (scalar.trace !== this) throw new Error(MIXED);
  }

  dimensionAt(index: number): Dimension {
    const dim = this.dimensions[index];
    if (dim === undefined) throw new Error(`the trace has no operation ${index}`);
    return dim;
  }

  /** The constant at an index, or undefined where another operation stands. */
  constantAt(index: number): number | undefined {
    return this.constants.get(index);
  }

  /** Visits what an operation reads: its operands, and the figures of a guard's query. */
  eachOperand(index: number, visit: (operand: number) => void): void {
    const code = this.codes[index];
    if (code === Op.input || code === Op.constant) return;
    visit(this.first[index] ?? NO_OPERAND);
    const second = this.second[index] ?? NO_OPERAND;
    if (second !== NO_OPERAND) visit(second);
    const third = this.third[index] ?? NO_OPERAND;
    if (third === NO_OPERAND) return;
    if (code !== Op.guard && code !== Op.guardSlope) visit(third);
    else for (const figure of this.guards[third]?.query.figures ?? []) visit(figure.scalar.index);
  }

  private fold(code: OpCode, a: Scalar, b?: Scalar, c?: Scalar): number | undefined {
    const x = this.constantAt(a.index);
    const y = b === undefined ? 0 : this.constantAt(b.index);
    const z = c === undefined ? 0 : this.constantAt(c.index);
    if (x === undefined || y === undefined || z === undefined) return undefined;
    const value = operation(code).value(x, y, z);
    return Number.isFinite(value) ? value : undefined;
  }

  private share(code: OpCode, a: number, b: number, c: number, dim: Dimension): Scalar {
    const known = this.sharing.find(code, a, b, c);
    if (known !== undefined) return new Scalar(this, known);
    const written = this.write(code, a, b, c, dim);
    this.sharing.remember(written.index);
    return written;
  }

  private write(code: OpCode, a: number, b: number, c: number, dim: Dimension): Scalar {
    this.codes.push(code);
    this.first.push(a);
    this.second.push(b);
    this.third.push(c);
    this.dimensions.push(dim);
    return new Scalar(this, this.codes.length - 1);
  }
}
