import { NONE, quotientDimension } from '../quantity/index.ts';
import { Op, type OpCode, operation } from './operation.ts';
import type { QueryDraft } from './query.ts';
import { Condition, Scalar } from './scalar.ts';
import type { Trace } from './trace.ts';

/**
 * The derivatives of `outputs` by `input`, written on the same trace as ordinary operations: they can be
 * combined, guarded and differentiated again.
 *
 * @param input any scalar of the trace; what was computed from it is followed, nothing else.
 * @param at where the derivative is taken; without it, at the present value of `input`.
 */
export function derivative(
  outputs: readonly Scalar[],
  input: Scalar,
  at: Scalar | number = input,
): readonly Scalar[] {
  const replay = new Replay(outputs, input, at);
  return outputs.map((output) => replay.slope(output));
}

/** `outputs` as they would be if `input` had the value `at`. */
export function substitute(
  outputs: readonly Scalar[],
  input: Scalar,
  at: Scalar | number,
): readonly Scalar[] {
  const replay = new Replay(outputs, input, at);
  return outputs.map((output) => replay.value(output));
}

/**
 * Writes again all that lies between an input and the outputs, with the input at another place, and beside
 * each operation its slope by the input (forward differentiation).
 */
class Replay {
  private readonly trace: Trace;
  private readonly input: Scalar;
  private readonly values = new Map<number, Scalar>();
  /** Only slopes that are not zero throughout. */
  private readonly slopes = new Map<number, Scalar>();

  constructor(outputs: readonly Scalar[], input: Scalar, at: Scalar | number) {
    this.trace = input.trace;
    this.input = input;
    const place = typeof at === 'number' ? this.trace.constant(at, input.dimension) : at;
    this.trace.mustOwn([place, ...outputs]);
    this.values.set(input.index, place);
    this.slopes.set(input.index, this.trace.constant(1, NONE));
    for (const index of between(this.trace, input, outputs)) this.step(index);
  }

  value(output: Scalar): Scalar {
    return this.values.get(output.index) ?? output;
  }

  slope(output: Scalar): Scalar {
    return this.slopes.get(output.index) ?? this.zero(output);
  }

  private zero(of: Scalar): Scalar {
    return this.trace.constant(0, quotientDimension(of.dimension, this.input.dimension));
  }

  private operand(index: number | undefined): Scalar | undefined {
    if (index === undefined || index < 0) return undefined;
    return this.values.get(index) ?? new Scalar(this.trace, index);
  }

  private step(index: number): void {
    const { trace } = this;
    const code = trace.codes[index] as OpCode;
    const [first, second, third] = [trace.first[index], trace.second[index], trace.third[index]];
    const a = this.operand(first);
    const b = this.operand(second);
    if (a === undefined) return;
    const slopeA = first === undefined ? undefined : this.slopes.get(first);
    const slopeB = second === undefined ? undefined : this.slopes.get(second);

    if (code === Op.guard || code === Op.guardSlope) {
      this.guard(index, a, new Condition(b ?? a), slopeA);
      return;
    }
    if (code === Op.mark) {
      // Followed through only if it is not the variable itself: another mark passes slopes. At the present place it
      // stays the variable that it is, so that the slope can still be differentiated by it.
      this.set(index, a.index === first ? new Scalar(trace, index) : trace.mark(a), slopeA);
      return;
    }
    if (code === Op.choose) {
      const c = this.operand(third) ?? a;
      const slopeC = third === undefined ? undefined : this.slopes.get(third);
      const value = trace.apply(code, a, b, c);
      const slope =
        slopeB === undefined && slopeC === undefined
          ? undefined
          : new Condition(a).choose(slopeB ?? this.zero(value), slopeC ?? this.zero(value));
      this.set(index, value, slope);
      return;
    }
    const value = trace.apply(code, a, b);
    if (code === Op.damp) {
      const parts = [
        slopeA && b && trace.apply(Op.damp, slopeA, b),
        slopeB && trace.apply(Op.damp, a, slopeB),
      ];
      this.set(index, value, total(parts));
      return;
    }
    const row = operation(code);
    const partials = row.partials?.(value, a, b ?? a);
    if (partials === undefined || (slopeA === undefined && slopeB === undefined)) {
      this.set(index, value, undefined);
      return;
    }
    this.set(
      index,
      value,
      total([slopeA && partials[0]?.times(slopeA), slopeB && partials[1]?.times(slopeB)]),
    );
  }

  private guard(index: number, value: Scalar, condition: Condition, slope: Scalar | undefined): void {
    const { trace } = this;
    const traced = trace.guards[trace.third[index] ?? -1];
    if (traced === undefined) throw new Error(`no guard at operation ${index}`);
    const query: QueryDraft = {
      ...traced.query,
      figures: traced.query.figures.map((figure) => ({ ...figure, scalar: this.value(figure.scalar) })),
    };
    const guarded = trace.guard(trace.codes[index] as typeof Op.guard, value, condition, query, traced.owner);
    const guardedSlope = slope && trace.guard(Op.guard, slope, condition, query, traced.owner);
    this.set(index, guarded, guardedSlope);
  }

  private set(index: number, value: Scalar, slope: Scalar | undefined): void {
    this.values.set(index, value);
    if (slope !== undefined && this.trace.constantAt(slope.index) !== 0) this.slopes.set(index, slope);
  }
}

function total(terms: readonly (Scalar | undefined)[]): Scalar | undefined {
  return terms.reduce((sum, term) => (term === undefined ? sum : (sum?.plus(term) ?? term)), undefined);
}

/** The indices that depend on `input` and that `outputs` (or the figures of guards on the way) need, ascending. */
function between(trace: Trace, input: Scalar, outputs: readonly Scalar[]): number[] {
  const last = outputs.reduce((most, output) => Math.max(most, output.index), -1);
  const depends = new Uint8Array(Math.max(last, input.index) + 1);
  depends[input.index] = 1;
  for (let i = input.index + 1; i <= last; i++) {
    trace.eachOperand(i, (operand) => {
      if (depends[operand] === 1) depends[i] = 1;
    });
  }
  const needed = new Uint8Array(depends.length);
  for (const output of outputs) needed[output.index] = 1;
  const found: number[] = [];
  for (let i = last; i > input.index; i--) {
    if (needed[i] !== 1 || depends[i] !== 1) continue;
    found.push(i);
    trace.eachOperand(i, (operand) => {
      needed[operand] = 1;
    });
  }
  return found.reverse();
}
