import { LENGTH } from '../quantity/index.ts';
import { arctangent, guard, type Scalar, say } from '../tape/index.ts';
import { COINCIDENT } from './tolerance.ts';
import { add, distance, type Point, scale, subtract, type Vector } from './vector.ts';

/** The straight connection of two points, with a direction: from its first end to its second. */
export interface Chord {
  readonly from: Point;
  readonly to: Point;
}

/** The chord that starts at a point, with an inclination (anticlockwise from +x) and a length. */
export function chordFrom(from: Point, inclination: Scalar, length: Scalar): Chord {
  const along = { x: inclination.cosine(), y: inclination.sine() };
  return { from, to: add(from, scale(along, length)) };
}

/** The length, guarded: a chord between two coinciding points has none, and no direction either. */
export function lengthOf(chord: Chord): Scalar {
  const length = distance(chord.from, chord.to);
  const least = length.trace.constant(COINCIDENT, LENGTH);
  return guard(
    length,
    length.above(least),
    say('no-length')`The two ends of the chord coincide (${length} apart): move one of them`,
  );
}

/** The direction from the first end to the second, of length 1. */
export function directionOf(chord: Chord): Vector {
  const length = lengthOf(chord);
  const { x, y } = subtract(chord.to, chord.from);
  return { x: x.over(length), y: y.over(length) };
}

/** The angle of the chord's direction, anticlockwise from +x, in −π..π. */
export function inclinationOf(chord: Chord): Scalar {
  const { x, y } = directionOf(chord);
  return arctangent(y, x);
}

/** The point at a distance along the chord from its first end; it may lie beyond either end. */
export function pointAlong(chord: Chord, along: Scalar): Point {
  return add(chord.from, scale(directionOf(chord), along));
}
