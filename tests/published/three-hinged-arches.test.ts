import { describe, expect, it } from 'vitest';
import { pointOf } from '../../src/geometry/index.ts';
import {
  archMoment,
  archThrough,
  internalForces,
  type KeyPoint,
  kneePlace,
  type Place,
  type PlacedLoad,
  placeOnSegment,
  reactions,
} from '../../src/mechanics/index.ts';
import { FORCE, NONE } from '../../src/quantity/index.ts';
import { evaluate, finish, Trace } from '../../src/tape/index.ts';

/**
 * Closed forms for three-hinged arches.
 *
 * Source: S. Timoshenko and D. H. Young, Theory of Structures (parabolic and circular arches); A. Kleinlogel,
 * Rigid Frame Formulas, and V. Leontovich, Frames and Arches (gable frame). All values from memory; each can be
 * followed by statics by hand.
 */

const [SPAN, RISE, LOAD] = [32, 8, 6_000];

type Role = KeyPoint['role'];

class Bench {
  readonly trace = new Trace();

  arch(points: readonly (readonly [Role, number, number])[]) {
    return archThrough(points.map(([role, x, y]) => ({ role, point: pointOf(this.trace, x, y) })));
  }

  force(at: Place, x: number, y: number): PlacedLoad {
    return {
      at: at.point,
      force: { x: this.trace.constant(x, FORCE), y: this.trace.constant(y, FORCE) },
      place: at,
    };
  }

  place(arch: ReturnType<Bench['arch']>, segment: number, ratio: number): Place {
    return placeOnSegment(arch, segment, this.trace.constant(ratio, NONE));
  }

  /** Moment by virtual work and by equilibrium. */
  both(arch: ReturnType<Bench['arch']>, loads: readonly PlacedLoad[], cut: Place): number[] {
    const p = this.trace.mark(this.trace.constant(0.02, NONE));
    const { virtualWork, forces } = archMoment(arch, loads, cut, p);
    return [...evaluate(finish(this.trace, [virtualWork.limit, forces.moment]), [])];
  }

  thrust(arch: ReturnType<Bench['arch']>, loads: readonly PlacedLoad[]): [left: number, right: number] {
    const { left, right } = reactions(arch, loads);
    const [a = Number.NaN, b = Number.NaN] = evaluate(finish(this.trace, [left.x, right.x]), []);
    return [a, b];
  }
}

/**
 * A parabola as a polygon with its corners on it at equal steps on plan. A uniform load on plan is lumped at the
 * corners, w · step each: between corners the moments of the lumped and the spread load differ, at the corners
 * they are the same, because a simple beam's are.
 */
function parabola(bench: Bench, steps: number) {
  const height = (x: number): number => (4 * RISE * x * (SPAN - x)) / SPAN ** 2;
  const points = Array.from({ length: steps + 1 }, (_, i): readonly [Role, number, number] => {
    const x = (SPAN * i) / steps;
    const role = i === 0 || i === steps ? 'springing' : i === steps / 2 ? 'crown' : 'knee';
    return [role, x, height(x)];
  });
  const arch = bench.arch(points);
  const step = SPAN / steps;
  const corner = (i: number): Place => (i === 0 ? bench.place(arch, 0, 0) : bench.place(arch, i - 1, 1));
  const uniform = (from: number, to: number): PlacedLoad[] =>
    Array.from({ length: to - from + 1 }, (_, k) => {
      const share = k === 0 || k === to - from ? 0.5 : 1;
      return bench.force(corner(from + k), 0, -LOAD * step * share);
    });
  return { arch, corner, uniform };
}

