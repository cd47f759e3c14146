import { describe, expect, it } from 'vitest';
import {
  arcThrough,
  circle,
  circleMeetsLine,
  circlesMeet,
  linesMeet,
  type Point,
  pointOnArc,
} from '../../src/geometry/index.ts';
import { LENGTH, NONE } from '../../src/quantity/index.ts';
import { derivative, type Scalar, type Trace } from '../../src/tape/index.ts';
import { construction as construct, type Outcome } from '../support/construction.ts';

/** A construction from so many lengths, to be run at many places. */
function construction(
  count: number,
  build: (inputs: Scalar[], trace: Trace) => readonly Scalar[],
): (...values: number[]) => Pick<Outcome, 'values' | 'queries'> {
  const made = construct(new Array(count).fill(LENGTH), (inputs, trace) => build([...inputs], trace));
  return (...lengths) => {
    const { values, queries } = made(...lengths);
    return { values, queries };
  };
}

const flat = ({ x, y }: Point): Scalar[] => [x, y];

/** Steps around a degenerate place: 2⁻⁴³ of the size, where rounding is felt, up to what anyone would draw. */
const STEPS = Array.from({ length: 41 }, (_, i) => (i - 20) * 2 ** -43).concat([
  -1e-3, -1e-6, -1e-9, 1e-9, 1e-6, 1e-3, 0.2, -0.2,
]);

describe('two circles', () => {
  // x1 y1 r1 x2 y2 r2 reference
  const left = construction(6, ([x1, y1, r1, x2, y2, r2]: Scalar[]) =>
    flat(
      circlesMeet(
        circle({ x: x1 as Scalar, y: y1 as Scalar }, r1 as Scalar),
        circle({ x: x2 as Scalar, y: y2 as Scalar }, r2 as Scalar),
        'left',
      ),
    ),
  );
  const right = construction(6, ([x1, y1, r1, x2, y2, r2]: Scalar[]) =>
    flat(
      circlesMeet(
        circle({ x: x1 as Scalar, y: y1 as Scalar }, r1 as Scalar),
        circle({ x: x2 as Scalar, y: y2 as Scalar }, r2 as Scalar),
        'right',
      ),
    ),
  );
  const nearest = construction(8, ([x1, y1, r1, x2, y2, r2, x, y]: Scalar[]) =>
    flat(
      circlesMeet(
        circle({ x: x1 as Scalar, y: y1 as Scalar }, r1 as Scalar),
        circle({ x: x2 as Scalar, y: y2 as Scalar }, r2 as Scalar),
        { nearest: { x: x as Scalar, y: y as Scalar } },
      ),
    ),
  );

  it('meet left and right of the line of their centres', () => {
    expect(left(0, 0, 5, 6, 0, 5).values).toEqual([3, 4]);
    expect(right(0, 0, 5, 6, 0, 5).values).toEqual([3, -4]);
    expect(left(6, 0, 5, 0, 0, 5).values).toEqual([3, -4]);
  });

  it('meet nearest to the reference', () => {
    expect(nearest(0, 0, 5, 6, 0, 5, 100, 1).values).toEqual([3, 4]);
    expect(nearest(0, 0, 5, 6, 0, 5, -50, -1).values).toEqual([3, -4]);
  });

  it.each([
    ['from outside', (step: number) => [0, 0, 3, 8, 0, 5 - step]],
    ['from inside', (step: number) => [0, 0, 3, 4, 0, 7 + step]],
    ['turned, from outside', (step: number) => [1, 2, 3, 1 + 8 * 0.6, 2 + 8 * 0.8, 5 - step]],
  ])('near touching %s give a point on both, or a query with the gap', (_, figures) => {
    for (const step of STEPS) {
      const [x1, y1, r1, x2, y2, r2] = figures(step) as [number, number, number, number, number, number];
      const { values, queries } = left(x1, y1, r1, x2, y2, r2);
      const [x, y] = values as [number, number];
      if (queries.length > 0) {
        expect(queries[0]).toMatch(/miss(es)? (each other|it) by .*m: lengthen/);
        expect(values).toEqual([Number.NaN, Number.NaN]);
        expect(step).toBeGreaterThan(0);
      } else {
        // Where the circles miss by rounding alone, the point between them is right to that rounding.
        expect(Math.abs(Math.hypot(x - x1, y - y1) - r1)).toBeLessThan(1e-10);
        expect(Math.abs(Math.hypot(x - x2, y - y2) - r2)).toBeLessThan(1e-10);
      }
      if (step >= 1e-9) expect(queries).toHaveLength(1);
      if (step <= 0) expect(queries).toEqual([]);
    }
  });

  it('with one centre, or no radius, say so', () => {
    expect(left(1, 1, 3, 1, 1, 5).queries).toEqual([
      'The two circles have one centre (0\u00a0m apart): move one of the centres',
    ]);
    expect(left(1, 1, 3, 1 + 1e-9, 1, 3).queries[0]).toContain('1.000×10⁻⁹\u00a0m apart');
    expect(left(0, 0, 0, 1, 0, 1).queries).toEqual([
      'The circle has a radius of 0\u00a0m: give it a length above 0',
    ]);
    expect(left(0, 0, -2, 1, 0, 1).queries[0]).toContain('−2.000\u00a0m');
  });

  it('with a reference on the line of the centres say that no point is the nearest', () => {
    const { values, queries } = nearest(0, 0, 5, 6, 0, 5, 3, 0);
    expect(values).toEqual([Number.NaN, Number.NaN]);
    expect(queries[0]).toContain('as far from the one meeting point as from the other');
  });

  it('that touch have a point, and a query only where its slope is asked for', () => {
    const slope = construction(6, ([x1, y1, r1, x2, y2, r2]: Scalar[]) => {
      const { x, y } = circlesMeet(
        circle({ x: x1 as Scalar, y: y1 as Scalar }, r1 as Scalar),
        circle({ x: x2 as Scalar, y: y2 as Scalar }, r2 as Scalar),
        'left',
      );
      return derivative([x, y], r1 as Scalar);
    });
    expect(left(0, 0, 3, 8, 0, 5)).toEqual({ values: [3, 0], queries: [] });
    const { values, queries } = slope(0, 0, 3, 8, 0, 5);
    expect(values[1]).toBeNaN();
    expect(queries).toEqual([
      "The two circles only touch, 0\u00a0m from parting: where they meet can't be followed. Move a centre or change a radius so that they cross",
    ]);
    expect(slope(0, 0, 3, 7, 0, 5).queries).toEqual([]);
  });

  it('agree with the plain formulas on a grid of figures', () => {
    for (let r = 1; r < 9; r += 0.37) {
      for (let d = 0.5; d < 12; d += 0.41) {
        const foot = (d * d + r * r - 16) / (2 * d);
        const square = r * r - foot * foot;
        const { values, queries } = left(0, 0, r, d, 0, 4);
        if (square > 1e-9) {
          expect(values[0]).toBeCloseTo(foot, 10);
          expect(values[1]).toBeCloseTo(Math.sqrt(square), 8);
        } else if (square < -1e-9) expect(queries).toHaveLength(1);
      }
    }
  });
});

