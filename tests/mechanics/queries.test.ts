import { describe, expect, it } from 'vitest';
import { moved, pointOf, turnAbout } from '../../src/geometry/index.ts';
import {
  archMoment,
  archThrough,
  type KeyPoint,
  kneePlace,
  placeAlong,
  placeLoads,
  placeOnSegment,
  reactions,
  virtualWorkMoment,
} from '../../src/mechanics/index.ts';
import { FORCE, LENGTH, NONE } from '../../src/quantity/index.ts';
import { type Scalar, Trace } from '../../src/tape/index.ts';
import { type Outcome, prepared } from '../support/construction.ts';

type Role = KeyPoint['role'];

function outcome(trace: Trace, scalars: readonly Scalar[]): Outcome {
  return prepared(trace, scalars)();
}

function archOf(trace: Trace, ...points: readonly (readonly [Role, number, number])[]) {
  return archThrough(points.map(([role, x, y]) => ({ role, point: pointOf(trace, x, y) })));
}

const HALL = [
  ['springing', 0, 0],
  ['knee', 1, 5],
  ['crown', 10, 8],
  ['knee', 19, 5],
  ['springing', 20, 0],
] as const;

function load(trace: Trace, x: number, y: number, down = 10_000) {
  return {
    at: pointOf(trace, x, y),
    force: { x: trace.constant(0, FORCE), y: trace.constant(-down, FORCE) },
  };
}

describe('key points out of order', () => {
  it.each([
    [['springing', 'crown'], 'has 2 key points: link more'],
    [[], 'has no key points'],
    [['knee', 'crown', 'springing'], 'its first key point is a knee'],
    [['springing', 'crown', 'knee'], 'its last is a knee'],
    [['springing', 'knee', 'springing'], 'has one crown, not 0'],
    [['springing', 'crown', 'crown', 'springing'], 'has one crown, not 2'],
    [['springing', 'springing', 'crown', 'springing'], 'a springing stands between the ends'],
    [
      ['springing', 'through', 'through', 'crown', 'springing'],
      'key points 2 and 3 both say where an arc passes',
    ],
  ] as const)('%j are refused in words', (roles, words) => {
    const trace = new Trace();
    const points = (roles as readonly Role[]).map((role, i) => [role, i, i % 2] as const);
    expect(() => archOf(trace, ...points)).toThrow(words);
  });
});

describe('hinges on one line', () => {
  /** The crown this far above the line of the springings, 20 m apart. */
  function raised(by: number) {
    const trace = new Trace();
    const arch = archOf(trace, ['springing', 0, 0], ['knee', 2, 4], ['crown', 10, by], ['springing', 20, 0]);
    const placed = placeLoads(arch, [load(trace, 1, 2)]);
    const p = trace.mark(trace.constant(0.01, NONE));
    const moment = archMoment(arch, placed, kneePlace(arch, 1), p);
    return outcome(trace, [reactions(arch, placed).left.x, moment.virtualWork.limit, moment.forces.moment]);
  }

  it.each([0, 1e-12, -1e-9, 1e-6, 1.9e-5])('with the crown %d m off are a query with that figure', (by) => {
    const { values, queries } = raised(by);
    expect(values).toEqual([Number.NaN, Number.NaN, Number.NaN]);
    expect(queries).toHaveLength(1);
    expect(queries[0]).toContain('The three hinges lie on one line');
    if (by !== 0) expect(queries[0]).toContain(`${Math.abs(by).toExponential(3).split('e')[0]}×10`);
  });

  it('no longer are at 1e-6 of the span and beyond, and the routes still agree', () => {
    for (const by of [2.1e-5, 1e-4, -1e-3, 0.1]) {
      const { values, queries } = raised(by);
      expect(queries).toEqual([]);
      // At a rise of 1e-6 of the span six of sixteen digits are lost.
      expect((values[1] as number) / (values[2] as number)).toBeCloseTo(1, 7);
    }
  });
});

describe('a cut', () => {
  function cutAt(along: number) {
    const trace = new Trace();
    const arch = archOf(trace, ...HALL);
    const placed = placeLoads(arch, [load(trace, 5.5, 6.5)]);
    const p = trace.mark(trace.constant(0.01, NONE));
    const cut = placeAlong(arch, trace.constant(along, LENGTH));
    const moment = archMoment(arch, placed, cut, p);
    return outcome(trace, [moment.virtualWork.limit, moment.forces.moment]);
  }
  const half = Math.hypot(1, 5) + Math.hypot(9, 3);

  it.each([0, half, 2 * half])('at the hinge %d m along the axis is a query', (along) => {
    const { values, queries } = cutAt(along);
    expect(queries).toHaveLength(1);
    expect(queries[0]).toMatch(/^The cut is at a hinge \(.*m from it\), which carries no moment/);
    expect(values[0]).toBeNaN();
  });

  it('beyond the axis is a query that says by how much', () => {
    expect(cutAt(2 * half + 1.5).queries[0]).toContain(
      'The station lies 1.500\u00a0m beyond the end of the axis',
    );
    expect(cutAt(-0.25).queries[0]).toContain('0.2500\u00a0m beyond');
  });

  it('close to a hinge has a moment close to 0, the same by both routes', () => {
    for (const along of [0.01, half - 0.01, half + 0.01, 2 * half - 0.01]) {
      const { values, queries } = cutAt(along);
      expect(queries).toEqual([]);
      expect(Math.abs(values[0] as number)).toBeLessThan(200);
      expect(Math.abs((values[0] as number) - (values[1] as number))).toBeLessThan(1e-6);
    }
  });
});

