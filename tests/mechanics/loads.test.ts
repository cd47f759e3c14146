import { describe, expect, it } from 'vitest';
import { pointOf } from '../../src/geometry/index.ts';
import {
  type Arch,
  archThrough,
  axisLength,
  internalForces,
  kneePlace,
  OFF_AXIS,
  type PlacedLoad,
  placeLoads,
  placeOnSegment,
  reactions,
  resultant,
} from '../../src/mechanics/index.ts';
import { FORCE, LENGTH, NONE } from '../../src/quantity/index.ts';
import { Condition, type Scalar, Trace } from '../../src/tape/index.ts';
import { complaint, construction, flat, keyPoints, prepared } from '../support/construction.ts';
import { randomFrom } from '../support/random.ts';

const HALL = [
  ['springing', 0, 0],
  ['knee', 0, 5],
  ['crown', 12, 10],
  ['knee', 24, 5],
  ['springing', 24, 0],
] as const;

function force(trace: Trace, x: number, y: number) {
  return { x: trace.constant(x, FORCE), y: trace.constant(y, FORCE) };
}

describe('a load that is not quite on the axis', () => {
  const TOTAL = 2 * (5 + 13);
  const BOUND = OFF_AXIS * TOTAL;
  /** A load this far above the left rafter's middle, or tied this far from it. */
  const beside = (tied: boolean) =>
    construction([LENGTH], ([off], trace) => {
      const arch = archThrough(keyPoints(trace, HALL));
      // The rafter rises 5 in 12: its normal is (−5, 12) / 13.
      const here = {
        x: trace.constant(6, LENGTH).plus((off as Scalar).times(-5 / 13)),
        y: trace.constant(7.5, LENGTH).plus((off as Scalar).times(12 / 13)),
      };
      const other = { at: pointOf(trace, 0, 2), force: force(trace, 100, 0) };
      const one = { at: here, force: force(trace, 0, -10e3) };
      const loads = tied ? [other, { ...one, at: pointOf(trace, 6, 4), tiedTo: here }] : [other, one];
      const placed = placeLoads(arch, loads);
      const found = reactions(arch, placed);
      return [found.left.x, found.right.x, ...placed.map(({ place }) => place.along), axisLength(arch)];
    });

  it.each([
    [false, 'Load 2 stands', 'move it onto the axis, or say which point of the axis it is tied to'],
    [true, 'The tie of load 2 lies', 'tie it to a point on the axis'],
  ] as const)(
    '(tied: %s) is taken within a thousandth of the axis, and beyond it is a query',
    (tied, what, remedy) => {
      const at = beside(tied);
      for (const share of [0, 1e-6, 0.5, 0.999, 0.999999999, 1.000000001, 1.001, 2, 20]) {
        for (const off of [share * BOUND, -share * BOUND]) {
          const outcome = at(off);
          expect(complaint(outcome)).toBe('');
          const { queries, figures, values } = outcome;
          // The other load is found all the same.
          expect(values[2]).toBeCloseTo(2, 12);
          expect(values[4]).toBe(TOTAL);
          if (share < 1) {
            expect(queries).toEqual([]);
            expect(values[3]).toBeCloseTo(5 + 6.5, 9);
          } else {
            expect(queries).toHaveLength(1);
            expect(queries[0]).toMatch(new RegExp(`^${what} .*m off the axis: ${remedy}$`));
            expect(figures[0]).toBeCloseTo(Math.abs(off), 9);
            expect([values[0], values[1], values[3]]).toEqual([Number.NaN, Number.NaN, Number.NaN]);
          }
        }
      }
    },
  );

  it('each says its own number where several are at fault', () => {
    const trace = new Trace();
    const arch = archThrough(keyPoints(trace, HALL));
    const down = force(trace, 0, -1e3);
    const loads = [
      { at: pointOf(trace, 5, 2), force: down },
      { at: pointOf(trace, 0, 2), force: down },
      { at: pointOf(trace, 10, 4), force: down, tiedTo: pointOf(trace, 12, 9) },
    ];
    const { queries } = prepared(trace, flat(reactions(arch, placeLoads(arch, loads)).left))();
    // By hand: (5 · 5 + 12 · 3) / 13 from the left rafter.
    expect(queries.map((text) => text.slice(0, 22))).toEqual([
      'Load 1 stands 4.692\u00a0m ',
      'The tie of load 3 lies',
    ]);
  });
});

