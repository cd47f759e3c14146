import { type Dimension, NONE, nameDimension } from '../quantity/index.ts';
import { Op } from './operation.ts';
import { type QueryDraft, Refusal } from './query.ts';
import type { Trace } from './trace.ts';

/**
 * A handle on a value of a trace: which operation gives it, and its dimension. Arithmetic on scalars writes
 * operations on the trace; quantities that do not go together throw a `Refusal` while tracing.
 *
 * Where a method takes `Scalar | number`, a number is a plain number; 0 fits every dimension.
 */
export class Scalar {
  readonly trace: Trace;
  readonly index: number;

  constructor(trace: Trace, index: number) {
    this.trace = trace;
    this.index = index;
  }

  get dimension(): Dimension {
    return this.trace.dimensionAt(this.index);
  }

  plus(other: Scalar | number): Scalar {
    return this.trace.apply(Op.add, this, this.alike(other, 'added to'));
  }

  minus(other: Scalar | number): Scalar {
    return this.trace.apply(Op.subtract, this, this.alike(other, 'taken from'));
  }

  times(other: Scalar | number): Scalar {
    return this.trace.apply(Op.multiply, this, this.plain(other));
  }

  over(other: Scalar | number): Scalar {
    return this.trace.apply(Op.divide, this, this.plain(other));
  }

  negated(): Scalar {
    return this.trace.apply(Op.negate, this);
  }

  absolute(): Scalar {
    return this.trace.apply(Op.absolute, this);
  }

  squared(): Scalar {
    return this.times(this);
  }

  /** The square root; NaN below zero, so that a caller who can't rule that out guards it. */
  squareRoot(): Scalar {
    return this.trace.apply(Op.squareRoot, this);
  }

  /** This to the power of a plain number that is known while tracing. */
  power(exponent: number): Scalar {
    if (exponent === 2) return this.squared();
    if (exponent === 0.5) return this.squareRoot();
    return this.trace.apply(Op.power, this, this.trace.constant(exponent, NONE));
  }

  sine(): Scalar {
    return this.trace.apply(Op.sine, this.bare('the sine'));
  }

  cosine(): Scalar {
    return this.trace.apply(Op.cosine, this.bare('the cosine'));
  }

  exponential(): Scalar {
    return this.trace.apply(Op.exponential, this.bare('the exponential'));
  }

  logarithm(): Scalar {
    return this.trace.apply(Op.logarithm, this.bare('the logarithm'));
  }

  least(other: Scalar | number): Scalar {
    return this.atMost(other).choose(this, this.alike(other, 'compared with'));
  }

  most(other: Scalar | number): Scalar {
    return this.atLeast(other).choose(this, this.alike(other, 'compared with'));
  }

  below(other: Scalar | number): Condition {
    return new Condition(this.trace.apply(Op.below, this, this.alike(other, 'compared with')));
  }

  atMost(other: Scalar | number): Condition {
    return new Condition(this.trace.apply(Op.atMost, this, this.alike(other, 'compared with')));
  }

  above(other: Scalar | number): Condition {
    return new Condition(this.trace.apply(Op.below, this.alike(other, 'compared with'), this));
  }

  atLeast(other: Scalar | number): Condition {
    return new Condition(this.trace.apply(Op.atMost, this.alike(other, 'compared with'), this));
  }

  /** The other operand as a scalar of this one's dimension. */
  private alike(other: Scalar | number, verb: string): Scalar {
    if (typeof other === 'number') {
      return this.trace.constant(other, other === 0 ? this.dimension : this.bare('a plain number').dimension);
    }
    if (other.dimension !== this.dimension) {
      const [mine, others] = [nameDimension(this.dimension), nameDimension(other.dimension)];
      throw new Refusal('dimensions', `${others} can't be ${verb} ${mine}`);
    }
    return other;
  }

  private plain(other: Scalar | number): Scalar {
    return typeof other === 'number' ? this.trace.constant(other, NONE) : other;
  }

  private bare(what: string): Scalar {
    if (this.dimension === NONE) return this;
    throw new Refusal(
      'dimensions',
      `${what} is wanted where ${nameDimension(this.dimension)} stands: divide it first`,
    );
  }
}

/** A yes or no of a trace: 1, 0, or NaN where what it compares is waiting. */
export class Condition {
  /** The plain number 0 or 1 behind it. */
  readonly scalar: Scalar;

  constructor(scalar: Scalar) {
    this.scalar = scalar;
  }

  and(other: Condition): Condition {
    return new Condition(this.scalar.times(other.scalar));
  }

  or(other: Condition): Condition {
    return this.not().and(other.not()).not();
  }

  not(): Condition {
    const one = this.scalar.trace.constant(1, NONE);
    return new Condition(one.minus(this.scalar));
  }

  /** `yes` where this holds, else `no`. Only the one that is chosen has to be finite. */
  choose(yes: Scalar, no: Scalar): Scalar {
    if (yes.dimension !== no.dimension) {
      const [a, b] = [nameDimension(yes.dimension), nameDimension(no.dimension)];
      throw new Refusal('dimensions', `a choice between ${a} and ${b} has no one dimension`);
    }
    return yes.trace.apply(Op.choose, this.scalar, yes, no);
  }
}

/**
 * Passes `value` on while `condition` holds. Where it fails, the query is raised and what depends on the
 * value waits (it is NaN inside, and never shown).
 */
export function guard(value: Scalar, condition: Condition, query: QueryDraft): Scalar {
  return value.trace.guard(Op.guard, value, condition, query);
}

/**
 * Passes `value` on whatever `condition` is; but a derivative that is taken through here is guarded by it.
 * For a value that is known while its slope is unbounded, as where two circles touch.
 */
export function guardSlope(value: Scalar, condition: Condition, query: QueryDraft): Scalar {
  return value.trace.guard(Op.guardSlope, value, condition, query);
}

/** The angle of the vector (x, y), anticlockwise from +x, in −π..π; both of one dimension. */
export function arctangent(y: Scalar, x: Scalar): Scalar {
  if (y.dimension !== x.dimension) {
    const [a, b] = [nameDimension(y.dimension), nameDimension(x.dimension)];
    throw new Refusal('dimensions', `${a} across and ${b} along have no angle`);
  }
  return y.trace.apply(Op.arctangent, y, x);
}

/** √(x² + y²); its slope is unbounded at 0. */
export function hypotenuse(x: Scalar, y: Scalar): Scalar {
  return x.squared().plus(y.squared()).squareRoot();
}

/** The sum of at least one scalar, from the left. */
export function sum(terms: readonly Scalar[]): Scalar {
  return terms.reduce((total, term) => total.plus(term));
}