describe('a dead point of the mechanism', () => {
  // The segment at the cut, the crown and the far springing stand in one line: driven from the near springing the
  // far hinge could not be followed.
  it.each([
    [
      'to the right',
      [
        ['springing', 0, 0],
        ['knee', 4, 8],
        ['crown', 12, 6],
        ['springing', 36, 0],
      ],
      0,
      1,
    ],
    [
      'to the left',
      [
        ['springing', 0, 0],
        ['crown', 24, 6],
        ['knee', 32, 8],
        ['springing', 36, 0],
      ],
      1,
      1,
    ],
  ] as const)('%s leaves the moment at the knee as it is', (_, points, segment, ratio) => {
    const trace = new Trace();
    const arch = archOf(trace, ...(points as readonly (readonly [Role, number, number])[]));
    const p = trace.mark(trace.constant(0.01, NONE));
    const loads = [0.3, 0.7].flatMap((at) =>
      [0, 1, 2].map((s) => {
        const place = placeOnSegment(arch, s, trace.constant(at, NONE));
        return {
          at: place.point,
          force: { x: trace.constant(2e3, FORCE), y: trace.constant(-9e3, FORCE) },
          place,
        };
      }),
    );
    const cut = placeOnSegment(arch, segment, trace.constant(ratio, NONE));
    const moment = archMoment(arch, loads, cut, p);
    const { values, queries } = outcome(trace, [moment.virtualWork.limit, moment.forces.moment]);
    expect(queries).toEqual([]);
    expect((values[0] as number) / (values[1] as number)).toBeCloseTo(1, 11);
  });
});

describe('a load', () => {
  it('off the axis without a tie is a query that says how far off', () => {
    const trace = new Trace();
    const arch = archOf(trace, ...HALL);
    const placed = placeLoads(arch, [load(trace, 5.5, 6.5), load(trace, 9, 6)]);
    const { queries } = outcome(trace, [reactions(arch, placed).left.x]);
    expect(queries).toHaveLength(1);
    expect(queries[0]).toContain('Load 2 stands 1.581\u00a0m off the axis');
  });

  it('off the axis with a tie is carried by the half that it is tied to', () => {
    const trace = new Trace();
    const arch = archOf(trace, ...HALL);
    // Hung right of the crown, but tied to the left half.
    const hung = { ...load(trace, 10.5, 6), tiedTo: pointOf(trace, 8.5, 7.5) };
    const placed = placeLoads(arch, [hung]);
    const { values, queries } = outcome(trace, [
      reactions(arch, placed).left.x,
      reactions(arch, placed).right.y,
    ]);
    expect(queries).toEqual([]);
    // By hand: the right springing's share is 10.5/20 of 10 kN, and its line of thrust passes through the crown
    // along the right half, which is unloaded: H = V · 10/8.
    expect(values[1]).toBeCloseTo(5_250, 6);
    expect(values[0]).toBeCloseTo((5_250 * 10) / 8, 6);
  });
});

describe('a moment wired by hand', () => {
  function lever(change: (p: Scalar) => Scalar, size: number, offset = 0) {
    const trace = new Trace();
    const p = trace.mark(trace.constant(size, NONE));
    const hinge = pointOf(trace, 0, 0);
    const end = load(trace, 2, 0);
    return {
      trace,
      work: () =>
        virtualWorkMoment({
          perturbation: p,
          loads: [end],
          moved: [moved(turnAbout(hinge, p), pointOf(trace, 2 + offset, 0))],
          closing: change(p),
          negligible: trace.constant(1e-9, LENGTH),
        }),
    };
  }

  it('is the lever times the load, exactly in the limit', () => {
    const { trace, work } = lever((p) => p, 0.03);
    const { limit, finite, along } = work();
    const { values } = outcome(trace, [limit, finite, along[0] as Scalar]);
    expect(values[0]).toBeCloseTo(20_000, 9);
    // At a finite p the load's point moves along its circle: 2 sin p, not 2 p.
    expect(values[1]).toBeCloseTo((20_000 * Math.sin(0.03)) / 0.03, 9);
    expect(values[2]).toBeCloseTo(-2 * Math.sin(0.03), 12);
  });

  it('says where a moved point is not at its load while nothing is moved', () => {
    const { trace, work } = lever((p) => p, 0.03, 0.35);
    const { values, queries } = outcome(trace, [work().limit]);
    expect(values).toEqual([Number.NaN]);
    expect(queries[0]).toContain(
      'The moved point of load 1 is 0.3500\u00a0m off the load while nothing is moved',
    );
  });

  it('says where the angle at the cut does not change', () => {
    const { trace, work } = lever((p) => p.times(p), 0.03);
    expect(outcome(trace, [work().limit]).queries[0]).toContain('The angle at the cut does not change');
  });

  it('has an exact limit, and no value at a perturbation of 0', () => {
    const { trace, work } = lever((p) => p, 0);
    const { limit, finite } = work();
    expect(outcome(trace, [limit]).values[0]).toBeCloseTo(20_000, 9);
    expect(outcome(trace, [finite]).queries[0]).toContain('The perturbation is 0°: give it a size');
  });

  it('takes as many moved points as loads', () => {
    const trace = new Trace();
    const p = trace.mark(trace.constant(0.1, NONE));
    expect(() =>
      virtualWorkMoment({
        perturbation: p,
        loads: [load(trace, 1, 1)],
        moved: [],
        closing: p,
        negligible: trace.constant(1e-9, LENGTH),
      }),
    ).toThrow('there are 1 loads and 0 moved points');
  });
});
