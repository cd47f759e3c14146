import { describe, expect, it } from 'vitest';
import {
  arcThrough,
  type Branch,
  COINCIDENT,
  circle,
  circleMeetsLine,
  circlesMeet,
  circleThrough,
  directionOf,
  directionOnArc,
  GRAZING,
  inclinationOf,
  type LineBranch,
  lengthOf,
  linesMeet,
  mirrored,
  motionBetween,
  moved,
  nearestOnArc,
  PARALLEL,
  type Point,
  pointAlong,
  pointOnArc,
  RIGID,
  TOUCHING,
} from '../../src/geometry/index.ts';
import { NONE } from '../../src/quantity/index.ts';
import { derivative, type Scalar } from '../../src/tape/index.ts';
import { complaint, drawing, flat, type Outcome } from '../support/construction.ts';

/**
 * Dense grids around the places where a construction stops to exist. The grids are 2⁻⁴³ of the drawing's size apart,
 * where rounding is felt, then coarser by steps. Whether a point exists is decided by whole numbers, without any
 * rounding, since all figures are multiples of 2⁻⁴⁸ m.
 */
const SIZE = 8;
const FINEST = SIZE * 2 ** -43;
const GRIDS = [FINEST, 2 ** -34, 2 ** -28, 2 ** -23, 2 ** -17, 2 ** -10];
const HALF = 12;

/** The spacing of doubles of the drawing's size. */
const ULP = SIZE * 2 ** -52;

/** A figure as a whole number of 2⁻⁴⁸ m: exact for multiples of that below 32 m. */
function whole(metres: number): bigint {
  const many = metres * 2 ** 48;
  if (!Number.isSafeInteger(many)) throw new Error(`${metres} m is not a whole number of 2⁻⁴⁸ m`);
  return BigInt(many);
}

/** A product of `power` such numbers, in mᵖᵒʷᵉʳ. */
function metres(product: bigint, power: number): number {
  return Number(product) / 2 ** (48 * power);
}

function* grid(): Generator<readonly [across: number, up: number]> {
  for (const step of GRIDS) {
    for (let i = -HALF; i <= HALF; i++) for (let j = -HALF; j <= HALF; j++) yield [i * step, j * step];
  }
}

/** Places on both sides of a bound, at relative distances from rounding to a half. */
function* around(bound: number): Generator<number> {
  for (const share of [-0.5, -1e-3, -1e-6, -1e-9, -1e-12, 0, 1e-12, 1e-9, 1e-6, 1e-3, 0.5]) {
    yield bound * (1 + share);
  }
}

/** Collects what is wrong over a grid, so that one failing place is seen with its figures and a thousand are not. */
class Findings {
  private readonly found: string[] = [];
  private places = 0;

  at(place: string, outcome: Outcome): { that(holds: boolean, otherwise: string): void } {
    this.places += 1;
    const unsettled = complaint(outcome);
    const note = (text: string): void => {
      this.found.push(`${place}: ${text} (${outcome.values.join(', ')}; ${outcome.queries.join(' | ')})`);
    };
    if (unsettled !== '') note(unsettled);
    return { that: (holds, otherwise) => (holds ? undefined : note(otherwise)) };
  }

  close(atLeast: number): void {
    expect(this.found.slice(0, 5)).toEqual([]);
    // A grid that was never walked would pass too.
    expect(this.places).toBeGreaterThanOrEqual(atLeast);
  }
}

const points = (branch: Branch) =>
  drawing(2, 2, ([first, second], [r, s]) =>
    flat(circlesMeet(circle(first as Point, r as Scalar), circle(second as Point, s as Scalar), branch)),
  );

/** Circles about the origin and about a second centre, at the brink of missing each other. */
const BRINKS: readonly (readonly [name: string, x: number, y: number, r: number, s: number])[] = [
  ['from outside', 8, 0, 3, 5],
  ['from outside, the centres one above the other', 0, -8, 5, 3],
  ['from outside, turned', 6, 8, 3, 7],
  ['from outside, one small', 6, 8, 9.75, 0.25],
  ['from inside', 2, 0, 3, 5],
  ['from inside, the larger first', -2, 0, 5, 3],
  ['from inside, turned', 1.5, 2, 3, 5.5],
];