describe('a parabolic three-hinged arch', () => {
  it('under a full uniform load on plan has the thrust wL²/8f and no moment anywhere', () => {
    const bench = new Bench();
    const { arch, corner, uniform } = parabola(bench, 16);
    const loads = uniform(0, 16);
    const expected = (LOAD * SPAN ** 2) / (8 * RISE);
    const [left, right] = bench.thrust(arch, loads);
    expect(left).toBeCloseTo(expected, 6);
    expect(right).toBeCloseTo(-expected, 6);
    for (const i of [1, 3, 6, 11, 14]) {
      for (const moment of bench.both(arch, loads, corner(i))) {
        // Rounding of moments of the size of H · f.
        expect(Math.abs(moment)).toBeLessThan(1e-10 * expected * RISE);
      }
    }
  });

  it('loaded on its left half has the thrust wL²/16f and ±wL²/64 at the quarter points', () => {
    const bench = new Bench();
    const { arch, corner, uniform } = parabola(bench, 16);
    const loads = uniform(0, 8);
    expect(bench.thrust(arch, loads)[0]).toBeCloseTo((LOAD * SPAN ** 2) / (16 * RISE), 6);
    for (const moment of bench.both(arch, loads, corner(4))) {
      expect(moment).toBeCloseTo((LOAD * SPAN ** 2) / 64, 5);
    }
    for (const moment of bench.both(arch, loads, corner(12))) {
      expect(moment).toBeCloseTo((-LOAD * SPAN ** 2) / 64, 5);
    }
  });

  it.each([2, 5, 8])('under one load at step %i of 16 has the thrust Pa/2f', (i) => {
    const bench = new Bench();
    const { arch, corner } = parabola(bench, 16);
    const a = (SPAN * i) / 16;
    const [left] = bench.thrust(arch, [bench.force(corner(i), 0, -50_000)]);
    expect(left).toBeCloseTo((50_000 * a) / (2 * RISE), 6);
  });

  it('has the quarter-point influence values 3L/32 at the quarter point and −L/16 at the crown', () => {
    const bench = new Bench();
    const { arch, corner } = parabola(bench, 16);
    for (const moment of bench.both(arch, [bench.force(corner(4), 0, -1)], corner(4))) {
      expect(moment).toBeCloseTo((3 * SPAN) / 32, 9);
    }
    for (const moment of bench.both(arch, [bench.force(corner(8), 0, -1)], corner(4))) {
      expect(moment).toBeCloseTo(-SPAN / 16, 9);
    }
  });
});

describe('a semicircular three-hinged arch under a uniform load on plan', () => {
  const RADIUS = 10;

  /** Two true arcs; the load in slices of equal width on plan, each at its middle. */
  function momentAt(theta: number, slices: number): number[] {
    const bench = new Bench();
    const on = (angle: number): readonly [number, number] => [
      -RADIUS * Math.cos(angle),
      RADIUS * Math.sin(angle),
    ];
    const arch = bench.arch([
      ['springing', -RADIUS, 0],
      ['through', ...on(Math.PI / 4)],
      ['crown', 0, RADIUS],
      ['through', ...on((3 * Math.PI) / 4)],
      ['springing', RADIUS, 0],
    ]);
    const width = (2 * RADIUS) / slices;
    const loads = Array.from({ length: slices }, (_, i) => {
      const angle = Math.acos(1 - ((i + 0.5) * width) / RADIUS);
      const share = angle / (Math.PI / 2);
      const place = bench.place(arch, share < 1 ? 0 : 1, share < 1 ? share : share - 1);
      return bench.force(place, 0, -LOAD * width);
    });
    return bench.both(arch, loads, bench.place(arch, 0, theta / (Math.PI / 2)));
  }

  it.each([15, 30, 45, 60, 75])(
    'has M = (wR²/2)(sin²θ − sin θ) at %i°, closer with the square of the slices',
    (degrees) => {
      const theta = (degrees * Math.PI) / 180;
      const exact = ((LOAD * RADIUS ** 2) / 2) * (Math.sin(theta) ** 2 - Math.sin(theta));
      for (const route of [0, 1]) {
        const gap = (slices: number) => Math.abs((momentAt(theta, slices)[route] as number) - exact);
        // A slice's load stands at its middle, so that the error is of second order; where the cut falls within
        // a slice changes its factor, hence a bound and not a ratio.
        const bound = (slices: number) => (LOAD * RADIUS ** 2 * 4) / slices ** 2;
        expect(gap(40)).toBeLessThan(bound(40));
        expect(gap(400)).toBeLessThan(bound(400));
      }
    },
  );

  it('has its least moment −wR²/8 at 30°', () => {
    const [byWork = Number.NaN] = momentAt(Math.PI / 6, 400);
    expect(byWork / ((-LOAD * RADIUS ** 2) / 8)).toBeCloseTo(1, 4);
    expect(momentAt(Math.PI / 6 + 0.05, 400)[0]).toBeGreaterThan(byWork);
    expect(momentAt(Math.PI / 6 - 0.05, 400)[0]).toBeGreaterThan(byWork);
  });
});

