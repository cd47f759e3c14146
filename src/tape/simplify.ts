import type { Dimension } from '../quantity/index.ts';
import { Op, type OpCode } from './operation.ts';
import { Scalar } from './scalar.ts';
import type { Trace } from './trace.ts';

/**
 * The identities that hold for every value: x + 0, 1 · x, −(−x) and their like. Returns the simpler scalar or
 * undefined.
 *
 * 0 · x is taken as 0 whatever x is: a figure that does not depend on x need not wait for it. This is what
 * drops the slopes of everything that a derivative does not reach.
 */
export function simplify(
  trace: Trace,
  code: OpCode,
  dim: Dimension,
  a: Scalar,
  b?: Scalar,
  c?: Scalar,
): Scalar | undefined {
  const x = trace.constantAt(a.index);
  const y = b === undefined ? undefined : trace.constantAt(b.index);
  switch (code) {
    case Op.add: {
      if (x === 0) return b;
      if (y === 0) return a;
      const negative = b === undefined ? undefined : negated(trace, b);
      return negative === undefined ? undefined : a.minus(negative);
    }
    case Op.subtract: {
      if (y === 0) return a;
      if (x === 0) return b?.negated();
      const negative = b === undefined ? undefined : negated(trace, b);
      return negative === undefined ? undefined : a.plus(negative);
    }
    case Op.multiply:
      if (x === 0 || y === 0) return trace.constant(0, dim);
      if (x === 1 && b?.dimension === dim) return b;
      if (y === 1 && a.dimension === dim) return a;
      if (x === -1 && b?.dimension === dim) return b.negated();
      if (y === -1 && a.dimension === dim) return a.negated();
      return undefined;
    case Op.damp:
      if (x === 0) return trace.constant(0, dim);
      return x !== undefined || y !== undefined ? b?.times(a) : undefined;
    case Op.divide:
      if (x === 0) return trace.constant(0, dim);
      if (y === 1 && a.dimension === dim) return a;
      if (y === -1 && a.dimension === dim) return a.negated();
      return undefined;
    case Op.negate:
      return negated(trace, a);
    case Op.power:
      if (y === 0) return trace.constant(1, dim);
      return y === 1 ? a : undefined;
    case Op.choose:
      if (x === 1 || b?.index === c?.index) return b;
      return x === 0 ? c : undefined;
    default:
      return undefined;
  }
}

/** The scalar whose negative this one is, if it was written as such. */
function negated(trace: Trace, scalar: Scalar): Scalar | undefined {
  if (trace.codes[scalar.index] !== Op.negate) return undefined;
  return new Scalar(trace, trace.first[scalar.index] ?? 0);
}