describe('two circles that nearly touch', () => {
  const [left, right] = [points('left'), points('right')];

  it.each(BRINKS)('%s give both points where they meet, and the gap where they miss', (_, x, y, r, s) => {
    const findings = new Findings();
    for (const [dx, dy] of grid()) {
      const [cx, cy] = [x + dx, y + dy];
      const d = Math.hypot(cx, cy);
      // d² − (r + s)² and (r − s)² − d², exactly: above 0 where the circles miss each other.
      const square = whole(cx) ** 2n + whole(cy) ** 2n;
      const outside = metres(square - whole(r + s) ** 2n, 2);
      const inside = metres(whole(r - s) ** 2n - square, 2);
      const gap = outside > 0 ? outside / (d + r + s) : inside / (d + Math.abs(r - s));
      const slack = TOUCHING * (r + s);
      const halfSquare = (outside * inside) / (4 * d * d);
      for (const [side, outcome] of [
        [1, left(0, 0, cx, cy, r, s)],
        [-1, right(0, 0, cx, cy, r, s)],
      ] as const) {
        const { values, queries, figures } = outcome;
        const check = findings.at(`centre off by ${dx}, ${dy}`, outcome);
        // The distance of the centres and the sum of the radii are each rounded once or twice.
        if (gap <= slack - 4 * ULP) check.that(queries.length === 0, 'the circles meet');
        if (gap >= slack + 4 * ULP) check.that(queries.length === 1, 'the circles miss each other');
        if (queries.length > 0) {
          check.that(Math.abs((figures[0] as number) - gap) <= 4 * ULP, `the gap is ${gap}`);
          continue;
        }
        const [px, py] = values as [number, number];
        // Where the circles miss by no more than rounding, the point misses them by as much, and by more the nearer
        // their centres are: the foot of the common chord is a difference of squares over that distance.
        const off = Math.max(gap, 0) * (1 + Math.max(r, s) / d) + 8 * ULP;
        check.that(Math.abs(Math.hypot(px, py) - r) <= off, 'not on the first circle');
        check.that(Math.abs(Math.hypot(px - cx, py - cy) - s) <= off, 'not on the second circle');
        // Half the common chord is a root: its square is right to the rounding of the gap times the size.
        const across = (side * (cx * py - cy * px)) / d;
        check.that(across >= -8 * ULP, 'on the wrong side');
        check.that(
          Math.abs(across * across - Math.max(halfSquare, 0)) <= 16 * ULP * (r + s),
          `half the chord squared is ${halfSquare}`,
        );
      }
    }
    findings.close(2 * GRIDS.length * (2 * HALF + 1) ** 2);
  });

  it.each(BRINKS)(
    '%s have a slope, or a query where they only touch, and never a silent NaN',
    (_, x, y, r, s) => {
      const slopes = drawing(2, 2, ([first, second], [one, two]) => {
        const meet = circlesMeet(
          circle(first as Point, one as Scalar),
          circle(second as Point, two as Scalar),
          'left',
        );
        return [...flat(meet), ...derivative(flat(meet), one as Scalar)];
      });
      const findings = new Findings();
      let touching = 0;
      for (const [dx, dy] of grid()) {
        const [cx, cy] = [x + dx, y + dy];
        const outcome = slopes(0, 0, cx, cy, r, s);
        const check = findings.at(`centre off by ${dx}, ${dy}`, outcome);
        const square = whole(cx) ** 2n + whole(cy) ** 2n;
        const d = Math.hypot(cx, cy);
        const halfSquare =
          (metres(whole(r + s) ** 2n - square, 2) * metres(square - whole(r - s) ** 2n, 2)) / (4 * d * d);
        const grazing = (GRAZING * Math.min(r, s)) ** 2;
        const doubt = 16 * ULP * (r + s);
        if (halfSquare < grazing - doubt) check.that(outcome.queries.length === 1, 'no slope to be had');
        if (halfSquare > grazing + doubt) check.that(outcome.queries.length === 0, 'there is a slope');
        if (outcome.queries.length > 0) {
          touching += 1;
          continue;
        }
        const [px, py, vx, vy] = outcome.values as [number, number, number, number];
        // The point stays on the second circle, and leaves the centre of the first as fast as its radius grows.
        const speed = Math.hypot(vx, vy);
        const along = (px * vx + py * vy) / r;
        const stays = ((px - cx) * vx + (py - cy) * vy) / s;
        // Half the chord is known to the doubt in its square, and the speed goes as its inverse.
        const within = speed * Math.min(1, (4 * doubt) / Math.max(halfSquare, doubt)) + 1e-12;
        check.that(
          Math.abs(along - 1) <= within && Math.abs(stays) <= within,
          `${along} and ${stays}, not 1 and 0`,
        );
      }
      findings.close(GRIDS.length * (2 * HALF + 1) ** 2);
      expect(touching).toBeGreaterThan(100);
    },
  );

  it('about nearly one centre give a point, or a query with the distance of the centres', () => {
    const findings = new Findings();
    for (const [dx, dy] of grid()) {
      const d = Math.hypot(dx, dy);
      for (const more of [0, FINEST, 2 ** -22, 2 ** -18]) {
        const [r, s] = [3, 3 + more];
        const outcome = left(1, 2, 1 + dx, 2 + dy, r, s);
        const check = findings.at(`centres ${dx}, ${dy} apart, radii ${more}`, outcome);
        const { values, queries, figures } = outcome;
        if (d <= COINCIDENT) {
          check.that(queries[0]?.startsWith('The two circles have one centre') ?? false, 'one centre');
          check.that(Math.abs((figures[0] as number) - d) <= 2 ** -50 * d, `${d} apart`);
        } else if (more > d + 1e-11) {
          check.that(queries[0]?.startsWith('One circle lies inside the other') ?? false, 'inside');
          check.that(Math.abs((figures[0] as number) - (more - d)) <= 4 * ULP, `misses by ${more - d}`);
        } else if (more < d - 1e-11) {
          const [px, py] = values as [number, number];
          // The foot of the common chord is a difference of squares over the distance of the centres.
          const within = (16 * ULP * r) / d;
          check.that(Math.abs(Math.hypot(px - 1, py - 2) - r) <= within, 'not on the first circle');
          check.that(Math.abs(Math.hypot(px - 1 - dx, py - 2 - dy) - s) <= within, 'not on the second');
        }
      }
    }
    findings.close(4 * GRIDS.length * (2 * HALF + 1) ** 2);
  });
});

