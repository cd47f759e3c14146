import { type Arc, arcThrough, type Chord, type Circle, type Point } from '../../src/geometry/index.ts';
import { defineKind, type Figures, type Kind, type Literal, type XY } from '../../src/graph/index.ts';
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
  draw: (at) => [{ mark: 'point', at }],
});

export const chord: Kind<Chord> = defineKind<Chord>({
  name: 'chord',
  called: 'a chord',
  line: 'geometry',
  literal: (literal, quantity) => {
    const [from = '', to = ''] = parts(literal);
    return { from: readPoint(from, quantity), to: readPoint(to, quantity) };
  },
  draw: ({ from, to }) => [{ mark: 'line', from, to }],
});

export const circle: Kind<Circle> = defineKind<Circle>({
  name: 'circle',
  called: 'a circle',
  line: 'geometry',
  literal: (literal, quantity) => {
    const [centre = '', radius = ''] = parts(literal);
    return { centre: readPoint(centre, quantity), radius: quantity(radius) };
  },
  draw: ({ centre, radius }) => [{ mark: 'circle', centre, radius }],
});

export const arc: Kind<Arc> = defineKind<Arc>({
  name: 'arc',
  called: 'an arc',
  line: 'geometry',
  literal: (literal, quantity) => {
    const [from = '', through = '', to = ''] = parts(literal);
    return arcThrough(readPoint(from, quantity), readPoint(through, quantity), readPoint(to, quantity));
  },
  draw: (figures) => [{ mark: 'curve', points: pointsOfArc(figures) }],
});

/** Points along an arc, close enough to draw it by straight lines. */
export function pointsOfArc({ centre, from, sweep }: Figures<Arc>): XY[] {
  const steps = Math.max(2, Math.ceil(Math.abs(sweep) / 0.05));
  const [dx, dy] = [from.x - centre.x, from.y - centre.y];
  return Array.from({ length: steps + 1 }, (_, i) => {
    const angle = (sweep * i) / steps;
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    return { x: centre.x + dx * c - dy * s, y: centre.y + dx * s + dy * c };
  });
}
