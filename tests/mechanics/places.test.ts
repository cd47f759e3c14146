import { describe, expect, it } from 'vitest';
import type { Point } from '../../src/geometry/index.ts';
import {
  type Arch,
  archThrough,
  crownStart,
  isBefore,
  isLeft,
  type KeyPoint,
  kneePlace,
  type Place,
  placeAlong,
  placeNearest,
  placeOnSegment,
  type Role,
} from '../../src/mechanics/index.ts';
import { LENGTH, NONE } from '../../src/quantity/index.ts';
import { Refusal, type Scalar, Trace } from '../../src/tape/index.ts';
import { complaint, construction, drawing, flat, keyPoints, prepared } from '../support/construction.ts';
import { randomFrom } from '../support/random.ts';

/** A hall with two knees to the left and one to the right; 'through' makes arcs of two of its segments. */
const STRAIGHT: readonly Role[] = ['springing', 'knee', 'knee', 'crown', 'knee', 'springing'];
const CURVED: readonly Role[] = [
  'springing',
  'through',
  'knee',
  'knee',
  'crown',
  'through',
  'knee',
  'springing',
];
const STRAIGHT_AT = [0, 0, 1, 4, 4, 7, 10, 9, 18, 6, 20, 1];
const CURVED_AT = [0, 0, -0.5, 2, 1, 4, 4, 7, 10, 9, 15, 8, 18, 6, 20, 1];

function archOf(roles: readonly Role[], points: readonly Point[]): Arch {
  return archThrough(points.map((point, i): KeyPoint => ({ role: roles[i] as Role, point })));
}

const described = (place: Place): Scalar[] => [place.along, ...flat(place.point, place.direction)];

