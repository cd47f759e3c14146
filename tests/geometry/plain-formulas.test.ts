import { describe, expect, it } from 'vitest';
import {
  add,
  angleFrom,
  arcLength,
  arcSegment,
  arcThrough,
  between,
  chooseMotion,
  chooseVector,
  chordFrom,
  chordOf,
  circle,
  circleThrough,
  cross,
  directionOf,
  directionOnArc,
  distance,
  dot,
  inclinationOf,
  lengthOf,
  magnitude,
  mirrored,
  moved,
  nearestOnArc,
  type Point,
  pointAlong,
  pointOf,
  pointOnArc,
  reverse,
  type Segment,
  scale,
  straightSegment,
  subtract,
  turnAbout,
  turned,
  turnLeft,
  zeroVector,
} from '../../src/geometry/index.ts';
import { FORCE, LENGTH, NONE } from '../../src/quantity/index.ts';
import { type Scalar, Trace } from '../../src/tape/index.ts';
import { construction, drawing, flat, prepared } from '../support/construction.ts';
import { randomFrom } from '../support/random.ts';

/**
 * Every function against formulas in plain numbers that are written another way: by polar angles, by complex numbers,
 * by determinants, by sums over many small chords. Formulas without a source beside them are school geometry.
 */

/** Coordinates of a hall on a sheet, in metres. */
const REACH = 60;
/** A few roundings of figures of that size, none of them cancelling to less than a metre: 60² · 2⁻⁵² · 10. */
const ROUNDING = 1e-11;

function many(times: number, check: (random: ReturnType<typeof randomFrom>, seed: number) => void): void {
  for (let seed = 0; seed < times; seed++) check(randomFrom(seed), seed);
}

function expectAll(found: readonly number[], wanted: readonly number[], within: number, at: string): void {
  expect(found.length, at).toBe(wanted.length);
  for (const [i, value] of found.entries()) {
    expect(Math.abs(value - (wanted[i] as number)), `${at}, figure ${i}`).toBeLessThan(within);
  }
}

describe('vectors', () => {
  it('add, subtract, stretch and turn by components', () => {
    const all = drawing(2, 0, ([a, b]) => {
      const [p, q] = [a as Point, b as Point];
      return flat(add(p, q), subtract(p, q), scale(p, -2.5), reverse(p), turnLeft(p), between(p, q, 0.25));
    });
    many(50, (random, seed) => {
      const [ax, ay, bx, by] = [0, 0, 0, 0].map(() => random(-REACH, REACH)) as [
        number,
        number,
        number,
        number,
      ];
      const wanted = [ax + bx, ay + by, ax - bx, ay - by, -2.5 * ax, -2.5 * ay, -ax, -ay, -ay, ax];
      wanted.push(0.75 * ax + 0.25 * bx, 0.75 * ay + 0.25 * by);
      expectAll(all(ax, ay, bx, by).values, wanted, ROUNDING, `seed ${seed}`);
    });
  });

  it('have the sizes, products and angles of their polar forms', () => {
    const all = drawing(2, 0, ([a, b]) => {
      const [p, q] = [a as Point, b as Point];
      return [magnitude(p), distance(p, q), dot(p, q), cross(p, q), angleFrom(p, q)];
    });
    many(100, (random, seed) => {
      const [r, s] = [random(1, REACH), random(1, REACH)];
      const from = random(-Math.PI, Math.PI);
      const turn = random(-3.1, 3.1);
      const found = all(
        r * Math.cos(from),
        r * Math.sin(from),
        s * Math.cos(from + turn),
        s * Math.sin(from + turn),
      );
      const wanted = [
        r,
        Math.sqrt(r * r + s * s - 2 * r * s * Math.cos(turn)),
        r * s * Math.cos(turn),
        r * s * Math.sin(turn),
        turn,
      ];
      // The law of cosines loses digits where the two points are near each other, hence the wider bound.
      expectAll(found.values, wanted, 1e-9, `seed ${seed}`);
    });
  });

  it('keep their dimension, and are one or the other by a condition', () => {
    const trace = new Trace();
    const zero = zeroVector(trace, FORCE);
    expect([zero.x.dimension, zero.y.dimension]).toEqual([FORCE, FORCE]);
    const [p, q] = [pointOf(trace, 1, 2), pointOf(trace, -3, 4)];
    const height = trace.input('height', LENGTH);
    const chosen = prepared(trace, flat(chooseVector(height.above(0), p, q)));
    expect(chosen(1).values).toEqual([1, 2]);
    expect(chosen(-1).values).toEqual([-3, 4]);
    expect(chosen(0).values).toEqual([-3, 4]);
  });
});