describe('a reference point', () => {
  const nearest = drawing(3, 2, ([first, second, reference], [r, s]) =>
    flat(
      circlesMeet(circle(first as Point, r as Scalar), circle(second as Point, s as Scalar), {
        nearest: reference as Point,
      }),
    ),
  );

  it('near the line of the centres chooses its side, or is a query with its distance from that line', () => {
    const findings = new Findings();
    // Centres 7.5 m apart along (3, 4) / 5, radii 5 m: a right angle's turn to the left is (−4, 3) / 5.
    for (const along of [-20, 0, 3.75, 100]) {
      for (const size of [...GRIDS.map((step) => 5 * step), ...around(COINCIDENT), 1e-5, 0.1, 3]) {
        for (const off of [size, -size, 0]) {
          const reference = [0.6 * along - 0.8 * off, 0.8 * along + 0.6 * off] as const;
          const outcome = nearest(0, 0, 4.5, 6, ...reference, 5, 5);
          const { queries, figures, values } = outcome;
          const check = findings.at(`${off} m to the left`, outcome);
          // Of coordinates up to 100 m.
          const rounding = 1e-13;
          if (Math.abs(off) < COINCIDENT - rounding) check.that(queries.length === 1, 'on neither side');
          if (Math.abs(off) > COINCIDENT + rounding) check.that(queries.length === 0, 'on a side');
          if (queries.length > 0) {
            check.that(Math.abs((figures[0] as number) - Math.abs(off)) < rounding, 'the wrong figure');
            continue;
          }
          const half = Math.sign(off) * Math.sqrt(25 - 3.75 ** 2);
          const wanted = [0.6 * 3.75 - 0.8 * half, 0.8 * 3.75 + 0.6 * half] as const;
          const miss = Math.hypot((values[0] as number) - wanted[0], (values[1] as number) - wanted[1]);
          check.that(miss < 1e-13, `the point is ${wanted.join(', ')}`);
        }
      }
    }
    findings.close(100);
  });

  it('does not matter where the circles touch, since there is one point only', () => {
    expect(nearest(0, 0, 8, 0, 4, 0, 3, 5)).toEqual({ values: [3, 0], queries: [], figures: [] });
    expect(nearest(0, 0, 8, 0, 4, 7, 3, 5).values).toEqual([3, 0]);
  });

  it('picks of two points the one that is measured to be nearer', () => {
    for (let i = 0; i < 400; i++) {
      const [x, y] = [-12 + (i % 20) * 1.3, -12 + Math.floor(i / 20) * 1.3];
      const { values } = nearest(0, 0, 4, 2, x, y, 5, 3);
      const [l, r] = [points('left')(0, 0, 4, 2, 5, 3).values, points('right')(0, 0, 4, 2, 5, 3).values];
      const away = (point: readonly number[]): number =>
        Math.hypot((point[0] as number) - x, (point[1] as number) - y);
      expect(values).toEqual(away(l) < away(r) ? l : r);
    }
  });
});

