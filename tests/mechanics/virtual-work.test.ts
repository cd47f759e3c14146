import { describe, expect, it } from 'vitest';
import { moved, type Point, pointOf, turnAbout } from '../../src/geometry/index.ts';
import {
  negligibleDisplacement,
  type PerturbedState,
  UNMOVED,
  virtualWorkMoment,
} from '../../src/mechanics/index.ts';
import { FORCE, LENGTH, NONE } from '../../src/quantity/index.ts';
import { gradient, Refusal, type Scalar, Trace } from '../../src/tape/index.ts';
import { complaint, prepared } from '../support/construction.ts';

/** Moments wired by hand, on a perturbation of its own: the simplest is a rigid lever about a hinge at the datum. */
class Wired {
  readonly trace = new Trace();
  readonly p: Scalar;

  constructor(size: number) {
    this.p = this.trace.mark(this.trace.constant(size, NONE));
  }

  point(x: number, y: number): Point {
    return pointOf(this.trace, x, y);
  }

  force(x: number, y: number) {
    return { x: this.trace.constant(x, FORCE), y: this.trace.constant(y, FORCE) };
  }

  /** A point of a lever that turns clockwise by p, so that what stands to the right goes down. */
  levered(point: Point): Point {
    return moved(turnAbout(this.point(0, 0), this.p.negated()), point);
  }

  moment(change: Partial<PerturbedState>) {
    return virtualWorkMoment({
      perturbation: this.p,
      loads: [],
      moved: [],
      closing: this.p,
      negligible: this.trace.constant(1e-9, LENGTH),
      ...change,
    });
  }
}