describe.each([
  ['of straight segments', STRAIGHT, STRAIGHT_AT],
  ['with arcs', CURVED, CURVED_AT],
] as const)('on an axis %s', (_, roles, at) => {
  const count = roles.length;
  const shared = (
    build: (arch: Arch, inputs: readonly Scalar[], trace: Trace) => readonly Scalar[],
    lengths: number,
  ) => drawing(count, lengths, (points, rest, trace) => build(archOf(roles, points), rest, trace));

  it('a station by its distance is where the segment that it falls on has it', () => {
    for (let segment = 0; segment < 5; segment++) {
      for (const ratio of [0.001, 0.3, 0.77, 0.999]) {
        const both = shared((arch, _rest, trace) => {
          const known = placeOnSegment(arch, segment, trace.constant(ratio, NONE));
          return [...described(known), ...described(placeAlong(arch, known.along))];
        }, 0);
        const { values, queries } = both(...at);
        expect(queries).toEqual([]);
        for (let i = 0; i < 5; i++) {
          expect(values[i + 5], `segment ${segment}, figure ${i}`).toBeCloseTo(values[i] as number, 12);
        }
        expect(Math.hypot(values[3] as number, values[4] as number)).toBeCloseTo(1, 14);
      }
    }
  });

  it('a station at a knee is at its point, and looks along the segment to its left', () => {
    const knees = shared((arch, _rest, trace) => {
      const one = trace.constant(1, NONE);
      return [1, 2, 3].flatMap((knee, i) => [
        ...described(kneePlace(arch, knee)),
        ...described(placeOnSegment(arch, [0, 1, 3][i] as number, one)),
        ...described(placeAlong(arch, arch.starts[[1, 2, 4][i] as number] as Scalar)),
      ]);
    }, 0);
    const { values, queries } = knees(...at);
    expect(queries).toEqual([]);
    for (const [k, [x, y]] of [
      [1, 4],
      [4, 7],
      [18, 6],
    ].entries()) {
      const three = values.slice(15 * k, 15 * (k + 1));
      for (const first of [0, 5, 10]) {
        expect(three[first + 1]).toBeCloseTo(x as number, 12);
        expect(three[first + 2]).toBeCloseTo(y as number, 12);
        for (let i = 0; i < 5; i++) expect(three[first + i]).toBeCloseTo(three[i] as number, 12);
      }
    }
  });

  it('the place nearest to a point is not farther than any of 2000 stations, and no farther than it says', () => {
    const nearest = shared((arch, [x, y]) => {
      const { place, off } = placeNearest(arch, { x: x as Scalar, y: y as Scalar });
      return [off, ...described(place)];
    }, 2);
    const along = shared((arch, [s]) => described(placeAlong(arch, s as Scalar)), 1);
    const total = shared((arch) => [arch.starts.at(-1) as Scalar], 0)(...at).values[0] as number;
    const stations = Array.from({ length: 2001 }, (_, i) => along(...at, (total * i) / 2000).values);
    for (let seed = 0; seed < 120; seed++) {
      const random = randomFrom(seed);
      const [px, py] = [random(-6, 26), random(-5, 14)];
      const { values, queries } = nearest(...at, px, py);
      expect(queries).toEqual([]);
      const [off = Number.NaN, s = Number.NaN, x = Number.NaN, y = Number.NaN] = values;
      expect(Math.hypot(x - px, y - py)).toBeCloseTo(off, 9);
      const there = along(...at, s).values;
      expect(there[1]).toBeCloseTo(x, 9);
      expect(there[2]).toBeCloseTo(y, 9);
      const least = Math.min(
        ...stations.map((one) => Math.hypot((one[1] as number) - px, (one[2] as number) - py)),
      );
      expect(off).toBeLessThanOrEqual(least + 1e-12);
      // Stations are some 13 mm apart, and so one of them is within 7 mm along the axis.
      expect(least - off).toBeLessThan(0.007);
    }
  });

  it('a point on the axis is found there, with nothing off', () => {
    const found = shared(
      (arch, _rest, trace) =>
        [0, 1, 2, 3, 4].flatMap((segment) =>
          [0, 0.2, 0.5, 1].flatMap((ratio) => {
            const known = placeOnSegment(arch, segment, trace.constant(ratio, NONE));
            const { place, off } = placeNearest(arch, known.point);
            return [off, place.along.minus(known.along)];
          }),
        ),
      0,
    );
    // On a site at 100 km the coordinates themselves are rounded to 1.5e-11 m.
    for (const [shift, within] of [
      [0, 1e-13],
      [1e5, 1e-9],
    ] as const) {
      const { values, queries } = found(...at.map((value) => value + shift));
      expect(queries).toEqual([]);
      for (const value of values) expect(Math.abs(value)).toBeLessThan(within);
    }
  });

  it('a station beyond either end is a query with the figure, and one at an end is not', () => {
    const along = shared((arch, [s]) => described(placeAlong(arch, s as Scalar)), 1);
    const total = shared((arch) => [arch.starts.at(-1) as Scalar], 0)(...at).values[0] as number;
    for (const beyond of [1e-9, 1e-6, 1e-3, 0.25, 10, 1e4]) {
      for (const s of [-beyond, total + beyond]) {
        const outcome = along(...at, s);
        expect(complaint(outcome)).toBe('');
        expect(outcome.queries).toHaveLength(1);
        expect(outcome.figures[0]).toBeCloseTo(beyond, 11);
        expect(outcome.figures[1]).toBeCloseTo(total, 11);
        expect(outcome.values.every(Number.isNaN)).toBe(true);
      }
    }
    for (const s of [0, total]) expect(along(...at, s).queries).toEqual([]);
    const [first, last] = [along(...at, 0).values, along(...at, total).values];
    expect(first.slice(1, 3)).toEqual([0, 0]);
    expect(last[1]).toBeCloseTo(20, 12);
    expect(last[2]).toBeCloseTo(1, 12);
  });
});

describe('a place that is not on the axis', () => {
  const arch = () =>
    archThrough(
      keyPoints(
        new Trace(),
        STRAIGHT.map((role, i) => [role, STRAIGHT_AT[2 * i] as number, STRAIGHT_AT[2 * i + 1] as number]),
      ),
    );

  it('is refused with how many segments and knees there are', () => {
    const half = (of: Arch) => of.left.x.trace.constant(0.5, NONE);
    const of = arch();
    for (const segment of [5, -1, 17]) {
      expect(() => placeOnSegment(of, segment, half(of))).toThrow(Refusal);
      expect(() => placeOnSegment(of, segment, half(of))).toThrow(
        `the axis has 5 segments: there is no ${segment + 1}`,
      );
    }
    for (const knee of [0, 4, -1]) {
      expect(() => kneePlace(of, knee)).toThrow(`the axis has 3 knees: there is no knee ${knee}`);
    }
    const plain = archThrough(
      keyPoints(new Trace(), [
        ['springing', 0, 0],
        ['crown', 5, 5],
        ['springing', 10, 0],
      ]),
    );
    expect(() => kneePlace(plain, 1)).toThrow('the axis has no knee: there is no knee 1');
  });
});