describe('a chord', () => {
  const chord = drawing(2, 1, ([from, to], [along]) => {
    const made = { from: from as Point, to: to as Point };
    return [
      lengthOf(made),
      inclinationOf(made),
      ...flat(directionOf(made), pointAlong(made, along as Scalar)),
    ];
  });

  it('has the length, inclination and direction that it was drawn with, in every quadrant', () => {
    many(100, (random, seed) => {
      const [x, y, length] = [random(-REACH, REACH), random(-REACH, REACH), random(0.5, REACH)];
      const angle = -Math.PI + (2 * Math.PI * (seed + 0.5)) / 100;
      const [c, s] = [Math.cos(angle), Math.sin(angle)];
      const along = random(-2, 2) * length;
      const { values } = chord(x, y, x + length * c, y + length * s, along);
      expectAll(values, [length, angle, c, s, x + along * c, y + along * s], ROUNDING, `seed ${seed}`);
    });
  });

  it('set out by inclination and length ends where trigonometry says', () => {
    const setOut = construction([LENGTH, LENGTH, NONE, LENGTH], ([x, y, angle, length]) => {
      const from = { x: x as Scalar, y: y as Scalar };
      return flat(chordFrom(from, angle as Scalar, length as Scalar).to);
    });
    // The 3-4-5 triangle.
    expectAll(setOut(1, 2, Math.atan2(3, 4), 5).values, [5, 5], 1e-14, 'up to the right');
    expectAll(setOut(1, 2, Math.atan2(-3, -4), 5).values, [-3, -1], 1e-14, 'down to the left');
    expectAll(setOut(1, 2, Math.PI / 2, -3).values, [1, -1], 1e-14, 'a negative length runs backwards');
  });
});

describe('a circle', () => {
  it('through a point has the distance to it for a radius', () => {
    const radius = drawing(2, 1, ([centre, through], [r]) => [
      circleThrough(centre as Point, through as Point).radius,
      circle(centre as Point, r as Scalar).radius,
    ]);
    expect(radius(1, 1, 4, 5, 2).values).toEqual([5, 2]);
  });
});

/** The circle through three points from the determinants of its equation. */
function circumcircle(ax: number, ay: number, bx: number, by: number, cx: number, cy: number) {
  const d = 2 * (ax * (by - cy) + bx * (cy - ay) + cx * (ay - by));
  const [a, b, c] = [ax * ax + ay * ay, bx * bx + by * by, cx * cx + cy * cy];
  const x = (a * (by - cy) + b * (cy - ay) + c * (ay - by)) / d;
  const y = (a * (cx - bx) + b * (ax - cx) + c * (bx - ax)) / d;
  return { x, y, radius: Math.hypot(ax - x, ay - y) };
}

