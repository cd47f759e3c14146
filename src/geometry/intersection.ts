import { LENGTH, NONE } from '../quantity/index.ts';
import { asAngle, type Condition, guard, guardSlope, type Scalar, say } from '../tape/index.ts';
import { type Chord, directionOf } from './chord.ts';
import type { Circle } from './circle.ts';
import { COINCIDENT, GRAZING, PARALLEL, TOUCHING } from './tolerance.ts';
import { add, cross, dot, magnitude, type Point, scale, subtract, turnLeft, type Vector } from './vector.ts';

/**
 * Which of two meeting points is meant: the one nearest to a reference point, or the one to the left or to the
 * right of the line from the first centre to the second.
 */
export type Branch = { readonly nearest: Point } | 'left' | 'right';

/**
 * Where two circles meet.
 *
 * With d the distance of the centres, the foot of the common chord lies (d² + r₁² − r₂²) / 2d from the first
 * centre; half the common chord is √((r₁+r₂+d)(r₁+r₂−d)(d+r₁−r₂)(d−r₁+r₂)) / 2d (Heron's formula, which keeps
 * its digits where the circles nearly touch).
 *
 * Queries: centres at one point, circles apart, one inside the other, a reference point that is as far from the
 * one as from the other; and, when a derivative is taken, circles that only touch.
 */
export function circlesMeet(first: Circle, second: Circle, branch: Branch): Point {
  const { trace } = first.radius;
  const [r, s] = [first.radius, second.radius];
  const apart = subtract(second.centre, first.centre);
  const bareDistance = magnitude(apart);
  const d = guard(
    bareDistance,
    bareDistance.above(trace.constant(COINCIDENT, LENGTH)),
    say(
      'circles-concentric',
    )`The two circles have one centre (${bareDistance} apart): move one of the centres`,
  );
  const gap = d.minus(r.plus(s));
  const slack = r.plus(s).times(TOUCHING);
  const outside = guard(
    d,
    gap.atMost(slack),
    say(
      'circles-apart',
    )`The two circles miss each other by ${gap}: lengthen a radius or bring the centres together by as much`,
  );
  const short = r.minus(s).absolute().minus(d);
  const meeting = guard(
    outside,
    short.atMost(slack),
    say(
      'circle-inside',
    )`One circle lies inside the other and misses it by ${short}: lengthen the smaller radius or move the centres apart by as much`,
  );
  const foot = meeting.squared().plus(r.squared()).minus(s.squared()).over(meeting.times(2));
  const square = r
    .plus(s)
    .plus(meeting)
    .times(r.plus(s).minus(meeting))
    .times(meeting.plus(r).minus(s))
    .times(meeting.minus(r).plus(s))
    .over(meeting.squared().times(4));
  const half = rootOfHalfChord(
    square,
    r.least(s),
    say(
      'circles-touch',
    )`The two circles only touch, ${gap.absolute()} from parting: where they meet can't be followed. Move a centre or change a radius so that they cross`,
  );
  const along = scale(apart, foot.over(meeting));
  const across = scale(turnLeft(apart), half.over(meeting));
  return pickSide(first.centre, apart, along, across, half, branch);
}

/** Which of the two points where a line meets a circle: the one met first or second along the chord's direction. */
export type LineBranch = { readonly nearest: Point } | 'first' | 'second';

/** Where the line through a chord meets a circle. Queries as for two circles. */
export function circleMeetsLine(circle: Circle, chord: Chord, branch: LineBranch): Point {
  const direction = directionOf(chord);
  const toCentre = subtract(circle.centre, chord.from);
  const foot = add(chord.from, scale(direction, dot(toCentre, direction)));
  const off = cross(direction, toCentre);
  const { radius } = circle;
  const gap = off.absolute().minus(radius);
  const reach = guard(
    radius,
    gap.atMost(radius.times(TOUCHING)),
    say(
      'line-misses-circle',
    )`The line misses the circle by ${gap}: lengthen the radius or move the line by as much`,
  );
  const square = reach.minus(off).times(reach.plus(off));
  const half = rootOfHalfChord(
    square,
    radius,
    say(
      'line-touches-circle',
    )`The line only touches the circle, ${gap.absolute()} from parting: where they meet can't be followed. Move the line or change the radius so that they cross`,
  );
  const step = scale(direction, half);
  if (branch === 'second') return add(foot, step);
  if (branch === 'first') return subtract(foot, step);
  const ahead = dot(subtract(branch.nearest, foot), direction);
  const sign = signOf(ahead, half);
  return add(foot, scale(step, sign));
}

/** Where the lines through two chords meet; they may meet beyond the chords' ends. */
export function linesMeet(first: Chord, second: Chord): Point {
  const [u, v] = [directionOf(first), directionOf(second)];
  const bare = cross(u, v);
  const sine = guard(
    bare,
    bare.absolute().above(PARALLEL),
    say(
      'lines-parallel',
    )`The two lines are parallel (${asAngle(bare.absolute())} between them): turn one of them`,
  );
  const along = cross(subtract(second.from, first.from), v).over(sine);
  return add(first.from, scale(u, along));
}

/** √square, 0 where rounding made it negative, with its slope guarded where the curves only touch. */
function rootOfHalfChord(
  square: Scalar,
  radius: Scalar,
  touching: ReturnType<ReturnType<typeof say>>,
): Scalar {
  const least = radius.times(GRAZING).squared();
  return guardSlope(square.most(0), square.above(least), touching).squareRoot();
}

/**
 * The point beside the line of the centres. The two meeting points mirror each other at that line, so the one
 * nearest to a reference is the one on the reference's side.
 */
function pickSide(
  centre: Point,
  apart: Vector,
  along: Vector,
  across: Vector,
  half: Scalar,
  branch: Branch,
): Point {
  const foot = add(centre, along);
  if (branch === 'left') return add(foot, across);
  if (branch === 'right') return subtract(foot, across);
  const side = cross(apart, subtract(branch.nearest, centre)).over(magnitude(apart));
  return add(foot, scale(across, signOf(side, half)));
}

/** 1 or −1 by the sign of a reference's distance to one side, with a query where it is on neither. */
function signOf(side: Scalar, half: Scalar): Scalar {
  const { trace } = side;
  const noise = trace.constant(COINCIDENT, LENGTH);
  const decided: Condition = side.absolute().above(noise).or(half.atMost(noise));
  const plus = trace.constant(1, NONE);
  return guard(
    side.below(0).choose(plus.negated(), plus),
    decided,
    say(
      'no-nearest',
    )`The reference point is as far from the one meeting point as from the other (${side.absolute()} to one side): move it towards the one that is meant`,
  );
}
