import {
  type Circle,
  chooseMotion,
  chooseVector,
  circlesMeet,
  cross,
  distance,
  type Motion,
  motionBetween,
  moved,
  type Point,
  subtract,
  TOUCHING,
  turnAbout,
  turnOf,
} from '../geometry/index.ts';
import { LENGTH } from '../quantity/index.ts';
import { asAngle, guard, type Scalar, say } from '../tape/index.ts';
import { type Arch, axisLength, crownStart, whereStiff } from './arch.ts';
import { isBefore, isLeft, type Place } from './place.ts';
import { AT_HINGE, DEAD_POINT } from './tolerance.ts';

/**
 * An arch that is released by a hinge at a cut: three rigid bodies between four hinges, with one freedom. All of
 * it at the perturbation that drives it.
 */
export interface Mechanism {
  /** The inner hinges, cut and crown, in the order of the axis: as they were, and as they are moved to. */
  readonly hinges: readonly [Point, Point];
  readonly movedHinges: readonly [Point, Point];
  /** The motions of the three bodies, from left to right. */
  readonly bodies: readonly [Motion, Motion, Motion];
  /** The circles that found the far hinge: about the driven hinge, and about the far springing. */
  readonly circles: readonly [Circle, Circle];
  /** The relative turn at the cut, positive where the angle on the intrados closes. */
  readonly closing: Scalar;
  /** Where a point is moved to, with the body that carries it at a place of the axis. */
  move(tied: { readonly at: Point; readonly place: Place }): Point;
}

/**
 * Releases the bending moment at a cut and perturbs the mechanism that comes of it.
 *
 * One end body turns about its springing by the perturbation; the hinge at its other end goes with it; the next
 * hinge keeps its distances from that one and from the far springing, and so is found as the meeting point of
 * two circles, the one nearest to where it was; the two other bodies are carried along by their hinges.
 *
 * It is driven from the left springing unless that is near a dead point (the far circles nearly touch), and
 * then from the right one; only where all hinges lie on one line are both ends at a dead point.
 *
 * Queries: a cut at a hinge; an arch without stiffness; a perturbation that the mechanism can't follow.
 */
export function releaseMoment(arch: Arch, cut: Place, perturbation: Scalar): Mechanism {
  const inLeft = isLeft(arch, cut);
  const cutPoint = checkCut(arch, { ...cut, along: whereStiff(arch, cut.along) });
  const first = chooseVector(inLeft, cutPoint, arch.crown);
  const second = chooseVector(inLeft, arch.crown, cutPoint);

  const fromLeft = sineAt(first, second, arch.right)
    .above(DEAD_POINT)
    .or(sineAt(first, second, arch.right).atLeast(sineAt(second, first, arch.left)));
  const driven = chooseVector(fromLeft, arch.left, arch.right);
  const near = chooseVector(fromLeft, first, second);
  const far = chooseVector(fromLeft, second, first);
  const end = chooseVector(fromLeft, arch.right, arch.left);

  const driver = turnAbout(driven, perturbation);
  const nearMoved = moved(driver, near);
  const circles: readonly [Circle, Circle] = [
    { centre: nearMoved, radius: distance(near, far) },
    { centre: end, radius: distance(far, end) },
  ];
  const farMoved = circlesMeet(withinReach(circles, perturbation), circles[1], { nearest: far });
  const middle = motionBetween({ from: near, to: far }, { from: nearMoved, to: farMoved });
  const follower = motionBetween({ from: end, to: far }, { from: end, to: farMoved });

  const leftBody = chooseMotion(fromLeft, driver, follower);
  const rightBody = chooseMotion(fromLeft, follower, driver);
  const [turnLeft, turnMiddle, turnRight] = [turnOf(leftBody), turnOf(middle), turnOf(rightBody)];
  return {
    hinges: [first, second],
    movedHinges: [chooseVector(fromLeft, nearMoved, farMoved), chooseVector(fromLeft, farMoved, nearMoved)],
    bodies: [leftBody, middle, rightBody],
    circles,
    closing: inLeft.choose(turnLeft.minus(turnMiddle), turnMiddle.minus(turnRight)),
    move: ({ at, place }) => {
      const beforeCut = isBefore(place, cut);
      const left = isLeft(arch, place);
      const beforeFirst = left.and(beforeCut);
      const afterSecond = left.or(beforeCut).not();
      // Left of the first inner hinge, right of the second, or between the two.
      return moved(chooseMotion(beforeFirst, leftBody, chooseMotion(afterSecond, rightBody, middle)), at);
    },
  };
}

/** The cut's point, with a query where it is at a hinge, which carries no moment. */
function checkCut(arch: Arch, cut: Place): Point {
  const total = axisLength(arch);
  const least = total.trace.constant(AT_HINGE, LENGTH);
  const off = cut.along.least(total.minus(cut.along)).least(cut.along.minus(crownStart(arch)).absolute());
  const query = say(
    'cut-at-hinge',
  )`The cut is at a hinge (${off} from it), which carries no moment: move the station along the axis`;
  return {
    x: guard(cut.point.x, off.above(least), query),
    y: guard(cut.point.y, off.above(least), query),
  };
}

/**
 * The circle about the driven hinge, guarded: where the circles miss each other, nobody has drawn them, and what can
 * be changed is how far the mechanism is turned.
 */
function withinReach([first, second]: Mechanism['circles'], perturbation: Scalar): Circle {
  const [r, s] = [first.radius, second.radius];
  const apart = distance(first.centre, second.centre);
  const gap = apart.minus(r.plus(s)).most(r.minus(s).absolute().minus(apart));
  const reached = gap.atMost(r.plus(s).times(TOUCHING));
  const query = say(
    'turned-too-far',
  )`The released mechanism can't follow a perturbation of ${asAngle(perturbation)}: its circles miss each other by ${gap}. Take a smaller one`;
  const { x, y } = first.centre;
  return { centre: { x: guard(x, reached, query), y: guard(y, reached, query) }, radius: r };
}

/** The sine of the angle at the middle one of three points. */
function sineAt(a: Point, middle: Point, b: Point): Scalar {
  const [u, v] = [subtract(a, middle), subtract(b, middle)];
  return cross(u, v)
    .absolute()
    .over(distance(a, middle).times(distance(middle, b)));
}