describe('an arc', () => {
  const arc = construction([LENGTH, LENGTH, LENGTH, LENGTH, LENGTH, LENGTH, NONE], (inputs) => {
    const [ax, ay, bx, by, cx, cy, ratio] = inputs as [
      Scalar,
      Scalar,
      Scalar,
      Scalar,
      Scalar,
      Scalar,
      Scalar,
    ];
    const made = arcThrough({ x: ax, y: ay }, { x: bx, y: by }, { x: cx, y: cy });
    return [
      ...flat(made.centre),
      made.radius,
      made.sweep,
      arcLength(made),
      ...flat(pointOnArc(made, ratio), directionOnArc(made, ratio), chordOf(made).from, chordOf(made).to),
      nearestOnArc(made, { x: bx, y: by }),
    ];
  });

  /** A random arc by its centre, radius and angles: what its figures must be. */
  function randomArc(random: ReturnType<typeof randomFrom>) {
    const [x, y, r] = [random(-20, 20), random(-20, 20), random(1, 30)];
    const start = random(-Math.PI, Math.PI);
    // From a fortieth of a turn to nearly the whole, either way round.
    const sweep = random(0.15, 6.1) * (random(0, 1) < 0.5 ? -1 : 1);
    const share = random(0.15, 0.85);
    const at = (ratio: number): [number, number] => [
      x + r * Math.cos(start + sweep * ratio),
      y + r * Math.sin(start + sweep * ratio),
    ];
    return { x, y, r, start, sweep, share, at };
  }

  it('has the centre, radius, sweep, length, points and directions that it was made from', () => {
    many(300, (random, seed) => {
      const { x, y, r, start, sweep, share, at } = randomArc(random);
      const ratio = random(0, 1);
      const found = arc(...at(0), ...at(share), ...at(1), ratio);
      expect(found.queries, `seed ${seed}`).toEqual([]);
      const heading = start + sweep * ratio + (Math.sign(sweep) * Math.PI) / 2;
      const wanted = [x, y, r, sweep, r * Math.abs(sweep), ...at(ratio)];
      wanted.push(Math.cos(heading), Math.sin(heading), ...at(0), ...at(1), share);
      // Over a fortieth of a turn with its middle point near an end, the versine is some 1e-3 of the radius, and a
      // thousandth of the digits goes with it.
      expectAll(found.values, wanted, 2e-10, `seed ${seed}`);
    });
  });

  it('has the centre that the determinants of three points give', () => {
    many(100, (random, seed) => {
      const points = [
        random(-9, 9),
        random(-9, 9),
        random(-9, 9),
        random(1, 9),
        random(-9, 9),
        random(-9, 9),
      ];
      const wanted = circumcircle(...(points as [number, number, number, number, number, number]));
      // Nearly straight ones have centres far off, where the determinants themselves lose digits.
      if (wanted.radius > 100) return;
      const { values } = arc(...points, 0.5);
      expectAll(values.slice(0, 3), [wanted.x, wanted.y, wanted.radius], 1e-9, `seed ${seed}`);
    });
  });

  it('is as long as a great many small chords', () => {
    const steps = 2000;
    many(20, (random, seed) => {
      const { at, share, r } = randomArc(random);
      let length = 0;
      let [px, py] = at(0);
      for (let i = 1; i <= steps; i++) {
        const { values } = arc(...at(0), ...at(share), ...at(1), i / steps);
        const [x, y] = [values[5] as number, values[6] as number];
        length += Math.hypot(x - px, y - py);
        [px, py] = [x, y];
      }
      const found = arc(...at(0), ...at(share), ...at(1), 0).values[4] as number;
      // Chords fall short of the arc by sweep² / 24 n² of it: 2π leaves 4e-7 with 2000.
      expect(found - length, `seed ${seed}`).toBeGreaterThan(0);
      expect(found - length, `seed ${seed}`).toBeLessThan(2 * Math.PI * r * 4.2e-7);
    });
  });
});

describe('a segment', () => {
  const straight = drawing(3, 0, ([from, to, point]) =>
    nearestOf(straightSegment(from as Point, to as Point), point),
  );
  const curved = drawing(4, 0, ([from, through, to, point]) =>
    nearestOf(arcSegment(from as Point, through as Point, to as Point), point),
  );
  function nearestOf(segment: Segment, point: Point | undefined): Scalar[] {
    const ratio = segment.nearest(point as Point);
    return [ratio, ...flat(segment.pointAt(ratio))];
  }

  it('straight or curved, comes nearest to a point where none of 400 points on it is nearer', () => {
    many(150, (random, seed) => {
      const any = (): [number, number] => [random(-9, 9), random(-9, 9)];
      const [from, to, point] = [any(), any(), any()];
      const swell = random(0.05, 1.2) * (random(0, 1) < 0.5 ? -1 : 1);
      const through: [number, number] = [
        (from[0] + to[0]) / 2 - (to[1] - from[1]) * swell,
        (from[1] + to[1]) / 2 + (to[0] - from[0]) * swell,
      ];
      const round = circumcircle(...from, ...through, ...to);
      const turnTo = (target: readonly [number, number]): number => {
        const [a, b] = [
          Math.atan2(from[1] - round.y, from[0] - round.x),
          Math.atan2(target[1] - round.y, target[0] - round.x),
        ];
        const full = 2 * Math.PI;
        // The way round is that on which the middle point comes before the end.
        return swell > 0 ? -((a - b + 2 * full) % full) : (b - a + 2 * full) % full;
      };
      const sweep = turnTo(to);
      for (const [name, { values }, at] of [
        [
          'straight',
          straight(...from, ...to, ...point),
          (t: number) => [from[0] + (to[0] - from[0]) * t, from[1] + (to[1] - from[1]) * t],
        ],
        [
          'curved',
          curved(...from, ...through, ...to, ...point),
          (t: number) => {
            const angle = Math.atan2(from[1] - round.y, from[0] - round.x) + sweep * t;
            return [round.x + round.radius * Math.cos(angle), round.y + round.radius * Math.sin(angle)];
          },
        ],
      ] as const) {
        const [ratio = Number.NaN, x = Number.NaN, y = Number.NaN] = values;
        const off = Math.hypot(x - point[0], y - point[1]);
        expect(ratio, `${name}, seed ${seed}`).toBeGreaterThanOrEqual(0);
        expect(ratio, `${name}, seed ${seed}`).toBeLessThanOrEqual(1);
        const [wantedX = 0, wantedY = 0] = at(ratio);
        expectAll([x, y], [wantedX, wantedY], 1e-10, `${name}, seed ${seed}`);
        let nearest = Number.POSITIVE_INFINITY;
        for (let i = 0; i <= 400; i++) {
          const [px = 0, py = 0] = at(i / 400);
          nearest = Math.min(nearest, Math.hypot(px - point[0], py - point[1]));
        }
        expect(off - nearest, `${name}, seed ${seed}`).toBeLessThan(1e-10);
      }
    });
  });
});

