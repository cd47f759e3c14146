import { describe, expect, it } from 'vitest';
import { archMoment, type Role } from '../../src/mechanics/index.ts';
import { FORCE, NONE } from '../../src/quantity/index.ts';
import { derivative, type Scalar } from '../../src/tape/index.ts';
import { HandArch, parabola } from '../support/handArch.ts';

/**
 * Parabolic three-hinged arches as polygons with their corners on the parabola; spread loads stand by halves at the
 * ends of each side, which is exact for the reactions and for the moments at the corners.
 *
 * Source: S. Timoshenko and D. H. Young, Theory of Structures; from memory. What is said to be by hand is followed from
 * statics beside it.
 */

const [SPAN, RISE, W, STEPS] = [32, 8, 6_000, 16];
const STEP = SPAN / STEPS;

function arch(): HandArch {
  return new HandArch(parabola(SPAN, RISE, STEPS));
}

describe('a parabolic three-hinged arch', () => {
  it('under a full load on plan has no shear and only thrust: N = −H / cos φ', () => {
    const full = arch();
    for (let i = 0; i < STEPS; i++) full.spread(i, 0, -W * STEP);
    const thrust = (W * SPAN ** 2) / (8 * RISE);
    const { left, right } = full.reactions();
    expect(left.x).toBeCloseTo(thrust, 7);
    expect(left.y).toBeCloseTo((W * SPAN) / 2, 7);
    expect(right.x).toBeCloseTo(-thrust, 7);
    expect(right.y).toBeCloseTo((W * SPAN) / 2, 7);
    for (let i = 0; i < STEPS; i++) {
      // The side's slope on plan is that of the parabola at its middle, 4f (L − 2x) / L².
      const x = (i + 0.5) * STEP;
      const slope = (4 * RISE * (SPAN - 2 * x)) / SPAN ** 2;
      const { N, V } = full.forces(full.place(i, 0.5));
      expect(N).toBeCloseTo(-thrust * Math.hypot(1, slope), 7);
      expect(V).toBeCloseTo(0, 7);
      for (const moment of full.moments(full.place(i, 0.5))) {
        // Rounding of H times the rise.
        expect(Math.abs(moment) / (thrust * RISE)).toBeLessThan(1e-12);
      }
    }
  });

  it('loaded on its left half has the moments of half a beam each way at every corner', () => {
    const half = arch();
    for (let i = 0; i < STEPS / 2; i++) half.spread(i, 0, -W * STEP);
    for (let i = 1; i < STEPS; i++) {
      if (i === STEPS / 2) continue;
      // By hand: half the load symmetric, which does not bend the arch, and half of it antisymmetric, under which
      // each half is a beam of L/2 under w/2: wL²/64 in its middle.
      const along = (i % (STEPS / 2)) * STEP;
      const beam = ((W / 2) * along * (SPAN / 2 - along)) / 2;
      for (const moment of half.moments(half.corner(i))) {
        expect(moment).toBeCloseTo(i < STEPS / 2 ? beam : -beam, 5);
      }
    }
    expect(half.moments(half.corner(4))[0]).toBeCloseTo((W * SPAN ** 2) / 64, 5);
    expect(half.reactions().left.x).toBeCloseTo((W * SPAN ** 2) / (16 * RISE), 7);
  });

  it('under wind w for each metre of height on its left half has wf/4 and 3wf/4 at its springings', () => {
    const blown = arch();
    const points = parabola(SPAN, RISE, STEPS);
    for (let i = 0; i < STEPS / 2; i++) {
      const [from, to] = [points[i] as (typeof points)[number], points[i + 1] as (typeof points)[number]];
      blown.spread(i, W * (to[2] - from[2]), 0);
    }
    const { left, right } = blown.reactions();
    // By hand: moments about the left springing give wf²/2L up at the right, and the right half, a beam without
    // loads between its hinges, half a span times that over the rise.
    expect(right.y).toBeCloseTo((W * RISE ** 2) / (2 * SPAN), 7);
    expect(right.x).toBeCloseTo((-W * RISE) / 4, 7);
    expect(left.x).toBeCloseTo((-3 * W * RISE) / 4, 7);
    // By hand, at the quarter points, 3f/4 high: 5wf²/32 and −wf²/16.
    for (const moment of blown.moments(blown.corner(4)))
      expect(moment).toBeCloseTo((5 * W * RISE ** 2) / 32, 6);
    for (const moment of blown.moments(blown.corner(12)))
      expect(moment).toBeCloseTo((-W * RISE ** 2) / 16, 6);
  });

  it.each([
    [6, 6],
    [10, 4],
    [3, 9],
    [1, 12],
  ])(
    'with springings %d m and %d m below the crown has the thrust wL²/2(√h₁+√h₂)² and no moment',
    (one, other) => {
      // By hand: on one parabola with its vertex at the crown, w l₁²/2h₁ = w l₂²/2h₂.
      const [a, b] = [Math.sqrt(one), Math.sqrt(other)];
      const [first, second] = [(SPAN * a) / (a + b), (SPAN * b) / (a + b)];
      const thrust = (W * SPAN ** 2) / (2 * (a + b) ** 2);
      const sides = 6;
      const points: (readonly [Role, number, number])[] = [];
      for (let i = -sides; i <= sides; i++) {
        const x = (i < 0 ? first * i : second * i) / sides;
        const role = Math.abs(i) === sides ? 'springing' : i === 0 ? 'crown' : 'knee';
        points.push([role, x, (-one * x ** 2) / first ** 2]);
      }
      const uneven = new HandArch(points);
      for (let i = 0; i < 2 * sides; i++) uneven.spread(i, 0, (-W * (i < sides ? first : second)) / sides);
      const { left, right } = uneven.reactions();
      expect(left.x).toBeCloseTo(thrust, 6);
      expect(left.y).toBeCloseTo(W * first, 6);
      expect(right.y).toBeCloseTo(W * second, 6);
      for (const i of [1, 3, 5, 7, 9, 11]) {
        for (const moment of uneven.moments(uneven.corner(i))) {
          expect(Math.abs(moment) / (thrust * one)).toBeLessThan(1e-11);
        }
      }
    },
  );
});

