import { chooseVector, type Point, subtract, type Vector } from '../geometry/index.ts';
import { LENGTH, NONE } from '../quantity/index.ts';
import { Condition, guard, Refusal, type Scalar, say } from '../tape/index.ts';
import { type Arch, axisLength, crownStart } from './arch.ts';
import { SAME_PLACE } from './tolerance.ts';

/** A place on the axis of an arch. */
export interface Place {
  /** Distance along the axis from the left springing. */
  readonly along: Scalar;
  readonly point: Point;
  /** Direction of the axis there, from left to right, of length 1. */
  readonly direction: Vector;
  /** The segment it lies in, and how far along it, where that is known while tracing and not only in a run. */
  readonly on?: { readonly segment: number; readonly ratio: Scalar };
}

/** The place at a ratio of the way along a segment, which is numbered from 0. */
export function placeOnSegment(arch: Arch, segment: number, ratio: Scalar): Place {
  const found = arch.segments[segment];
  const start = arch.starts[segment];
  if (found === undefined || start === undefined) {
    throw new Refusal(
      'no-segment',
      `the axis has ${arch.segments.length} segments: there is no ${segment + 1}`,
    );
  }
  const along = start.plus(found.length.times(ratio));
  return { along, point: found.pointAt(ratio), direction: found.directionAt(ratio), on: { segment, ratio } };
}

/** The place at a knee, counted from 1 at the left springing: the end of the segment to its left. */
export function kneePlace(arch: Arch, knee: number): Place {
  const ends = arch.segments.length - 1;
  const knees = Array.from({ length: ends }, (_, i) => i).filter((i) => i !== arch.leftSegments - 1);
  const segment = knees[knee - 1];
  if (segment === undefined) {
    const has = knees.length === 0 ? 'no knee' : knees.length === 1 ? 'one knee' : `${knees.length} knees`;
    throw new Refusal('no-knee', `the axis has ${has}: there is no knee ${knee}`);
  }
  const { x } = arch.left;
  return placeOnSegment(arch, segment, x.trace.constant(1, NONE));
}

/** The place at a distance along the axis from the left springing, with a query beyond its ends. */
export function placeAlong(arch: Arch, distanceAlong: Scalar): Place {
  const total = axisLength(arch);
  const slack = total.times(1e-12);
  const beyond = distanceAlong.minus(total).most(distanceAlong.negated());
  const along = guard(
    distanceAlong,
    beyond.atMost(slack),
    say(
      'beyond-axis',
    )`The station lies ${beyond} beyond the end of the axis, which is ${total} long: bring it back onto the axis`,
  );
  const candidates = arch.segments.map((segment, i) => {
    const start = arch.starts[i] as Scalar;
    const ratio = along.minus(start).over(segment.length).most(0).least(1);
    return { start, point: segment.pointAt(ratio), direction: segment.directionAt(ratio) };
  });
  const [first, ...others] = candidates;
  if (first === undefined) throw new Error('an axis has segments');
  let { point, direction } = first;
  for (const { start, point: p, direction: d } of others) {
    const here = along.above(start);
    point = chooseVector(here, p, point);
    direction = chooseVector(here, d, direction);
  }
  return { along, point, direction };
}

/** The place of the axis that is nearest to a point, and how far that is. */
export function placeNearest(arch: Arch, point: Point): { readonly place: Place; readonly off: Scalar } {
  const candidates = arch.segments.map((segment, i) => {
    const ratio = segment.nearest(point);
    const at = segment.pointAt(ratio);
    const { x, y } = subtract(point, at);
    return {
      square: x.squared().plus(y.squared()),
      along: (arch.starts[i] as Scalar).plus(segment.length.times(ratio)),
      point: at,
      direction: segment.directionAt(ratio),
    };
  });
  const [first, ...others] = candidates;
  if (first === undefined) throw new Error('an axis has segments');
  let best = first;
  for (const other of others) {
    const nearer = other.square.below(best.square);
    best = {
      square: nearer.choose(other.square, best.square),
      along: nearer.choose(other.along, best.along),
      point: chooseVector(nearer, other.point, best.point),
      direction: chooseVector(nearer, other.direction, best.direction),
    };
  }
  const { square, ...place } = best;
  // The slope of a root is unbounded at 0, which is where a load on the axis stands.
  const away = square.above(0);
  const one = square.trace.constant(1, square.dimension);
  const off = away.choose(away.choose(square, one).squareRoot(), square.trace.constant(0, LENGTH));
  return { place, off };
}

/**
 * Whether one place comes before another, walking from the left springing; one place by rounding alone does not.
 * Known while tracing if segments tell.
 */
export function isBefore(a: Place, b: Place): Condition {
  if (a.on === undefined || b.on === undefined) return a.along.below(b.along.times(1 - SAME_PLACE));
  if (a.on.segment === b.on.segment) return a.on.ratio.below(b.on.ratio.times(1 - SAME_PLACE));
  return known(a, a.on.segment < b.on.segment);
}

/** Whether a place belongs to the left half. The crown hinge itself counts as its end. */
export function isLeft(arch: Arch, place: Place): Condition {
  if (place.on !== undefined) return known(place, place.on.segment < arch.leftSegments);
  return place.along.atMost(crownStart(arch).times(1 + SAME_PLACE));
}

function known(place: Place, holds: boolean): Condition {
  return new Condition(place.along.trace.constant(holds ? 1 : 0, NONE));
}