describe('which comes first', () => {
  it('of places on the axis goes by the distance along it, whether known while tracing or found', () => {
    const trace = new Trace();
    const [one, two] = [trace.input('one', NONE), trace.input('two', NONE)];
    const arch = archThrough(
      keyPoints(
        trace,
        STRAIGHT.map((role, i) => [role, STRAIGHT_AT[2 * i] as number, STRAIGHT_AT[2 * i + 1] as number]),
      ),
    );
    for (let a = 0; a < 5; a++) {
      for (let b = 0; b < 5; b++) {
        const [known, other] = [placeOnSegment(arch, a, one), placeOnSegment(arch, b, two)];
        const [found, otherFound] = [placeAlong(arch, known.along), placeAlong(arch, other.along)];
        const outcome = prepared(trace, [
          isBefore(known, other).scalar,
          isBefore(found, other).scalar,
          isBefore(known, otherFound).scalar,
          isBefore(found, otherFound).scalar,
          isLeft(arch, known).scalar,
          isLeft(arch, found).scalar,
        ]);
        for (const [r, q] of [
          [0.2, 0.6],
          [0.6, 0.2],
          [0.4, 0.4],
        ] as const) {
          const before = a + r < b + q ? 1 : 0;
          const left = a < 3 ? 1 : 0;
          expect(outcome(r, q).values, `${a} ${r}, ${b} ${q}`).toEqual([
            before,
            before,
            before,
            before,
            left,
            left,
          ]);
        }
      }
    }
  });

  it('a load on a knee or the crown is at it and not before it, wherever rounding puts it', () => {
    // Segments that end in arcs: the place that is found by nearness is off by rounding, either way.
    const roles: readonly Role[] = [
      'springing',
      'through',
      'knee',
      'through',
      'crown',
      'through',
      'springing',
    ];
    const asked = drawing(7, 0, (points) => {
      const arch = archOf(roles, points);
      const [knee, crown] = [points[2] as Point, points[4] as Point];
      const [atKnee, atCrown] = [placeNearest(arch, knee).place, placeNearest(arch, crown).place];
      return [
        isBefore(atKnee, kneePlace(arch, 1)).scalar,
        isBefore(kneePlace(arch, 1), atKnee).scalar,
        isBefore(atKnee, placeAlong(arch, arch.starts[1] as Scalar)).scalar,
        isBefore(atCrown, placeAlong(arch, crownStart(arch))).scalar,
        isLeft(arch, atCrown).scalar,
      ];
    });
    for (const site of [0, 1e3, 1e5]) {
      for (let seed = 0; seed < 1000; seed++) {
        const random = randomFrom(seed);
        const at = [0, 0, -0.5, 3, 1, 5.5, 5.5, 8, 10.5, 8.5, 18.5, 5.5, 20.5, 0.5];
        const { values } = asked(...at.map((value) => site + value + random(-0.5, 0.5)));
        expect(values, `site ${site}, seed ${seed}`).toEqual([0, 0, 0, 0, 1]);
      }
    }
  });

  it('a millimetre is enough to come before', () => {
    const ordered = construction([LENGTH, LENGTH], ([s, t], trace) => {
      const arch = archThrough(
        keyPoints(
          trace,
          STRAIGHT.map((role, i) => [role, STRAIGHT_AT[2 * i] as number, STRAIGHT_AT[2 * i + 1] as number]),
        ),
      );
      return [isBefore(placeAlong(arch, s as Scalar), placeAlong(arch, t as Scalar)).scalar];
    });
    expect(ordered(7.999, 8).values).toEqual([1]);
    expect(ordered(8.001, 8).values).toEqual([0]);
    expect(ordered(8 - 1e-8, 8).values).toEqual([1]);
  });
});