describe('a symmetric three-hinged gable frame', () => {
  const [COLUMN, ROOF] = [5, 3.5];

  function frame(bench: Bench) {
    return bench.arch([
      ['springing', 0, 0],
      ['knee', 0, COLUMN],
      ['crown', SPAN / 2, COLUMN + ROOF],
      ['knee', SPAN, COLUMN],
      ['springing', SPAN, 0],
    ]);
  }

  it('under a uniform load on plan has the thrust wL²/8(h+f) and the knee moment −Hh', () => {
    const bench = new Bench();
    const arch = frame(bench);
    // Each rafter's load at its ends and middle (1/6, 4/6, 1/6 of it): the same resultant, so exact here.
    const loads = [1, 2].flatMap((segment) =>
      [
        [0, 1],
        [0.5, 4],
        [1, 1],
      ].map(([ratio = 0, sixths = 0]) =>
        bench.force(bench.place(arch, segment, ratio), 0, (-LOAD * (SPAN / 2) * sixths) / 6),
      ),
    );
    const thrust = (LOAD * SPAN ** 2) / (8 * (COLUMN + ROOF));
    expect(bench.thrust(arch, loads)[0]).toBeCloseTo(thrust, 6);
    for (const knee of [1, 2]) {
      for (const moment of bench.both(arch, loads, kneePlace(arch, knee))) {
        expect(moment / (-thrust * COLUMN)).toBeCloseTo(1, 11);
      }
    }
  });

  it('under uniform wind on the left column has the right-hand thrust wh²/4(h+f)', () => {
    const bench = new Bench();
    const arch = frame(bench);
    const loads = [
      [0, 1],
      [0.5, 4],
      [1, 1],
    ].map(([ratio = 0, sixths = 0]) =>
      bench.force(bench.place(arch, 0, ratio), (LOAD * COLUMN * sixths) / 6, 0),
    );
    const [left, right] = bench.thrust(arch, loads);
    const expected = (LOAD * COLUMN ** 2) / (4 * (COLUMN + ROOF));
    expect(right).toBeCloseTo(-expected, 6);
    expect(left).toBeCloseTo(expected - LOAD * COLUMN, 6);
    for (const moment of bench.both(arch, loads, kneePlace(arch, 2))) {
      expect(moment / (-expected * COLUMN)).toBeCloseTo(1, 11);
    }
  });
});

describe('facts of the trade (common practice, no source)', () => {
  it('an unloaded half that is one straight segment carries no bending; one with a knee does', () => {
    const bench = new Bench();
    const arch = bench.arch([
      ['springing', 0, 0],
      ['knee', 1, 5],
      ['crown', 10, 8],
      ['springing', 22, 1],
    ]);
    const load = [bench.force(bench.place(arch, 2, 0.4), 3_000, -20_000)];
    const { left } = reactions(arch, load);
    const straight = internalForces(arch, load, { left }, bench.place(arch, 1, 0.5)).moment;
    const [knee = Number.NaN] = bench.both(arch, load, kneePlace(arch, 1));
    expect(Math.abs(knee)).toBeGreaterThan(1_000);
    expect(evaluate(finish(bench.trace, [straight]), [])[0]).not.toBeCloseTo(0, 3);

    const plain = bench.arch([
      ['springing', 0, 0],
      ['crown', 10, 8],
      ['knee', 20, 6],
      ['springing', 22, 1],
    ]);
    const right = [bench.force(bench.place(plain, 1, 0.4), 3_000, -20_000)];
    for (const ratio of [0.2, 0.5, 0.9]) {
      for (const moment of bench.both(plain, right, bench.place(plain, 0, ratio))) {
        // Rounding of moments of the size of 20 kN · 10 m.
        expect(Math.abs(moment)).toBeLessThan(2e-5);
      }
    }
  });
});