describe('a circle and a line', () => {
  const meet = (branch: 'first' | 'second') =>
    construction(4, ([x, y, r, height]: Scalar[], trace) => {
      const at = (across: number): Point => ({ x: trace.constant(across, LENGTH), y: height as Scalar });
      return flat(
        circleMeetsLine(
          circle({ x: x as Scalar, y: y as Scalar }, r as Scalar),
          { from: at(-9), to: at(9) },
          branch,
        ),
      );
    });

  it('meet first and second along the chord', () => {
    expect(meet('first')(0, 0, 5, 3).values).toEqual([-4, 3]);
    expect(meet('second')(0, 0, 5, 3).values).toEqual([4, 3]);
  });

  it('near touching give a point on both, or a query with the gap', () => {
    for (const step of STEPS) {
      const { values, queries } = meet('second')(0, 0, 5, 5 + step);
      if (queries.length > 0) {
        expect(queries[0]).toMatch(/^The line misses the circle by .*m: lengthen/);
        expect(step).toBeGreaterThan(0);
      } else expect(Math.abs(Math.hypot(values[0] as number, values[1] as number) - 5)).toBeLessThan(1e-10);
      if (step >= 1e-9) expect(queries).toHaveLength(1);
    }
  });
});

describe('two lines', () => {
  const meet = construction(1, ([slope]: Scalar[], trace) => {
    const at = (x: number, y: Scalar): Point => ({ x: trace.constant(x, LENGTH), y });
    const level = trace.constant(0, LENGTH);
    return flat(
      linesMeet(
        { from: at(0, level), to: at(10, level) },
        {
          from: at(0, level.plus(slope as Scalar).plus(trace.constant(1, LENGTH))),
          to: at(10, trace.constant(1, LENGTH)),
        },
      ),
    );
  });

  it('meet beyond their ends', () => {
    // The second falls by 1 m over 10 m from 2 m, and so reaches 0 at 20 m.
    expect(meet(1).values[0]).toBeCloseTo(20, 12);
  });

  it('that are parallel, or nearly, say by what angle', () => {
    expect(meet(0).queries).toEqual(['The two lines are parallel (0° between them): turn one of them']);
    for (const step of STEPS.filter((s) => Math.abs(s) < 1e-9)) {
      const { values, queries } = meet(step);
      expect(queries).toHaveLength(1);
      expect(values[0]).toBeNaN();
    }
    expect(meet(1e-6).queries).toEqual([]);
  });
});

describe('an arc through three points', () => {
  const arc = construction(1, ([swell]: Scalar[], trace) => {
    const at = (x: number, y: Scalar): Point => ({ x: trace.constant(x, LENGTH), y });
    const zero = trace.constant(0, LENGTH);
    const made = arcThrough(at(-4, zero), at(0, swell as Scalar), at(4, zero));
    return [...flat(made.centre), made.radius, ...flat(pointOnArc(made, trace.constant(0.5, NONE)))];
  });

  it('has the radius (c²/8 + v²/2)/v of its chord and versine', () => {
    for (const versine of [0.001, 0.5, 2, 4, 6, -3]) {
      const { values, queries } = arc(versine);
      expect(queries).toEqual([]);
      // Setting-out formula of every surveyor's handbook; from memory.
      const radius = (64 / 8 + versine ** 2 / 2) / Math.abs(versine);
      expect(values[2]).toBeCloseTo(radius, 7);
      expect(values[3]).toBeCloseTo(0, 9);
      expect(values[4]).toBeCloseTo(versine, 9);
    }
  });

  it('that is straight, or nearly, says by how much', () => {
    expect(arc(0).queries[0]).toContain(
      'The three points lie on one line (the middle one is 0\u00a0m off it)',
    );
    for (const step of STEPS.filter((s) => Math.abs(s) < 1e-6)) {
      expect(arc(step).queries).toHaveLength(1);
      expect(arc(step).values[2]).toBeNaN();
    }
  });
});