describe('a circle and a line that nearly touch', () => {
  const meet = (branch: LineBranch) =>
    drawing(3, 1, ([centre, from, to], [r]) =>
      flat(
        circleMeetsLine(
          circle(centre as Point, r as Scalar),
          { from: from as Point, to: to as Point },
          branch,
        ),
      ),
    );
  const [first, second] = [meet('first'), meet('second')];

  it.each([
    ['from above', 5],
    ['from below', -5],
  ])('%s give both points where they meet, and the gap where they miss', (_, height) => {
    const findings = new Findings();
    const r = 5;
    for (const [a, b] of grid()) {
      const line = [-8, height + a, 8, height + b] as const;
      const long = Math.hypot(16, b - a);
      // The line's distance from the centre is cross / long; exactly, cross² − r² long² above 0 where it misses.
      const cross = whole(-8) * whole(height + b) - whole(height + a) * whole(8);
      const square = whole(16) ** 2n + (whole(height + b) - whole(height + a)) ** 2n;
      const miss = metres(cross ** 2n - whole(r) ** 2n * square, 4);
      const distance = Math.abs(metres(cross, 2)) / long;
      const gap = miss / (long * long * (distance + r));
      const [one, two] = [first(0, 0, ...line, r), second(0, 0, ...line, r)];
      for (const outcome of [one, two]) {
        const { values, queries, figures } = outcome;
        const check = findings.at(`line off by ${a}, ${b}`, outcome);
        if (gap <= TOUCHING * r - 4 * ULP) check.that(queries.length === 0, 'they meet');
        if (gap >= TOUCHING * r + 4 * ULP) check.that(queries.length === 1, 'they miss each other');
        if (queries.length > 0) {
          check.that(Math.abs((figures[0] as number) - gap) <= 4 * ULP, `the gap is ${gap}`);
          continue;
        }
        const [x, y] = values as [number, number];
        check.that(Math.abs(Math.hypot(x, y) - r) <= Math.max(gap, 0) + 8 * ULP, 'not on the circle');
        const off = (16 * (y - height - a) - (b - a) * (x + 8)) / long;
        check.that(Math.abs(off) <= 8 * ULP, 'not on the line');
        const halfSquare = Math.max(-miss / (long * long), 0);
        const half = Math.hypot((two.values[0] as number) - x, (two.values[1] as number) - y) / 2;
        if (outcome === one) {
          check.that(Math.abs(half * half - halfSquare) <= 16 * ULP * r, `half the chord² is ${halfSquare}`);
        }
      }
      if (one.queries.length === 0) {
        findings
          .at(`line off by ${a}, ${b}`, one)
          .that(
            (one.values[0] as number) <= (two.values[0] as number),
            'first and second the wrong way round',
          );
      }
    }
    findings.close(2 * GRIDS.length * (2 * HALF + 1) ** 2);
  });

  it('have a slope, or a query where they only touch', () => {
    const slope = drawing(3, 1, ([centre, from, to], [r]) =>
      derivative(
        flat(
          circleMeetsLine(
            circle(centre as Point, r as Scalar),
            { from: from as Point, to: to as Point },
            'second',
          ),
        ),
        r as Scalar,
      ),
    );
    const findings = new Findings();
    for (const step of [FINEST, 2 ** -38, 2 ** -34, 2 ** -28, 2 ** -20, 2 ** -10]) {
      for (let i = 0; i <= 2 * HALF; i++) {
        const height = 5 - i * step;
        const outcome = slope(0, 0, -8, height, 8, height, 5);
        const check = findings.at(`line ${i * step} below the top`, outcome);
        const half = Math.sqrt((5 - height) * (5 + height));
        check.that(
          outcome.queries.length === (half > GRAZING * 5 ? 0 : 1),
          'a slope exactly where they cross',
        );
        // x = √(r² − h²) and so dx/dr = r / x.
        if (outcome.queries.length === 0) {
          check.that(
            Math.abs(((outcome.values[0] as number) * half) / 5 - 1) < 1e-12,
            `the slope is ${5 / half}`,
          );
        }
      }
    }
    findings.close(100);
  });

  it('meet nearest to a reference, or say that neither point is the nearer', () => {
    const nearest = drawing(4, 1, ([centre, from, to, reference], [r]) =>
      flat(
        circleMeetsLine(
          circle(centre as Point, r as Scalar),
          { from: from as Point, to: to as Point },
          { nearest: reference as Point },
        ),
      ),
    );
    const findings = new Findings();
    for (const size of [...GRIDS, ...around(COINCIDENT), 1e-5, 0.1, 30]) {
      for (const x of [size, -size, 0]) {
        for (const y of [-7, 3, 40]) {
          const outcome = nearest(0, 0, -8, 3, 8, 3, x, y, 5);
          const { queries, values, figures } = outcome;
          const check = findings.at(`reference at ${x}, ${y}`, outcome);
          if (Math.abs(x) <= COINCIDENT) check.that(figures[0] === Math.abs(x), 'neither is the nearer');
          else check.that(queries.length === 0 && values[0] === 4 * Math.sign(x), 'the nearer one');
        }
      }
    }
    findings.close(100);
  });
});

