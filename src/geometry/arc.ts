import { LENGTH } from '../quantity/index.ts';
import { arctangent, guard, type Scalar, say } from '../tape/index.ts';
import { type Chord, lengthOf } from './chord.ts';
import { COINCIDENT } from './tolerance.ts';
import { add, cross, dot, magnitude, type Point, scale, subtract, turnLeft, type Vector } from './vector.ts';

/** Part of a circle, from a first point to a last one. */
export interface Arc {
  readonly centre: Point;
  readonly radius: Scalar;
  readonly from: Point;
  readonly to: Point;
  /** Angle at the centre from the first point to the last, anticlockwise, in −2π..2π. */
  readonly sweep: Scalar;
}

/**
 * The arc from one point through a second to a third.
 *
 * The angle at the centre is twice the turn of the broken line at the middle point (inscribed angle theorem);
 * the centre lies on the bisector of the chord at (c/2) · cot(sweep/2) from it. A query where the three points
 * lie on one line.
 */
export function arcThrough(from: Point, through: Point, to: Point): Arc {
  const [u, v] = [subtract(through, from), subtract(to, through)];
  const area = cross(u, v);
  const chord = subtract(to, from);
  const long = lengthOf({ from, to });
  const off = area.absolute().over(long);
  const curved = guard(
    area,
    off.above(area.trace.constant(COINCIDENT, LENGTH)),
    say(
      'arc-straight',
    )`The three points lie on one line (the middle one is ${off} off it): move the middle one aside, or take a straight segment`,
  );
  const turn = arctangent(curved, dot(u, v));
  const towardsCentre = dot(u, v).over(curved.times(2));
  const centre = add(add(from, scale(chord, 0.5)), scale(turnLeft(chord), towardsCentre));
  return { centre, radius: magnitude(subtract(from, centre)), from, to, sweep: turn.times(2) };
}

/** The length along the arc. */
export function arcLength(arc: Arc): Scalar {
  return arc.radius.times(arc.sweep.absolute());
}

/** The point at a ratio of the way along the arc. */
export function pointOnArc(arc: Arc, ratio: Scalar): Point {
  return add(arc.centre, spoke(arc, ratio));
}

/** The direction of travel along the arc at a ratio of the way, of length 1. */
export function directionOnArc(arc: Arc, ratio: Scalar): Vector {
  const left = turnLeft(spoke(arc, ratio));
  const forward = arc.sweep.below(0);
  const one = scale(left, arc.radius.power(-1));
  return {
    x: forward.choose(one.x.negated(), one.x),
    y: forward.choose(one.y.negated(), one.y),
  };
}

/** The ratio of the way at which the arc comes nearest to a point, within its ends. */
export function nearestOnArc(arc: Arc, point: Point): Scalar {
  const { trace } = arc.radius;
  const middle = spoke(arc, trace.constant(0.5, arc.sweep.dimension));
  const p = subtract(point, arc.centre);
  const fromMiddle = arctangent(cross(middle, p), dot(middle, p));
  return fromMiddle.over(arc.sweep).plus(0.5).most(0).least(1);
}

/** The chord of the arc. */
export function chordOf(arc: Arc): Chord {
  return { from: arc.from, to: arc.to };
}

function spoke(arc: Arc, ratio: Scalar): Vector {
  const angle = arc.sweep.times(ratio);
  const [c, s] = [angle.cosine(), angle.sine()];
  const { x, y } = subtract(arc.from, arc.centre);
  return { x: x.times(c).minus(y.times(s)), y: x.times(s).plus(y.times(c)) };
}
