import { LENGTH } from '../quantity/index.ts';
import { guard, type Scalar, say } from '../tape/index.ts';
import { COINCIDENT } from './tolerance.ts';
import { distance, type Point } from './vector.ts';

export interface Circle {
  readonly centre: Point;
  readonly radius: Scalar;
}

/** The circle about a point with a radius, which must be a length worth the name. */
export function circle(centre: Point, radius: Scalar): Circle {
  const least = radius.trace.constant(COINCIDENT, LENGTH);
  return {
    centre,
    radius: guard(
      radius,
      radius.above(least),
      say('no-radius')`The circle has a radius of ${radius}: give it a length above 0`,
    ),
  };
}

/** The circle about a point through another. */
export function circleThrough(centre: Point, through: Point): Circle {
  return circle(centre, distance(centre, through));
}
