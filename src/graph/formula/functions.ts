import { NONE, nameDimension } from '../../quantity/index.ts';
import {
  arctangent,
  type Condition,
  guard,
  hypotenuse,
  Refusal,
  type Scalar,
  say,
} from '../../tape/index.ts';

/** A function or sign of formulas: how many operands it takes, and what it writes on the trace. */
export interface FormulaFunction {
  readonly least: number;
  readonly most: number;
  write(operands: readonly Scalar[]): Scalar;
}

const one = (write: (a: Scalar) => Scalar): FormulaFunction => ({
  least: 1,
  most: 1,
  write: ([a]) => write(a as Scalar),
});
const two = (write: (a: Scalar, b: Scalar) => Scalar): FormulaFunction => ({
  least: 2,
  most: 2,
  write: ([a, b]) => write(a as Scalar, b as Scalar),
});
const several = (write: (a: Scalar, b: Scalar) => Scalar): FormulaFunction => ({
  least: 1,
  most: 20,
  write: (operands) => operands.reduce(write),
});

/** What a formula may call. */
export const functions: ReadonlyMap<string, FormulaFunction> = new Map([
  ['abs', one((a) => a.absolute())],
  ['sqrt', one(squareRoot)],
  ['sin', one((a) => a.sine())],
  ['cos', one((a) => a.cosine())],
  ['tan', one((a) => quotient(a.sine(), a.cosine()))],
  ['asin', one((a) => arctangent(a, across(a)))],
  ['acos', one((a) => arctangent(across(a), a))],
  ['atan', one((a) => arctangent(a, a.trace.constant(1, NONE)))],
  ['atan2', two(direction)],
  ['hypot', { least: 1, most: 20, write: length }],
  ['min', several((a, b) => a.least(b))],
  ['max', several((a, b) => a.most(b))],
  ['exp', one((a) => a.exponential())],
  ['log', one((a) => positive(a, 'logarithm').logarithm())],
]);

/** The signs of formulas, by the parser's names for them. */
export const operators: ReadonlyMap<string, FormulaFunction> = new Map([
  ['add', two((a, b) => a.plus(b))],
  ['subtract', two((a, b) => a.minus(b))],
  ['multiply', two((a, b) => a.times(b))],
  ['divide', two(quotient)],
  ['pow', two(power)],
  ['unaryMinus', one((a) => a.negated())],
  ['unaryPlus', one((a) => a)],
  ['smaller', two((a, b) => a.below(b).scalar)],
  ['smallerEq', two((a, b) => a.atMost(b).scalar)],
  ['larger', two((a, b) => a.above(b).scalar)],
  ['largerEq', two((a, b) => a.atLeast(b).scalar)],
  ['and', two((a, b) => condition(a).and(condition(b)).scalar)],
  ['or', two((a, b) => condition(a).or(condition(b)).scalar)],
  ['not', one((a) => condition(a).not().scalar)],
]);

/** `condition ? yes : no`. */
export function choose([a, yes, no]: readonly Scalar[]): Scalar {
  return condition(a as Scalar).choose(yes as Scalar, no as Scalar);
}

/** A plain number as yes or no: 0 is no, all else is yes. A comparison's own result stays as it is. */
function condition(value: Scalar): Condition {
  if (value.dimension !== NONE) {
    throw new Refusal(
      'formula',
      `${nameDimension(value.dimension)} is no yes or no: compare it with something`,
    );
  }
  return value.atLeast(0).and(value.atMost(0)).not();
}

/** √(a² + b² + …); of one figure alone its size. */
function length([first, ...others]: readonly Scalar[]): Scalar {
  const a = first as Scalar;
  return others.length === 0 ? a.absolute() : others.reduce(hypotenuse, a);
}

function quotient(a: Scalar, b: Scalar): Scalar {
  return a.over(notZero(b));
}

function notZero(b: Scalar): Scalar {
  const zero = b.atLeast(0).and(b.atMost(0));
  return guard(b, zero.not(), say('divided-by-zero')`The formula divides by ${b}: change what it divides by`);
}

function squareRoot(a: Scalar): Scalar {
  return notNegative(a, 'square root').squareRoot();
}

function notNegative(a: Scalar, what: string): Scalar {
  return guard(
    a,
    a.atLeast(0),
    say('root-of-negative')`The formula takes the ${what} of ${a}: make it 0 or more`,
  );
}

function positive(a: Scalar, what: string): Scalar {
  return guard(
    a,
    a.above(0),
    say('not-positive')`The formula takes the ${what} of ${a}: make it more than 0`,
  );
}

/** √(1 − a²), for the angles whose sine or cosine is a. */
function across(a: Scalar): Scalar {
  const inside = guard(
    a,
    a.absolute().atMost(1),
    say('no-such-angle')`No angle has ${a} for its sine or cosine: bring it between −1 and 1`,
  );
  return inside.times(-1).plus(1).times(inside.plus(1)).squareRoot();
}

function direction(y: Scalar, x: Scalar): Scalar {
  const angle = arctangent(y, x);
  const size = hypotenuse(x, y);
  const query = say(
    'no-direction',
  )`The formula asks for the direction of a vector of length ${size}: give it a length`;
  return guard(angle, size.above(0), query);
}

/** The greatest exponent: beyond it a power says nothing about buildings, and soon is no number. */
const GREATEST_EXPONENT = 100;

function power(base: Scalar, exponent: Scalar): Scalar {
  const known = base.trace.constantAt(exponent.index);
  if (known === undefined) {
    if (base.dimension !== NONE || exponent.dimension !== NONE) {
      throw new Refusal(
        'formula',
        'an exponent that varies needs plain numbers: its dimension could not be told. Write the exponent as a figure, or divide the base by its unit',
      );
    }
    return positive(base, 'power with a fraction').logarithm().times(exponent).exponential();
  }
  if (exponent.dimension !== NONE) {
    throw new Refusal(
      'formula',
      `an exponent must be a plain number, not ${nameDimension(exponent.dimension)}`,
    );
  }
  if (Math.abs(known) > GREATEST_EXPONENT) {
    throw new Refusal(
      'formula',
      `the exponent ${known} is beyond ±${GREATEST_EXPONENT}: no figure of a building needs it`,
    );
  }
  if (!Number.isInteger(known) && known < 0) return positive(base, 'power with a fraction').power(known);
  if (!Number.isInteger(known)) return notNegative(base, 'power with a fraction').power(known);
  return known < 0 ? notZero(base).power(known) : base.power(known);
}