describe('the influence lines of a parabolic three-hinged arch', () => {
  /** A unit load at a corner, by its distance from the left springing. */
  function unit(i: number): { a: number; loaded: HandArch } {
    const loaded = arch();
    loaded.load(loaded.corner(i), 0, -1);
    return { a: i * STEP, loaded };
  }

  it('are a triangle with L/4f at the crown for the thrust, and straight from 1 to 0 for the vertical reaction', () => {
    for (let i = 0; i <= STEPS; i++) {
      const { a, loaded } = unit(i);
      const { left } = loaded.reactions();
      expect(left.x).toBeCloseTo(Math.min(a, SPAN - a) / (2 * RISE), 12);
      expect(left.y).toBeCloseTo(1 - a / SPAN, 12);
    }
  });

  it.each([2, 4, 6])(
    'for the moment at step %i of 16 are a beam’s less the thrust’s times the height',
    (cut) => {
      const x = cut * STEP;
      const y = (4 * RISE * x * (SPAN - x)) / SPAN ** 2;
      const lines = Array.from({ length: STEPS + 1 }, (_, i) => {
        const { a, loaded } = unit(i);
        const beam = a <= x ? (a * (SPAN - x)) / SPAN : (x * (SPAN - a)) / SPAN;
        const wanted = beam - (y * Math.min(a, SPAN - a)) / (2 * RISE);
        const moments = loaded.moments(loaded.corner(cut));
        for (const moment of moments) expect(moment).toBeCloseTo(wanted, 11);
        return moments[0] as number;
      });
      // The load is worst at the section itself, and on the other side at the crown.
      expect(lines.indexOf(Math.max(...lines))).toBe(cut);
      expect(lines.indexOf(Math.min(...lines))).toBe(STEPS / 2);
      // The whole line of a full load has no area.
      expect(lines.reduce((total, one) => total + one, 0)).toBeCloseTo(0, 9);
      if (cut === 4) {
        expect(lines[4]).toBeCloseTo((3 * SPAN) / 32, 11);
        expect(lines[8]).toBeCloseTo(-SPAN / 16, 11);
      }
    },
  );

  it('are the displacements of the released mechanism (H. Müller-Breslau’s theorem; from memory)', () => {
    const bare = arch();
    const { trace } = bare;
    const down = { x: trace.constant(0, FORCE), y: trace.constant(-1, FORCE) };
    const places = Array.from({ length: STEPS + 1 }, (_, i) => bare.corner(i));
    const p = trace.mark(trace.constant(1e-4, NONE));
    const loads = places.map((place) => ({ at: place.point, force: down, place }));
    const { virtualWork, mechanism } = archMoment(bare.arch, loads, bare.corner(4), p);
    const [closing] = derivative([mechanism.closing], p, 0);
    const [rate = Number.NaN, ...displacements] = bare.read([closing as Scalar, ...virtualWork.rates]);
    for (const [i, displacement] of displacements.entries()) {
      const { loaded } = unit(i);
      expect(-displacement / rate).toBeCloseTo(loaded.moments(loaded.corner(4))[1] as number, 11);
    }
  });
});