describe('a motion', () => {
  it('turns about its centre as polar coordinates do', () => {
    const turn = construction([LENGTH, LENGTH, NONE, LENGTH, LENGTH], (inputs) => {
      const [cx, cy, angle, x, y] = inputs as [Scalar, Scalar, Scalar, Scalar, Scalar];
      const motion = turnAbout({ x: cx, y: cy }, angle);
      return flat(moved(motion, { x, y }), turned(motion, { x, y }));
    });
    many(100, (random, seed) => {
      const [cx, cy, angle] = [random(-REACH, REACH), random(-REACH, REACH), random(-7, 7)];
      const [r, from, size, heading] = [random(0, REACH), random(-3, 3), random(0, REACH), random(-3, 3)];
      const at = [cx + r * Math.cos(from), cy + r * Math.sin(from)] as const;
      const found = turn(cx, cy, angle, ...at);
      expectAll(
        found.values.slice(0, 2),
        [cx + r * Math.cos(from + angle), cy + r * Math.sin(from + angle)],
        ROUNDING,
        `seed ${seed}`,
      );
      // A force or a direction is turned only, wherever the centre is.
      const free = turn(cx, cy, angle, size * Math.cos(heading), size * Math.sin(heading));
      expectAll(
        free.values.slice(2),
        [size * Math.cos(heading + angle), size * Math.sin(heading + angle)],
        ROUNDING,
        `seed ${seed}`,
      );
    });
  });

  it('is one or the other by a condition, with its pivot and its place', () => {
    const trace = new Trace();
    const which = trace.input('which', LENGTH);
    const quarter = turnAbout(pointOf(trace, 1, 0), trace.constant(Math.PI / 2, NONE));
    const half = turnAbout(pointOf(trace, 0, 2), trace.constant(Math.PI, NONE));
    const chosen = prepared(
      trace,
      flat(moved(chooseMotion(which.above(0), quarter, half), pointOf(trace, 3, 0))),
    );
    expectAll(chosen(1).values, [1, 2], 1e-14, 'a quarter turn');
    expectAll(chosen(-1).values, [-3, 4], 1e-14, 'half a turn');
  });
});

describe('a mirror', () => {
  it('is the conjugate times the square of its direction', () => {
    const mirror = drawing(3, 0, ([point, from, to]) =>
      flat(mirrored(point as Point, { from: from as Point, to: to as Point })),
    );
    many(100, (random, seed) => {
      const [px, py, ax, ay, length, angle] = [
        random(-REACH, REACH),
        random(-REACH, REACH),
        random(-REACH, REACH),
        random(-REACH, REACH),
        random(0.5, REACH),
        random(-3, 3),
      ] as const;
      const { values } = mirror(px, py, ax, ay, ax + length * Math.cos(angle), ay + length * Math.sin(angle));
      // p′ = a + e^{2iφ} · conj(p − a).
      const [c, s] = [Math.cos(2 * angle), Math.sin(2 * angle)];
      const [u, v] = [px - ax, py - ay];
      // A short line has its direction to 1e-15 / 0.5 m only, and the point is up to 170 m away.
      expectAll(values, [ax + c * u + s * v, ay + s * u - c * v], 1e-10, `seed ${seed}`);
    });
  });
});
