import { describe, expect, it } from 'vitest';
import { pointOf } from '../../src/geometry/index.ts';
import {
  archThrough,
  forcesAlong,
  internalForces,
  type PlacedLoad,
  placeOnSegment,
  reactions,
  stationsAlong,
} from '../../src/mechanics/index.ts';
import { FORCE, NONE } from '../../src/quantity/index.ts';
import { derivative, evaluate, finish, type Scalar, Trace } from '../../src/tape/index.ts';
import { type Case, randomCase, randomStructure, type Structure, traceStructure } from '../support/arches.ts';
import { flat, keyPoints, prepared } from '../support/construction.ts';
import type { XY } from '../support/frame.ts';

/** Random arches, their figures in plain numbers, and what the program makes of them. A further input is the cut. */
function each(
  count: number,
  options: Partial<Structure>,
  outputs: (traced: ReturnType<typeof traceStructure> & { readonly cut: number }) => readonly Scalar[],
  check: (values: readonly number[], figures: Case, structure: Structure, at: string) => void,
): void {
  for (let seed = 0; seed < count; seed++) {
    const structure = randomStructure(4000 + seed, options);
    const traced = traceStructure(structure);
    const outcome = prepared(traced.trace, outputs({ ...traced, cut: structure.cut }));
    const more = traced.trace.inputs.length - traced.inputs(randomCase(structure, 0)).length;
    for (let i = 0; i < 10; i++) {
      const figures = randomCase(structure, seed * 101 + i);
      const { values, queries } = outcome(
        ...traced.inputs(figures),
        ...new Array<number>(more).fill(figures.cut),
      );
      expect(queries).toEqual([]);
      check(values, figures, structure, `structure ${seed}, case ${i}`);
    }
  }
}

/** Places and forces of a case's loads, in plain numbers. */
function plainLoads(structure: Structure, { points, loads }: Case) {
  return loads.map(({ ratio, off, force }, i) => {
    const segment = structure.loads[i] as number;
    const [from, to] = [points[segment] as XY, points[segment + 1] as XY];
    const at = { x: from.x + (to.x - from.x) * ratio + off.x, y: from.y + (to.y - from.y) * ratio + off.y };
    return { at, force, left: segment <= structure.kneesLeft };
  });
}

const moment = (at: XY, about: XY, force: XY): number =>
  (at.x - about.x) * force.y - (at.y - about.y) * force.x;

function largestForce({ loads }: Case): number {
  return Math.max(...loads.map(({ force }) => Math.hypot(force.x, force.y)));
}

function reachOf({ points }: Case): number {
  return Math.hypot(
    (points.at(-1) as XY).x - (points[0] as XY).x,
    (points.at(-1) as XY).y - (points[0] as XY).y,
  );
}

describe('the reactions', () => {
  it('hold the whole arch and each of its halves in balance, in plain numbers', () => {
    let rounded = 0;
    each(
      60,
      {},
      ({ moment: { reactions: found } }) => [...flat(found.left, found.right, found.crown), found.residual],
      ([lx = 0, ly = 0, rx = 0, ry = 0, cx = 0, cy = 0, residual = Number.NaN], figures, structure, at) => {
        const loads = plainLoads(structure, figures);
        const [a, b] = [figures.points[0] as XY, figures.points.at(-1) as XY];
        const c = figures.points[structure.kneesLeft + 1] as XY;
        const sum = (
          which: (load: (typeof loads)[number]) => boolean,
          about: XY,
        ): [number, number, number] => {
          const of = loads.filter(which);
          return [
            of.reduce((total, { force }) => total + force.x, 0),
            of.reduce((total, { force }) => total + force.y, 0),
            of.reduce((total, one) => total + moment(one.at, about, one.force), 0),
          ];
        };
        const all = sum(() => true, a);
        const left = sum((load) => load.left, c);
        const right = sum((load) => !load.left, c);
        const gaps = [
          all[0] + lx + rx,
          all[1] + ly + ry,
          (all[2] + moment(b, a, { x: rx, y: ry })) / reachOf(figures),
          left[0] + lx + cx,
          left[1] + ly + cy,
          (left[2] + moment(a, c, { x: lx, y: ly })) / reachOf(figures),
          right[0] + rx - cx,
          right[1] + ry - cy,
          (right[2] + moment(b, c, { x: rx, y: ry })) / reachOf(figures),
          residual / reachOf(figures),
        ];
        if (residual !== 0) rounded += 1;
        // The crown is at least 0.12 of the span off the line of the springings: thrusts are some ten loads at most,
        // and so rounding of 1e-15 of those, with coordinates of a hundred metres beside spans of six.
        for (const [i, gap] of gaps.entries()) {
          expect(Math.abs(gap) / largestForce(figures), `${at}, sum ${i}`).toBeLessThan(1e-11);
        }
      },
    );
    // The residual is computed from other figures than the reactions, and so shows their rounding.
    expect(rounded).toBeGreaterThan(300);
  });

  it('are nothing without loads, and none of the loads at the hinges bends the arch', () => {
    const trace = new Trace();
    const arch = archThrough(
      keyPoints(trace, [
        ['springing', 0, 0],
        ['knee', 1, 5],
        ['crown', 10, 8],
        ['knee', 19, 5],
        ['springing', 21, 1],
      ]),
    );
    const at = (segment: number, ratio: number, x: number, y: number): PlacedLoad => {
      const place = placeOnSegment(arch, segment, trace.constant(ratio, NONE));
      return { at: place.point, place, force: { x: trace.constant(x, FORCE), y: trace.constant(y, FORCE) } };
    };
    const bare = reactions(arch, []);
    expect(prepared(trace, [...flat(bare.left, bare.right, bare.crown), bare.residual])().values).toEqual(
      new Array(7).fill(0),
    );
    // At the springings loads go straight into the ground, and so all sections stay as they are.
    const ends = forcesAlong(
      arch,
      [at(0, 0, 3e3, -5e3), at(3, 1, -2e3, -7e3)],
      stationsAlong(arch, 3).slice(1, -1),
    );
    const { values } = prepared(
      trace,
      ends.flatMap(({ axial, shear, moment: m }) => [axial, shear, m]),
    )();
    for (const value of values) expect(Math.abs(value)).toBeLessThan(1e-9);
  });
});

