import { add, cross, dot, reverse, scale, subtract, type Vector } from '../geometry/index.ts';
import { NONE } from '../quantity/index.ts';
import { Condition, type Scalar } from '../tape/index.ts';
import { type Arch, whereStiff } from './arch.ts';
import { type PlacedLoad, type Resultant, resultant } from './load.ts';
import { isBefore, isLeft, type Place } from './place.ts';

/** What the ground and the halves press on each other with. */
export interface Reactions {
  /** Of the ground on the arch at the left springing. */
  readonly left: Vector;
  /** Of the ground on the arch at the right springing. */
  readonly right: Vector;
  /** Of the right half on the left half at the crown hinge. */
  readonly crown: Vector;
  /** What is left of the moment about the crown of all that acts on the right half: 0 but for rounding. */
  readonly residual: Scalar;
}

/**
 * The reactions of a three-hinged arch, from the moments about its hinges.
 *
 * With u = A − C and v = A − B, the reaction R at A follows from u × R = −m₁ (the loads of the left half about
 * C) and v × R = −m₂ (all loads about B): R = (m₂ u − m₁ v) / (u × v). The denominator is twice the area of
 * the triangle of the hinges.
 *
 * A query where the hinges lie on one line.
 */
export function reactions(arch: Arch, loads: readonly PlacedLoad[]): Reactions {
  const { left: a, crown: c, right: b } = arch;
  const [u, v] = [subtract(a, c), subtract(a, b)];
  const twiceArea = whereStiff(arch, cross(u, v));
  const ofLeft = resultant(loads, c, (load) => isLeft(arch, load.place));
  const ofAll = resultant(loads, b, () => always(twiceArea));
  const push = subtract(scale(u, ofAll.moment), scale(v, ofLeft.moment));
  const left = { x: push.x.over(twiceArea), y: push.y.over(twiceArea) };
  const right = reverse(add(left, ofAll.force));
  const crown = reverse(add(left, ofLeft.force));
  const ofRight = resultant(loads, c, (load) => isLeft(arch, load.place).not());
  const residual = ofRight.moment.plus(cross(subtract(b, c), right));
  return { left, right, crown, residual };
}

/** The internal forces at a place: tension, shear and bending, in the signs of the conventions. */
export interface InternalForces {
  /** Axial force, tension positive. */
  readonly axial: Scalar;
  /** Shear force, the rate of change of the moment along the axis. */
  readonly shear: Scalar;
  /** Bending moment, positive where it puts the intrados in tension. */
  readonly moment: Scalar;
}

/** The internal forces at a place, from all that acts to the left of it. */
export function internalForces(
  arch: Arch,
  loads: readonly PlacedLoad[],
  reaction: Pick<Reactions, 'left'>,
  cut: Place,
): InternalForces {
  const before: Resultant = resultant(loads, arch.left, (load) => isBefore(load.place, cut));
  const force = add(reaction.left, before.force);
  return {
    axial: dot(force, cut.direction).negated(),
    shear: cross(cut.direction, force),
    moment: cross(subtract(cut.point, arch.left), force).minus(before.moment),
  };
}

function always(like: Scalar): Condition {
  return new Condition(like.trace.constant(1, NONE));
}