describe('two lines that are nearly parallel', () => {
  it('meet where whole numbers say, or say by what angle they miss', () => {
    const meet = drawing(4, 0, ([a, b, c, d]) =>
      flat(linesMeet({ from: a as Point, to: b as Point }, { from: c as Point, to: d as Point })),
    );
    const findings = new Findings();
    for (const [one, two] of grid()) {
      for (const apart of [1, 0]) {
        const outcome = meet(0, 0, 8, one, 0, apart, 8, apart + two);
        const { values, queries, figures } = outcome;
        const check = findings.at(`lines ${apart} m apart rise by ${one} and ${two}`, outcome);
        const sine = (8 * two - 8 * one) / (Math.hypot(8, one) * Math.hypot(8, two));
        if (Math.abs(sine) <= PARALLEL) {
          check.that(Math.abs((figures[0] as number) - Math.abs(sine)) <= 4 * 2 ** -52, `sine ${sine}`);
          continue;
        }
        check.that(queries.length === 0, 'they meet');
        // y = one · x / 8 and y = apart + two · x / 8.
        const x = (8 * apart) / (one - two);
        const y = (apart * one) / (one - two);
        const within = (8 * 2 ** -52 * SIZE) / sine ** 2;
        const miss = Math.hypot((values[0] as number) - x, (values[1] as number) - y);
        check.that(miss <= within, `they meet at ${x}, ${y}`);
      }
    }
    findings.close(2 * GRIDS.length * (2 * HALF + 1) ** 2);
  });
});