describe('a moment by virtual work', () => {
  it('is by statics of a lever: the arm times the load, of each load its own part', () => {
    const wired = new Wired(0.01);
    const [a, b] = [wired.point(3, 1), wired.point(5, -2)];
    const loads = [
      { at: a, force: wired.force(0, -4e3) },
      { at: b, force: wired.force(2e3, -1e3) },
    ];
    const { limit, finite, along, rates } = wired.moment({
      loads,
      moved: [a, b].map((point) => wired.levered(point)),
    });
    const { values, queries } = prepared(wired.trace, [limit, finite, ...along, ...rates])();
    expect(queries).toEqual([]);
    const [exact = 0, drawn = 0, u = 0, v = 0, du = 0, dv = 0] = values;
    // By hand: turned clockwise the work per radian is 3 · 4 kN·m, and 5 · 1 − 2 · 2 kN·m of the other.
    expect(exact).toBeCloseTo(-(12e3 + 1e3), 9);
    expect(du).toBeCloseTo(3, 12);
    expect(dv).toBeCloseTo(1e3 / Math.hypot(2e3, 1e3), 12);
    // The finite value is what comes of the displacements along the loads and the change of the angle.
    expect(drawn).toBeCloseTo(-(4e3 * u + Math.hypot(2e3, 1e3) * v) / 0.01, 8);
    // Moved along a circle: sin p, and 1 − cos p across.
    expect(u).toBeCloseTo(3 * Math.sin(0.01) + (1 - Math.cos(0.01)) * 1, 14);
  });

  it('of no loads is 0, and a load of 0 has no displacement along it and a slope all the same', () => {
    const wired = new Wired(0.01);
    const none = wired.moment({});
    expect(prepared(wired.trace, [none.limit, none.finite])()).toEqual({
      values: [0, 0],
      queries: [],
      figures: [],
    });
    const size = wired.trace.input('size', FORCE);
    const at = wired.point(3, 0);
    const { limit, along } = wired.moment({
      loads: [{ at, force: { x: wired.trace.constant(0, FORCE), y: size } }],
      moved: [wired.levered(at)],
    });
    const outcome = prepared(wired.trace, [limit, along[0] as Scalar, ...gradient(limit, [size])]);
    for (const [newtons, displacement] of [
      [0, 0],
      [5, -3 * Math.sin(0.01)],
    ] as const) {
      const { values, queries } = outcome(newtons);
      expect(queries).toEqual([]);
      expect(values[0]).toBeCloseTo(3 * newtons, 12);
      expect(values[1]).toBeCloseTo(displacement, 14);
      expect(values[2]).toBeCloseTo(3, 12);
    }
  });

  it('refuses as many moved points as there are not loads', () => {
    const wired = new Wired(0.01);
    const at = wired.point(3, 0);
    const load = { at, force: wired.force(0, -1) };
    for (const [loads, movedPoints, words] of [
      [[load], [], 'there are 1 loads and 0 moved points'],
      [[], [at], 'there are 0 loads and 1 moved points'],
      [[load, load], [at], 'there are 2 loads and 1 moved points'],
    ] as const) {
      const call = () => wired.moment({ loads, moved: movedPoints });
      expect(call).toThrow(Refusal);
      expect(call).toThrow(`${words}: link one moved point for each load, in the same order`);
    }
  });

  it('says of each load whose moved point is another one by how much, where two are in the wrong order', () => {
    const wired = new Wired(0.01);
    const at = [wired.point(3, 0), wired.point(6, 4), wired.point(1, 1)];
    const [a, b, c] = at.map((point) => wired.levered(point)) as [Point, Point, Point];
    const loads = at.map((point) => ({ at: point, force: wired.force(100, -1e3) }));
    const outcome = prepared(wired.trace, [wired.moment({ loads, moved: [b, a, c] }).limit])();
    expect(complaint(outcome)).toBe('');
    // The two are 3 m and 4 m apart, hence 5 m.
    expect(outcome.queries).toEqual(
      [1, 2].map(
        (i) =>
          `The moved point of load ${i} is 5.000\u00a0m off the load while nothing is moved: link the points in the order of the loads`,
      ),
    );
    expect(outcome.values).toEqual([Number.NaN]);
  });

  it('takes a moved point for the load’s up to what counts as no displacement, and not beyond', () => {
    for (const share of [0, 0.5, 0.999, 1.001, 2, 1e6]) {
      const wired = new Wired(0.01);
      const off = share * 1e-9;
      const load = { at: wired.point(0, 3), force: wired.force(1e3, 0) };
      const { limit } = wired.moment({ loads: [load], moved: [wired.levered(wired.point(off, 3))] });
      const outcome = prepared(wired.trace, [limit])();
      expect(complaint(outcome)).toBe('');
      expect(outcome.queries, `${share} of it`).toHaveLength(share > 1 ? 1 : 0);
      if (share > 1) expect(outcome.figures[0]).toBeCloseTo(off, 15);
      else expect(outcome.values[0]).toBeCloseTo(-3e3, 5);
    }
  });

  it('says where the angle at the cut stays as it is, or changes with the square of the perturbation only', () => {
    for (const closing of [
      (p: Scalar) => p.times(0).plus(0.2),
      (p: Scalar) => p.squared(),
      (p: Scalar) => p.times(1e-10),
    ]) {
      const wired = new Wired(0.03);
      const at = wired.point(3, 0);
      const { limit } = wired.moment({
        loads: [{ at, force: wired.force(0, -1e3) }],
        moved: [wired.levered(at)],
        closing: closing(wired.p),
      });
      const { values, queries } = prepared(wired.trace, [limit])();
      expect(values).toEqual([Number.NaN]);
      expect(queries).toHaveLength(1);
      expect(queries[0]).toMatch(/^The angle at the cut does not change with the perturbation/);
    }
  });

  it('has no finite value at a perturbation of 0 or of mere rounding, while its limit is what it was', () => {
    for (const p of [0, 1e-16, -1e-12, 1e-10]) {
      const wired = new Wired(p);
      const at = wired.point(3, 0);
      const state = { loads: [{ at, force: wired.force(0, -1e3) }], moved: [wired.levered(at)] };
      const { limit, finite } = wired.moment(state);
      const one = prepared(wired.trace, [limit])();
      expect(one.queries).toEqual([]);
      expect(one.values[0]).toBeCloseTo(-3e3, 9);
      const both = prepared(wired.trace, [limit, finite])();
      expect(complaint(both)).toBe('');
      expect(both.queries[0]).toMatch(/^The perturbation is .*°: give it a size/);
      expect(both.values[0]).toBe(one.values[0]);
      expect(both.values[1]).toBeNaN();
    }
  });

  it('counts a displacement as none by how far the loads lie apart, and of less than a metre by the metre', () => {
    const trace = new Trace();
    const at = (x: number, y: number) => ({ at: pointOf(trace, x, y) });
    const negligible = (...loads: { at: Point }[]) => negligibleDisplacement(loads, trace);
    const { values } = prepared(trace, [
      negligible(),
      negligible(at(70, 20)),
      negligible(at(70, 20), at(70.5, 20.2)),
      negligible(at(70, 20), at(64, 23), at(71, 9)),
    ])();
    for (const [i, reach] of [1, 1, 1, 11].entries()) expect(values[i]).toBeCloseTo(reach * UNMOVED, 20);
  });
});
