import type { Scalar } from '../tape/index.ts';
import { type Arc, arcLength, arcThrough, directionOnArc, nearestOnArc, pointOnArc } from './arc.ts';
import { directionOf, lengthOf } from './chord.ts';
import { between, dot, type Point, subtract, type Vector } from './vector.ts';

/** A piece of an axis between two key points: what its shape is asked for, whatever its shape. */
export interface Segment {
  readonly from: Point;
  readonly to: Point;
  readonly length: Scalar;
  /** The arc, where the segment is one. */
  readonly arc?: Arc;
  /** The point at a ratio of the way, 0 at the first end, 1 at the last. */
  pointAt(ratio: Scalar): Point;
  /** The direction of travel there, of length 1. */
  directionAt(ratio: Scalar): Vector;
  /** The ratio of the way at which the segment comes nearest to a point. */
  nearest(point: Point): Scalar;
}

export function straightSegment(from: Point, to: Point): Segment {
  const length = lengthOf({ from, to });
  return {
    from,
    to,
    length,
    pointAt: (ratio) => between(from, to, ratio),
    directionAt: () => directionOf({ from, to }),
    nearest: (point) => {
      const along = dot(subtract(point, from), subtract(to, from));
      return along.over(length.squared()).most(0).least(1);
    },
  };
}

export function arcSegment(from: Point, through: Point, to: Point): Segment {
  const arc = arcThrough(from, through, to);
  return {
    from,
    to,
    length: arcLength(arc),
    arc,
    pointAt: (ratio) => pointOnArc(arc, ratio),
    directionAt: (ratio) => directionOnArc(arc, ratio),
    nearest: (point) => nearestOnArc(arc, point),
  };
}
