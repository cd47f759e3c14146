import { arctangent, type Condition, guard, type Scalar, say } from '../tape/index.ts';
import { type Chord, lengthOf } from './chord.ts';
import { RIGID } from './tolerance.ts';
import { add, chooseVector, cross, dot, type Point, subtract, type Vector } from './vector.ts';

/** A movement of the plane that changes no length: a turn about a pivot, which itself goes to a new place. */
export interface Motion {
  readonly cosine: Scalar;
  readonly sine: Scalar;
  readonly pivot: Point;
  readonly place: Point;
}

/** The turn about a fixed centre by an angle, anticlockwise. */
export function turnAbout(centre: Point, angle: Scalar): Motion {
  return { cosine: angle.cosine(), sine: angle.sine(), pivot: centre, place: centre };
}

/**
 * The motion that takes one chord to another of the same length. A query where the lengths differ, since then
 * the group would not be rigid.
 */
export function motionBetween(before: Chord, after: Chord): Motion {
  const [long, longAfter] = [lengthOf(before), lengthOf(after)];
  const change = longAfter.minus(long);
  const [u, v] = [subtract(before.to, before.from), subtract(after.to, after.from)];
  const scale = guard(
    long.times(longAfter),
    change.absolute().atMost(long.times(RIGID)),
    say(
      'not-rigid',
    )`The chord changes its length by ${change} when it is moved: a rigid group keeps its shape, so make both chords equally long`,
  );
  return {
    cosine: dot(u, v).over(scale),
    sine: cross(u, v).over(scale),
    pivot: before.from,
    place: after.from,
  };
}

/** A vector as the motion leaves it: turned. */
export function turned(motion: Motion, { x, y }: Vector): Vector {
  const { cosine, sine } = motion;
  return { x: x.times(cosine).minus(y.times(sine)), y: x.times(sine).plus(y.times(cosine)) };
}

/** A point as the motion leaves it. */
export function moved(motion: Motion, point: Point): Point {
  return add(motion.place, turned(motion, subtract(point, motion.pivot)));
}

/** By how much the motion turns, anticlockwise, in −π..π. */
export function turnOf(motion: Motion): Scalar {
  return arctangent(motion.sine, motion.cosine);
}

/** One motion where the condition holds, another where it does not. */
export function chooseMotion(condition: Condition, yes: Motion, no: Motion): Motion {
  return {
    cosine: condition.choose(yes.cosine, no.cosine),
    sine: condition.choose(yes.sine, no.sine),
    pivot: chooseVector(condition, yes.pivot, no.pivot),
    place: chooseVector(condition, yes.place, no.place),
  };
}

/** The point mirrored at the line through a chord. */
export function mirrored(point: Point, axis: Chord): Point {
  const long = lengthOf(axis);
  const u = subtract(axis.to, axis.from);
  const p = subtract(point, axis.from);
  const along = dot(p, u).over(long.squared());
  const across = cross(u, p).over(long.squared());
  const foot = { x: u.x.times(along), y: u.y.times(along) };
  // The left normal of u is (−uy, ux); the mirrored point lies as far on the other side.
  return add(axis.from, {
    x: foot.x.plus(u.y.times(across)),
    y: foot.y.minus(u.x.times(across)),
  });
}
