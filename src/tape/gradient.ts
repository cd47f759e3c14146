import { NONE, quotientDimension } from '../quantity/index.ts';
import { Op, type OpCode, operation } from './operation.ts';
import { Condition, Scalar } from './scalar.ts';

/**
 * The derivatives of one output by every input, in one sweep backwards through the trace, written on the same
 * trace as ordinary operations. Costs a few times the output itself, however many inputs there are.
 *
 * Where the output waits, its gradient waits too.
 *
 * @returns one scalar for each input, of dimension output ÷ input.
 */
export function gradient(output: Scalar, inputs: readonly Scalar[]): readonly Scalar[] {
  const { trace } = output;
  trace.mustOwn(inputs);
  const stop = inputs.reduce((least, input) => Math.min(least, input.index), output.index);
  const wanted = reached(output, inputs);
  const weights = new Map<number, Weight>();
  weights.set(output.index, { scalar: trace.constant(1, NONE), chosen: false });

  const give = (index: number | undefined, scalar: Scalar | undefined, chosen: boolean): void => {
    if (index === undefined || index < 0 || scalar === undefined || wanted[index] !== 1) return;
    const before = weights.get(index);
    weights.set(index, {
      scalar: before === undefined ? scalar : before.scalar.plus(scalar),
      chosen: chosen || (before?.chosen ?? false),
    });
  };

  for (let i = output.index; i >= stop; i--) {
    const weight = weights.get(i);
    if (weight === undefined || trace.constantAt(weight.scalar.index) === 0) continue;
    const { scalar, chosen } = weight;
    const code = trace.codes[i] as OpCode;
    const [first, second, third] = [trace.first[i] ?? -1, trace.second[i] ?? -1, trace.third[i] ?? -1];
    switch (code) {
      case Op.input:
      case Op.constant:
        break;
      case Op.mark:
      case Op.guard:
        // What a failed guard poisons is the output itself; that is seen to at the end.
        give(first, scalar, chosen);
        break;
      case Op.guardSlope: {
        const { query, owner } = trace.guards[third] ?? {};
        if (query === undefined) throw new Error(`no guard at operation ${i}`);
        const condition = new Condition(new Scalar(trace, second));
        const guarded = (value: Scalar) => trace.guard(Op.guard, value, condition, query, owner);
        const one = trace.constant(1, NONE);
        give(first, chosen ? trace.apply(Op.damp, scalar, guarded(one)) : guarded(scalar), chosen);
        break;
      }
      case Op.choose: {
        const condition = new Condition(new Scalar(trace, first));
        const zero = trace.constant(0, scalar.dimension);
        const [yes, no] = [condition.choose(scalar, zero), condition.choose(zero, scalar)];
        give(second, chosen ? share(scalar, condition, yes) : yes, true);
        give(third, chosen ? share(scalar, condition.not(), no) : no, true);
        break;
      }
      case Op.damp: {
        const [a, b] = [new Scalar(trace, first), new Scalar(trace, second)];
        give(first, trace.apply(Op.damp, scalar, b), chosen);
        // The factor that damps is 0 for what was not chosen.
        const product = trace.apply(Op.damp, a, scalar);
        give(second, chosen ? whereZero(scalar, trace.apply(Op.damp, scalar, a), product) : product, true);
        break;
      }
      default: {
        const a = new Scalar(trace, first);
        const b = second < 0 ? a : new Scalar(trace, second);
        const partials = operation(code).partials?.(new Scalar(trace, i), a, b);
        // A weight that may be 0 because another branch was chosen must win over a partial that is not finite.
        const product = (partial: Scalar | undefined) =>
          partial && (chosen ? trace.apply(Op.damp, scalar, partial) : scalar.times(partial));
        give(first, product(partials?.[0]), chosen);
        if (second >= 0) give(second, product(partials?.[1]), chosen);
      }
    }
  }

  const known = output.atMost(output).scalar;
  return inputs.map((input) => {
    const slope = weights.get(input.index)?.scalar;
    if (slope === undefined || trace.constantAt(slope.index) === 0) {
      return trace.constant(0, quotientDimension(output.dimension, input.dimension));
    }
    return known.times(slope);
  });
}

interface Weight {
  readonly scalar: Scalar;
  /** True where the weight has come through a choice, and so may be 0 for what was not chosen. */
  readonly chosen: boolean;
}

/** The weight of a branch of a choice which, if it was itself not chosen, may have a condition that waits. */
function share(weight: Scalar, condition: Condition, otherwise: Scalar): Scalar {
  return whereZero(weight, weight.trace.apply(Op.damp, weight, condition.scalar), otherwise);
}

/**
 * `product` where the weight is 0, else `otherwise`. The product must have the weight for a factor: it is 0 then,
 * but its slope is not, if the weight is 0 by chance and not because something else was chosen.
 */
function whereZero(weight: Scalar, product: Scalar, otherwise: Scalar): Scalar {
  return weight.absolute().atMost(0).choose(product, otherwise);
}

/** Marks what depends on any of the inputs. */
function reached(output: Scalar, inputs: readonly Scalar[]): Uint8Array {
  const { trace } = output;
  const depends = new Uint8Array(output.index + 1);
  for (const input of inputs) if (input.index <= output.index) depends[input.index] = 1;
  for (let i = 0; i <= output.index; i++) {
    trace.eachOperand(i, (operand) => {
      if (depends[operand] === 1) depends[i] = 1;
    });
  }
  return depends;
}
