import { type Dimension, LENGTH } from '../quantity/index.ts';
import { arctangent, type Condition, hypotenuse, type Scalar, type Trace } from '../tape/index.ts';

/** Two components of one dimension: x to the right, y up. A displacement, a force, a direction. */
export interface Vector {
  readonly x: Scalar;
  readonly y: Scalar;
}

/** A place in the plane, in metres. */
export type Point = Vector;

/** The point (x, y) given in metres. */
export function pointOf(trace: Trace, x: number, y: number): Point {
  return { x: trace.constant(x, LENGTH), y: trace.constant(y, LENGTH) };
}

/** The vector 0 of a dimension. */
export function zeroVector(trace: Trace, dimension: Dimension): Vector {
  const zero = trace.constant(0, dimension);
  return { x: zero, y: zero };
}

export function add(a: Vector, b: Vector): Vector {
  return { x: a.x.plus(b.x), y: a.y.plus(b.y) };
}

/** From b to a, when both are points. */
export function subtract(a: Vector, b: Vector): Vector {
  return { x: a.x.minus(b.x), y: a.y.minus(b.y) };
}

export function scale(a: Vector, factor: Scalar | number): Vector {
  return { x: a.x.times(factor), y: a.y.times(factor) };
}

export function reverse(a: Vector): Vector {
  return { x: a.x.negated(), y: a.y.negated() };
}

/** a · b = ax bx + ay by. */
export function dot(a: Vector, b: Vector): Scalar {
  return a.x.times(b.x).plus(a.y.times(b.y));
}

/** ax by − ay bx: positive where b is to the left of a. The moment of a force b at the arm a. */
export function cross(a: Vector, b: Vector): Scalar {
  return a.x.times(b.y).minus(a.y.times(b.x));
}

export function magnitude(a: Vector): Scalar {
  return hypotenuse(a.x, a.y);
}

/** The vector turned by a right angle anticlockwise. */
export function turnLeft(a: Vector): Vector {
  return { x: a.y.negated(), y: a.x };
}

/** The angle from a to b, anticlockwise, in −π..π. */
export function angleFrom(a: Vector, b: Vector): Scalar {
  return arctangent(cross(a, b), dot(a, b));
}

/** `yes` where the condition holds, else `no`. */
export function chooseVector(condition: Condition, yes: Vector, no: Vector): Vector {
  return { x: condition.choose(yes.x, no.x), y: condition.choose(yes.y, no.y) };
}

/** The distance of two points. Its slope is unbounded where they coincide. */
export function distance(a: Point, b: Point): Scalar {
  return magnitude(subtract(b, a));
}

/** The point at a ratio of the way from a to b: 0 at a, 1 at b. */
export function between(a: Point, b: Point, ratio: Scalar | number): Point {
  return add(a, scale(subtract(b, a), ratio));
}
