import { describe, expect, it } from 'vitest';
import {
  arcSegment,
  type Branch,
  chordFrom,
  circle,
  circleMeetsLine,
  circlesMeet,
  circleThrough,
  linesMeet,
  mirrored,
  motionBetween,
  moved,
  type Point,
  pointAlong,
  pointOnArc,
  straightSegment,
  turnAbout,
} from '../../src/geometry/index.ts';
import { LENGTH, NONE } from '../../src/quantity/index.ts';
import type { Scalar, Trace } from '../../src/tape/index.ts';
import { construction, flat } from '../support/construction.ts';
import type { XY } from '../support/frame.ts';
import { TRANSFORMATIONS } from '../support/plane.ts';

/**
 * What is turned, mirrored, scaled or shifted on the drawing gives a turned, mirrored, scaled or shifted result.
 *
 * Angles at a datum (inclinations) turn with the drawing and change their sign in a mirror; turns change their sign
 * only; ratios stay.
 */
interface Drawn {
  readonly trace: Trace;
  readonly points: readonly Point[];
  readonly lengths: readonly Scalar[];
  /** Inclinations from +x. */
  readonly inclinations: readonly Scalar[];
  readonly turns: readonly Scalar[];
  readonly ratios: readonly Scalar[];
  /** Left, or right where the drawing is mirrored. */
  readonly left: 'left' | 'right';
}

interface Fixture {
  readonly name: string;
  readonly points: readonly (readonly [x: number, y: number])[];
  readonly lengths?: readonly number[];
  readonly inclinations?: readonly number[];
  readonly turns?: readonly number[];
  readonly ratios?: readonly number[];
  build(drawn: Drawn): readonly Point[];
}

function meet({ points, lengths }: Drawn, branch: Branch): Point[] {
  const [a, b] = points as [Point, Point];
  const [r, s] = lengths as [Scalar, Scalar];
  return [circlesMeet(circle(a, r), circle(b, s), branch)];
}

const FIXTURES: readonly Fixture[] = [
  {
    name: 'two circles, on the left',
    points: [
      [0, 0],
      [9, 2],
    ],
    lengths: [6, 5],
    build: (drawn) => meet(drawn, drawn.left),
  },
  {
    name: 'two circles, on the right',
    points: [
      [0, 0],
      [9, 2],
    ],
    lengths: [6, 5],
    build: (drawn) => meet(drawn, drawn.left === 'left' ? 'right' : 'left'),
  },
  {
    name: 'two circles, nearest to a reference',
    points: [
      [-3, 4],
      [5, -1],
      [2, 9],
    ],
    lengths: [7, 4],
    build: (drawn) => meet(drawn, { nearest: drawn.points[2] as Point }),
  },
  {
    name: 'one circle nearly inside the other',
    points: [
      [1, 1],
      [1.5, 1.25],
    ],
    lengths: [6, 6.5],
    build: (drawn) => meet(drawn, drawn.left),
  },
  {
    name: 'a circle through a point and a line, first, second and nearest',
    points: [
      [0, 0],
      [5, 1],
      [-8, -1],
      [7, 4],
      [3, 3],
    ],
    build: ({ points }) => {
      const [centre, through, from, to, nearest] = points as [Point, Point, Point, Point, Point];
      const round = circleThrough(centre, through);
      const line = { from, to };
      return [
        circleMeetsLine(round, line, 'first'),
        circleMeetsLine(round, line, 'second'),
        circleMeetsLine(round, line, { nearest }),
      ];
    },
  },
  {
    name: 'two lines that meet beyond their ends',
    points: [
      [0, 0],
      [4, 1],
      [10, 8],
      [11, 5],
    ],
    build: ({ points }) => {
      const [a, b, c, d] = points as [Point, Point, Point, Point];
      return [linesMeet({ from: a, to: b }, { from: c, to: d })];
    },
  },
  {
    name: 'a rafter set out by its inclination, and a purlin along it',
    points: [[2, 5]],
    lengths: [9, 3.25],
    inclinations: [0.4],
    build: ({ points, lengths, inclinations }) => {
      const chord = chordFrom(points[0] as Point, inclinations[0] as Scalar, lengths[0] as Scalar);
      return [chord.to, pointAlong(chord, lengths[1] as Scalar)];
    },
  },
  {
    name: 'an arc: its centre, a point on it, the point nearest to another',
    points: [
      [-6, 0],
      [-2, 4],
      [7, 1],
      [3, 9],
    ],
    ratios: [0.3],
    build: ({ points, ratios }) => {
      const [from, through, to, other] = points as [Point, Point, Point, Point];
      const segment = arcSegment(from, through, to);
      if (segment.arc === undefined) throw new Error('an arc was asked for');
      return [
        segment.arc.centre,
        pointOnArc(segment.arc, ratios[0] as Scalar),
        segment.pointAt(segment.nearest(other)),
      ];
    },
  },
  {
    name: 'a straight segment: the point nearest to another, within and beyond its ends',
    points: [
      [0, 0],
      [6, 2],
      [3, 4],
      [20, 1],
    ],
    build: ({ points }) => {
      const [from, to, beside, beyond] = points as [Point, Point, Point, Point];
      const segment = straightSegment(from, to);
      return [segment.pointAt(segment.nearest(beside)), segment.pointAt(segment.nearest(beyond))];
    },
  },
  {
    name: 'a point turned about another',
    points: [
      [1, 2],
      [6, -3],
    ],
    turns: [0.7],
    build: ({ points, turns }) => [
      moved(turnAbout(points[0] as Point, turns[0] as Scalar), points[1] as Point),
    ],
  },
  {
    name: 'a rigid group carried from one chord to another',
    points: [
      [0, 0],
      [3, 4],
      [10, 1],
      [10, 6],
      [2, 7],
    ],
    build: ({ points }) => {
      const [a, b, c, d, tied] = points as [Point, Point, Point, Point, Point];
      return [moved(motionBetween({ from: a, to: b }, { from: c, to: d }), tied)];
    },
  },
  {
    name: 'a point mirrored at a line',
    points: [
      [3, 7],
      [0, 1],
      [5, 2],
    ],
    build: ({ points }) => {
      const [point, from, to] = points as [Point, Point, Point];
      return [mirrored(point, { from, to })];
    },
  },
];

