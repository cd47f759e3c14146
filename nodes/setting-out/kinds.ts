import { type Arc, arcThrough, type Chord, type Circle, type Point } from '../../src/geometry/index.ts';
import { defineKind, type Kind, type Literal } from '../../src/graph/index.ts';
import type { Scalar } from '../../src/tape/index.ts';

type Reader = (text: Literal) => Scalar;

function parts(literal: Literal): readonly Literal[] {
  if (typeof literal === 'string') throw new Error(`"${literal}" is no list`);
  return literal;
}

/** A point from its two coordinates. */
export function readPoint(literal: Literal, quantity: Reader): Point {
  const [x = '', y = ''] = parts(literal);
  return { x: quantity(x), y: quantity(y) };
}

export const point: Kind<Point> = defineKind<Point>({
  name: 'point',
  called: 'a point',
  line: 'geometry',
  literal: readPoint,
});

export const chord: Kind<Chord> = defineKind<Chord>({
  name: 'chord',
  called: 'a chord',
  line: 'geometry',
  literal: (literal, quantity) => {
    const [from = '', to = ''] = parts(literal);
    return { from: readPoint(from, quantity), to: readPoint(to, quantity) };
  },
});

export const circle: Kind<Circle> = defineKind<Circle>({
  name: 'circle',
  called: 'a circle',
  line: 'geometry',
  literal: (literal, quantity) => {
    const [centre = '', radius = ''] = parts(literal);
    return { centre: readPoint(centre, quantity), radius: quantity(radius) };
  },
});

export const arc: Kind<Arc> = defineKind<Arc>({
  name: 'arc',
  called: 'an arc',
  line: 'geometry',
  literal: (literal, quantity) => {
    const [from = '', through = '', to = ''] = parts(literal);
    return arcThrough(readPoint(from, quantity), readPoint(through, quantity), readPoint(to, quantity));
  },
});