describe('an arc that is nearly straight', () => {
  const arc = drawing(3, 0, ([from, through, to], _, trace) => {
    const made = arcThrough(from as Point, through as Point, to as Point);
    const [begin, end] = [trace.constant(0, NONE), trace.constant(1, NONE)];
    return [
      ...flat(made.centre, pointOnArc(made, begin), pointOnArc(made, end), directionOnArc(made, end)),
      made.radius,
      made.sweep,
      nearestOnArc(made, through as Point),
    ];
  });

  it('has the centre of its circle, or says how far the middle point is off the line', () => {
    const findings = new Findings();
    for (const x of [-4, -3.999, -2, 0, 1.75, 3.9999, 4, 6]) {
      for (const size of [...GRIDS, ...around(COINCIDENT), 1e-5, 1e-3, 0.1, 3]) {
        for (const v of [size, -size, 0]) {
          const outcome = arc(-4, 0, x, v, 4, 0);
          const { queries, figures, values } = outcome;
          const check = findings.at(`middle point at ${x}, ${v}`, outcome);
          if (Math.abs(v) <= COINCIDENT * (1 - 1e-8)) check.that(queries.length === 1, 'straight');
          if (Math.abs(v) >= COINCIDENT * (1 + 1e-8)) check.that(queries.length === 0, 'curved');
          if (queries.length > 0) {
            check.that(Math.abs((figures[0] as number) - Math.abs(v)) <= 2 * ULP, `off by ${v}`);
            continue;
          }
          // As far from the middle point as from the ends: x² + (v − y)² = 16 + y².
          const y = (x * x + v * v - 16) / (2 * v);
          const radius = Math.hypot(4, y);
          const [cx, cy, bx, by, ex, ey] = values as [number, number, number, number, number, number];
          // The centre's height is of the size of 16 / 2v, each part of it rounded a few times.
          const within = 8 * ULP * (1 + 16 / Math.abs(v));
          check.that(Math.hypot(cx, cy - y) <= within, `the centre is 0, ${y}`);
          check.that(Math.abs((values[8] as number) - radius) <= within, `the radius is ${radius}`);
          // Its ends are where they were put, to the rounding of a radius that may be thousands of kilometres.
          check.that(Math.hypot(bx + 4, by) <= 16 * 2 ** -52 * radius + ULP, 'begins elsewhere');
          check.that(Math.hypot(ex - 4, ey) <= 16 * 2 ** -52 * radius + ULP, 'ends elsewhere');
          check.that(
            Math.abs(Math.hypot(values[6] as number, values[7] as number) - 1) < 1e-14,
            'a direction',
          );
        }
      }
    }
    findings.close(200);
  });

  it('through points that coincide is a query, whichever two they are', () => {
    const findings = new Findings();
    for (const size of [0, ...GRIDS.filter((step) => step * 1.5 < COINCIDENT), 0.6e-6]) {
      for (const [dx, dy] of [
        [size, 0],
        [0, size],
        [-size, size],
      ] as const) {
        for (const [name, outcome] of [
          ['begin and middle', arc(-4, 0, -4 + dx, dy, 4, 0)],
          ['middle and end', arc(-4, 0, 4 + dx, dy, 4, 0)],
          ['begin and end', arc(-4, 0, 0, 3, -4 + dx, dy)],
          ['all three', arc(-4, 0, -4 + dx, dy, -4, dy)],
        ] as const) {
          const check = findings.at(`${name} ${dx}, ${dy} apart`, outcome);
          check.that(outcome.queries.length > 0, 'no arc to be had');
          check.that(outcome.values.slice(0, 9).every(Number.isNaN), 'figures of no arc');
        }
      }
    }
    findings.close(50);
  });
});