describe('a load that hangs off the axis', () => {
  /** Reactions and the moment at both knees. */
  function effects(trace: Trace, arch: Arch, loads: readonly PlacedLoad[]): Scalar[] {
    const found = reactions(arch, loads);
    return [
      ...flat(found.left, found.right, found.crown),
      found.residual,
      ...[1, 2].map((knee) => internalForces(arch, loads, found, kneePlace(arch, knee)).moment),
      internalForces(arch, loads, found, placeOnSegment(arch, 1, trace.constant(0.9, NONE))).moment,
    ];
  }

  it('does the same as one at its tie with a couple of two others', () => {
    // Statics by hand: a force is equal to the same force elsewhere and the couple F × arm.
    for (let seed = 0; seed < 40; seed++) {
      const random = randomFrom(seed);
      const trace = new Trace();
      const arch = archThrough(keyPoints(trace, HALL));
      const segment = random.whole(0, 3);
      const tie = placeOnSegment(arch, segment, trace.constant(random(0.1, 0.6), NONE));
      const [dx, dy, fx, fy] = [random(-3, 3), random(-3, 3), random(-9e3, 9e3), random(-9e3, 9e3)];
      const whole = force(trace, fx, fy);
      const hung = {
        at: {
          x: tie.point.x.plus(trace.constant(dx, LENGTH)),
          y: tie.point.y.plus(trace.constant(dy, LENGTH)),
        },
        force: whole,
        tiedTo: tie.point,
      };
      // The couple: one force across the segment at the tie and its opposite 0.25 of the segment on.
      const on = placeOnSegment(arch, segment, trace.constant(0, NONE));
      const couple = dx * fy - dy * fx;
      const arm = [tie.point.x.minus(on.point.x), tie.point.y.minus(on.point.y)] as const;
      const square = arm[0].squared().plus(arm[1].squared());
      const pull = {
        x: arm[1]
          .negated()
          .over(square)
          .times(trace.constant(couple, LENGTH))
          .times(force(trace, 1, 1).x),
        y: arm[0]
          .over(square)
          .times(trace.constant(couple, LENGTH))
          .times(force(trace, 1, 1).x),
      };
      const three = [
        { at: tie.point, force: whole, place: tie },
        { at: tie.point, force: pull, place: tie },
        { at: on.point, force: { x: pull.x.negated(), y: pull.y.negated() }, place: on },
      ];
      const { values, queries } = prepared(trace, [
        ...effects(trace, arch, placeLoads(arch, [hung])),
        ...effects(trace, arch, three),
      ])();
      expect(queries).toEqual([]);
      for (let i = 0; i < 10; i++) {
        // Rounding of moments of some 100 kN·m.
        expect(values[i + 10], `seed ${seed}, figure ${i}`).toBeCloseTo(values[i] as number, 6);
      }
    }
  });

  it('is carried by the half that it is tied to, wherever it hangs', () => {
    const trace = new Trace();
    const arch = archThrough(keyPoints(trace, HALL));
    const hang = (tieX: number) => ({
      at: pointOf(trace, 12, 3),
      force: force(trace, 0, -12e3),
      tiedTo: pointOf(trace, tieX, 10 - (Math.abs(tieX - 12) * 5) / 12),
    });
    const [left, right] = [6, 18].map((x) => reactions(arch, placeLoads(arch, [hang(x)])));
    const { values } = prepared(
      trace,
      [left, right].flatMap((one) => flat(one?.left ?? hang(0).at, one?.crown ?? hang(0).at)),
    )();
    // By hand: under the crown, each springing takes half of 12 kN up; the half without a load is a strut from the
    // springing to the crown, 12 along and 10 up, and so the thrust is 6 kN · 12 / 10.
    const [lx = 0, ly = 0, , lc = 0, rx = 0, ry = 0, , rc = 0] = values;
    for (const [value, wanted] of [
      [lx, 7.2e3],
      [ly, 6e3],
      [rx, 7.2e3],
      [ry, 6e3],
      // What the right half presses up on the left one with: 6 kN if the load is on the left, else −6 kN.
      [lc, 6e3],
      [rc, -6e3],
    ] as const) {
      expect(value).toBeCloseTo(wanted, 8);
    }
  });
});

describe('the resultant of loads', () => {
  it('is the sum of the forces and of the moments of those that count', () => {
    const trace = new Trace();
    const arch = archThrough(keyPoints(trace, HALL));
    const loads = placeLoads(arch, [
      { at: pointOf(trace, 0, 3), force: force(trace, 4e3, 0) },
      { at: pointOf(trace, 6, 7.5), force: force(trace, 1e3, -8e3) },
      { at: pointOf(trace, 18, 7.5), force: force(trace, 0, -6e3) },
    ]);
    const counts = [1, 0, 1];
    const some = resultant(loads, pointOf(trace, 2, 1), (load) => {
      return new Condition(trace.constant(counts[loads.indexOf(load)] as number, NONE));
    });
    const none = resultant([], pointOf(trace, 2, 1), () => new Condition(trace.constant(1, NONE)));
    const { values } = prepared(trace, [
      ...flat(some.force),
      some.moment,
      ...flat(none.force),
      none.moment,
    ])();
    // By hand: −(3 − 1) · 4 kN and −(18 − 2) · 6 kN.
    expect(values).toEqual([4e3, -6e3, -8e3 - 96e3, 0, 0, 0]);
  });
});