describe('the internal forces', () => {
  it('have the shear for the rate of change of the moment along the axis, on straight segments and on arcs', () => {
    for (const curved of [false, true]) {
      each(
        40,
        { curved },
        ({ trace, arch, loads, moment: { reactions: found }, cut }) => {
          const station = trace.input('station', NONE);
          const place = placeOnSegment(arch, cut, station);
          const { shear, moment: bending } = internalForces(arch, loads, found, place);
          const [perRatio, length] = derivative([bending, place.along], station) as [Scalar, Scalar];
          return [perRatio.over(length), shear];
        },
        ([rate = Number.NaN, shear = Number.NaN], figures, _, at) => {
          // Rounding of the thrust, which is some ten loads at most.
          expect(Math.abs(rate - shear) / largestForce(figures), at).toBeLessThan(1e-11);
        },
      );
    }
  });

  it('are the same counted from either end of the arch', () => {
    each(
      60,
      { found: false },
      ({ trace, arch, loads, cut, moment: { reactions: found } }) => {
        const place = placeOnSegment(arch, cut, trace.input('station', NONE));
        const { axial, shear, moment: bending } = internalForces(arch, loads, found, place);
        return [axial, shear, bending, ...flat(found.right, place.point, place.direction)];
      },
      ([N = 0, V = 0, M = 0, rx = 0, ry = 0, x = 0, y = 0, ux = 0, uy = 0], figures, structure, at) => {
        // All that acts to the right of the cut, with the right springing's reaction, in plain numbers.
        const loads = plainLoads(structure, figures).filter((_, i) => {
          const [segment, ratio] = [structure.loads[i] as number, figures.loads[i]?.ratio ?? 0];
          return segment > structure.cut || (segment === structure.cut && ratio >= figures.cut);
        });
        const all = [...loads, { at: figures.points.at(-1) as XY, force: { x: rx, y: ry } }];
        const [fx, fy] = [
          all.reduce((total, { force }) => total + force.x, 0),
          all.reduce((total, { force }) => total + force.y, 0),
        ];
        // It pulls on the cut along the axis; it pushes up across it against the shear; and it bends the intrados
        // into tension where it turns the right part anticlockwise about the cut.
        const wanted = [fx * ux + fy * uy, ux * -fy - uy * -fx, 0];
        wanted[2] = all.reduce((total, one) => total + moment(one.at, { x, y }, one.force), 0);
        const force = largestForce(figures);
        expect(Math.abs(N - (wanted[0] as number)) / force, `${at}, N`).toBeLessThan(1e-11);
        expect(Math.abs(V - (wanted[1] as number)) / force, `${at}, V`).toBeLessThan(1e-11);
        expect(Math.abs(M - wanted[2]) / force / reachOf(figures), `${at}, M`).toBeLessThan(1e-11);
      },
    );
  });

  it('jump at a load by its components, and the moment does not', () => {
    const trace = new Trace();
    const arch = archThrough(
      keyPoints(trace, [
        ['springing', 0, 0],
        ['crown', 8, 6],
        ['knee', 14, 4],
        ['springing', 16, 0],
      ]),
    );
    const place = placeOnSegment(arch, 0, trace.constant(0.4, NONE));
    const load = {
      at: place.point,
      place,
      force: { x: trace.constant(2e3, FORCE), y: trace.constant(-9e3, FORCE) },
    };
    const found = reactions(arch, [load]);
    const at = (ratio: number) =>
      internalForces(arch, [load], found, placeOnSegment(arch, 0, trace.constant(ratio, NONE)));
    const [before, here, after] = [at(0.4 - 1e-7), at(0.4), at(0.4 + 1e-7)];
    const { values } = prepared(trace, [
      after.axial.minus(before.axial),
      after.shear.minus(before.shear),
      after.moment.minus(before.moment),
      here.axial.minus(before.axial),
      here.shear.minus(before.shear),
    ])();
    // By hand, along (4, 3) / 5: 2 · 0.8 − 9 · 0.6 = −3.8 kN along the axis, so the tension grows by 3.8 kN; across
    // it −9 · 0.8 − 2 · 0.6 = −8.4 kN.
    expect(values[0]).toBeCloseTo(3.8e3, 8);
    expect(values[1]).toBeCloseTo(-8.4e3, 8);
    // 8 kN over two ten-millionths of 10 m.
    expect(Math.abs(values[2] as number)).toBeLessThan(0.03);
    // At the load itself the forces are those just before it.
    expect(values[3]).toBeCloseTo(0, 8);
    expect(values[4]).toBeCloseTo(0, 8);
  });

  it('have their signs: a strut is in compression, a sagging beam has its intrados in tension', () => {
    const trace = new Trace();
    const arch = archThrough(
      keyPoints(trace, [
        ['springing', 0, 0],
        ['knee', 0, 6],
        ['crown', 4, 6],
        ['knee', 8, 6],
        ['springing', 8, 0],
      ]),
    );
    const place = placeOnSegment(arch, 1, trace.constant(0.5, NONE));
    const down = {
      at: pointOf(trace, 2, 6),
      place,
      force: { x: trace.constant(0, FORCE), y: trace.constant(-12e3, FORCE) },
    };
    const [column, beam] = forcesAlong(
      arch,
      [down],
      [
        placeOnSegment(arch, 0, trace.constant(0.5, NONE)),
        placeOnSegment(arch, 1, trace.constant(0.25, NONE)),
      ],
    );
    const { values } = prepared(
      trace,
      [column, beam].flatMap((at) => (at ? [at.axial, at.shear, at.moment] : [])),
    )();
    // By hand: 9 kN up at the left, 3 kN at the right; thrust 3 kN · 4 / 6 = 2 kN. The column is bent outwards,
    // −2 · 3 at its middle; a metre along the beam −2 · 6 + 9 · 1.
    for (const [i, wanted] of [-9e3, -2e3, -6e3, -2e3, 9e3, -3e3].entries()) {
      expect(values[i]).toBeCloseTo(wanted, 9);
    }
  });

  it('of two sets of loads together are the sums of those of each', () => {
    const trace = new Trace();
    const arch = archThrough(
      keyPoints(trace, [
        ['springing', 0, 0],
        ['through', -0.4, 3],
        ['knee', 1, 6],
        ['crown', 11, 8],
        ['springing', 20, 1],
      ]),
    );
    const loads = [0, 1, 2].flatMap((segment) =>
      [0.25, 0.75].map((ratio, i): PlacedLoad => {
        const place = placeOnSegment(arch, segment, trace.constant(ratio, NONE));
        const [x, y] = [1e3 * (segment - i), -4e3 * (1 + segment * i)];
        return {
          at: place.point,
          place,
          force: { x: trace.constant(x, FORCE), y: trace.constant(y, FORCE) },
        };
      }),
    );
    const stations = stationsAlong(arch, 5);
    const forces = (which: readonly PlacedLoad[]): number[] => [
      ...evaluate(
        finish(
          trace,
          forcesAlong(arch, which, stations).flatMap(({ axial, shear, moment: m }) => [axial, shear, m]),
        ),
        [],
      ),
    ];
    const [some, others, all] = [forces(loads.slice(0, 3)), forces(loads.slice(3)), forces(loads)];
    for (const [i, value] of all.entries()) {
      expect(value).toBeCloseTo((some[i] as number) + (others[i] as number), 8);
    }
  });
});