/** Runs a fixture with given figures: the points of its result. */
function runFixture(
  fixture: Fixture,
  points: readonly XY[],
  stretch: number,
  turn: number,
  flips: boolean,
): XY[] {
  const { lengths = [], inclinations = [], turns = [], ratios = [] } = fixture;
  const counts = [2 * points.length, lengths.length, inclinations.length, turns.length, ratios.length];
  const dimensions = counts.flatMap((count, i) => new Array(count).fill(i < 2 ? LENGTH : NONE));
  const drawn = construction(dimensions, (inputs, trace) => {
    const rest = [...inputs];
    const take = (count: number): Scalar[] => rest.splice(0, count);
    const made = points.map(() => {
      const [x, y] = take(2) as [Scalar, Scalar];
      return { x, y };
    });
    return flat(
      ...fixture.build({
        trace,
        points: made,
        lengths: take(lengths.length),
        inclinations: take(inclinations.length),
        turns: take(turns.length),
        ratios: take(ratios.length),
        left: flips ? 'right' : 'left',
      }),
    );
  });
  const { values, queries } = drawn(
    ...points.flatMap(({ x, y }) => [x, y]),
    ...lengths.map((length) => length * stretch),
    // A mirror at the y axis takes an inclination to π less it.
    ...inclinations.map((angle) => (flips ? Math.PI - angle : angle) + turn),
    ...turns.map((angle) => (flips ? -angle : angle)),
    ...ratios,
  );
  expect(queries).toEqual([]);
  return Array.from({ length: values.length / 2 }, (_, i) => ({
    x: values[2 * i] as number,
    y: values[2 * i + 1] as number,
  }));
}

describe.each(FIXTURES)('$name', (fixture) => {
  const points = fixture.points.map(([x, y]) => ({ x, y }));
  const plain = runFixture(fixture, points, 1, 0, false);

  it.each(TRANSFORMATIONS)(
    '$name, gives the same drawing $name',
    ({ point, stretch, turn, flips, reach }) => {
      const found = runFixture(fixture, points.map(point), stretch, turn, flips);
      expect(found).toHaveLength(plain.length);
      for (const [i, at] of plain.entries()) {
        const wanted = point(at);
        const miss = Math.hypot((found[i] as XY).x - wanted.x, (found[i] as XY).y - wanted.y);
        // Rounding of coordinates of 10 m, scaled, or of the site; circles that cross at a slant lose one digit more.
        expect(miss).toBeLessThan(100 * 2 ** -52 * (10 * stretch + reach));
      }
    },
  );
});
