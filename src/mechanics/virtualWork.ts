import { dot, type Point, subtract, type Vector } from '../geometry/index.ts';
import { LENGTH, MOMENT } from '../quantity/index.ts';
import {
  asAngle,
  derivative,
  guard,
  Refusal,
  type Scalar,
  say,
  substitute,
  sum,
  type Trace,
} from '../tape/index.ts';
import { UNMOVED } from './tolerance.ts';

/** What a released and perturbed mechanism is, so far as virtual work is concerned. */
export interface PerturbedState {
  /** What drives the mechanism; 0 where it is unperturbed. A variable of its own (`Trace.mark`). */
  readonly perturbation: Scalar;
  readonly loads: readonly { readonly at: Point; readonly force: Vector }[];
  /** Where the point of each load is when the mechanism is perturbed, in the order of the loads. */
  readonly moved: readonly Point[];
  /** The relative turn at the released cut: positive where the angle on the intrados closes. */
  readonly closing: Scalar;
  /** A displacement that counts as none: it bounds how far a moved point may be off its load when p is 0. */
  readonly negligible: Scalar;
}

/** A moment by virtual work. */
export interface VirtualWorkMoment {
  /** The exact limit, as the perturbation goes to 0. */
  readonly limit: Scalar;
  /** The value at the finite perturbation, as it can be measured on a drawing. */
  readonly finite: Scalar;
  /** The displacement along each load, at the finite perturbation. */
  readonly along: readonly Scalar[];
  /** The rate of the displacement along each load, per unit of the perturbation, where it is 0. */
  readonly rates: readonly Scalar[];
}

/**
 * The bending moment at a released cut, by the principle of virtual work.
 *
 * The work of the loads and of the moment on the movement of the mechanism is 0:
 * M = −Σ F·u / δ at a finite perturbation p, and M = −Σ F·(du/dp) / (dδ/dp) at p = 0, δ being the change of
 * the angle at the cut. The latter is an exact derivative, not a small difference.
 *
 * Queries: a moved point that is not at its load when nothing is moved; a cut whose angle does not change.
 *
 * @throws Refusal where loads and moved points are not as many.
 */
export function virtualWorkMoment(state: PerturbedState): VirtualWorkMoment {
  const { perturbation, loads, moved, closing } = state;
  const { trace } = perturbation;
  if (loads.length !== moved.length) {
    throw new Refusal(
      'moved-points',
      `there are ${loads.length} loads and ${moved.length} moved points: link one moved point for each load, in the same order`,
    );
  }
  const displacements = loads.map(({ at }, i) => {
    const after = moved[i] as Point;
    return subtract(checkUnmoved(state, at, after, i), at);
  });
  const works = loads.map(({ force }, i) => dot(force, displacements[i] as Vector));
  const work = sum([trace.constant(0, MOMENT), ...works]);

  const slopes = derivative([work, closing], perturbation, 0);
  const [workRate, closingRate] = slopes as [Scalar, Scalar];
  const limit = workRate
    .negated()
    .over(
      guard(
        closingRate,
        closingRate.absolute().above(LEAST_RATE),
        say(
          'angle-unchanged',
        )`The angle at the cut does not change with the perturbation (${closingRate} of it): take the change of the angle at the point that is cut, and build the moved points on the perturbation`,
      ),
    );
  const finite = work
    .negated()
    .over(
      guard(
        closing,
        closing.absolute().above(LEAST_CLOSING),
        say(
          'no-perturbation',
        )`The perturbation is ${asAngle(perturbation)}: give it a size, for example 2°, to see a value at it`,
      ),
    );
  const along = loads.map(({ force }, i) => perUnitForce(works[i] as Scalar, force));
  const rates = derivative(along, perturbation, 0);
  return { limit, finite, along, rates };
}

/**
 * A displacement that counts as none among loads: a share of how far they lie apart, or of a metre where that is
 * less.
 */
export function negligibleDisplacement(loads: readonly { readonly at: Point }[], trace: Trace): Scalar {
  let reach = trace.constant(1, LENGTH);
  const [first, ...others] = loads;
  for (const { at } of others) {
    const { x, y } = subtract(at, (first as { at: Point }).at);
    reach = reach.most(x.absolute()).most(y.absolute());
  }
  return reach.times(UNMOVED);
}

/** Below this rate of change the angle is taken not to change at all; a mechanism's is of the order of 1. */
const LEAST_RATE = 1e-9;

/**
 * Below this change of the angle, in radians, nothing is taken to have moved: an unperturbed mechanism closes by its
 * rounding of some 1e-16, and work over that would be a figure of nothing.
 */
const LEAST_CLOSING = 1e-9;

/** The moved point, with a query unless it is at the load while nothing is moved. */
function checkUnmoved(state: PerturbedState, at: Point, after: Point, i: number): Point {
  const { perturbation, negligible } = state;
  const [x, y] = substitute([after.x, after.y], perturbation, 0) as [Scalar, Scalar];
  const square = x.minus(at.x).squared().plus(y.minus(at.y).squared());
  const least = negligible.squared();
  // The root is taken only where it is needed for the words, since its slope is unbounded at 0.
  const miss = square.above(least);
  const off = miss.choose(square, least).squareRoot();
  const query = say(
    'moved-point',
  )`The moved point of load ${i + 1} is ${off} off the load while nothing is moved: link the points in the order of the loads`;
  return { x: guard(after.x, miss.not(), query), y: guard(after.y, miss.not(), query) };
}

/** Work over the size of the force: the displacement along it. 0 for a force of 0, which has no direction. */
function perUnitForce(work: Scalar, force: Vector): Scalar {
  const { trace } = work;
  const square = dot(force, force);
  const acts = square.above(0);
  const one = trace.constant(1, square.dimension);
  const size = acts.choose(square, one).squareRoot();
  return acts.choose(work.over(size), trace.constant(0, LENGTH));
}