describe('ends, centres and radii that vanish', () => {
  it('leave a chord without length a query with the distance, and a longer one its direction', () => {
    const chord = drawing(2, 1, ([from, to], [along]) => {
      const made = { from: from as Point, to: to as Point };
      return [
        lengthOf(made),
        inclinationOf(made),
        ...flat(directionOf(made), pointAlong(made, along as Scalar)),
      ];
    });
    const findings = new Findings();
    for (const [dx, dy] of grid()) {
      const outcome = chord(0, 0, dx, dy, 1);
      const length = Math.hypot(dx, dy);
      const check = findings.at(`${dx}, ${dy} apart`, outcome);
      check.that(outcome.queries.length === (length > COINCIDENT ? 0 : 1), 'a chord above 1e-6 m only');
      if (outcome.queries.length > 0) {
        check.that(Math.abs((outcome.figures[0] as number) - length) <= 2 ** -51 * length, `${length} long`);
      } else {
        const inclination = outcome.values[1] as number;
        check.that(Math.abs(inclination - Math.atan2(dy, dx)) < 1e-15, 'another inclination');
      }
    }
    findings.close(GRIDS.length * (2 * HALF + 1) ** 2);
  });

  it('leave a circle without radius a query with the radius', () => {
    const radius = drawing(2, 1, ([centre, through], [r]) => [
      circle(centre as Point, r as Scalar).radius,
      circleThrough(centre as Point, through as Point).radius,
    ]);
    const findings = new Findings();
    for (const r of [0, -0, -3, FINEST, ...around(COINCIDENT), 1]) {
      const outcome = radius(0, 0, 5, 0, r);
      const check = findings.at(`radius ${r}`, outcome);
      check.that(outcome.queries.length === (r > COINCIDENT ? 0 : 1), 'a circle above 1e-6 m only');
      if (outcome.queries.length > 0) check.that(outcome.figures[0] === r, 'the wrong figure');
      const through = radius(0, 0, Math.abs(r), 0, 1);
      findings
        .at(`through a point ${r} away`, through)
        .that(through.queries.length === (Math.abs(r) > COINCIDENT ? 0 : 1), 'no circle through its centre');
    }
    findings.close(20);
  });

  it('leave a mirror without a line a query', () => {
    const mirror = drawing(3, 0, ([point, from, to]) =>
      flat(mirrored(point as Point, { from: from as Point, to: to as Point })),
    );
    const findings = new Findings();
    for (const size of [0, FINEST, ...around(COINCIDENT)]) {
      const outcome = mirror(3, 4, 1, 1, 1, 1 + size);
      const check = findings.at(`line ${size} long`, outcome);
      // A coordinate of 1 m is rounded by 1e-16 m, which is 1e-10 of the bound.
      if (size < COINCIDENT * (1 - 1e-9)) check.that(outcome.queries.length === 1, 'no line to mirror at');
      if (size > COINCIDENT * (1 + 1e-9)) {
        check.that(
          Math.hypot((outcome.values[0] as number) + 1, (outcome.values[1] as number) - 4) < 1e-9,
          '−1, 4',
        );
      }
    }
    findings.close(10);
  });
});

describe('a chord moved to another', () => {
  it('that is longer or shorter by more than rounding is a query with the change', () => {
    const motion = drawing(3, 0, ([point, end, after], _, trace) => {
      const from = {
        x: trace.constant(0, (point as Point).x.dimension),
        y: trace.constant(0, (point as Point).x.dimension),
      };
      return flat(
        moved(motionBetween({ from, to: end as Point }, { from, to: after as Point }), point as Point),
      );
    });
    const findings = new Findings();
    for (const size of [...GRIDS, ...around(8 * RIGID), 1e-6, 0.5]) {
      for (const change of [size, -size, 0]) {
        const outcome = motion(3, 1, 8, 0, 0, 8 + change);
        const check = findings.at(`longer by ${change}`, outcome);
        if (Math.abs(change) < 8 * RIGID - 2 * ULP) {
          // A quarter turn, stretched by no more than the rounding that was let pass.
          const [x, y] = outcome.values as [number, number];
          check.that(Math.hypot(x + 1, y - 3) <= 4 * RIGID, '−1, 3');
        }
        if (Math.abs(change) > 8 * RIGID + 2 * ULP) {
          check.that(outcome.queries.length === 1, 'not rigid');
          check.that(Math.abs((outcome.figures[0] as number) - change) <= 2 * ULP, 'the wrong change');
        }
      }
    }
    findings.close(30);
  });
});
