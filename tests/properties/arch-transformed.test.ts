import { describe, expect, it } from 'vitest';
import { finish, registersFor, run } from '../../src/tape/index.ts';
import { type Case, randomCase, randomStructure, type Structure, traceStructure } from '../support/arches.ts';
import type { XY } from '../support/frame.ts';
import { TRANSFORMATIONS, type Transformation } from '../support/plane.ts';
import { UGLINESS, uglyCase } from '../support/uglyArches.ts';

/** Limit, equilibrium, finite value, N, V, reactions at the left and at the right. */
const FIGURES = 9;

/** As the two routes have to agree, of the largest force and of that times the span. */
const AGREEMENT = 1e-10;

/** A structure on a tape, run at many cases. */
function reader(structure: Structure): (figures: Case) => number[] {
  const { trace, moment, inputs } = traceStructure(structure);
  const { virtualWork, forces, reactions } = moment;
  const tape = finish(trace, [
    virtualWork.limit,
    forces.moment,
    virtualWork.finite,
    forces.axial,
    forces.shear,
    reactions.left.x,
    reactions.left.y,
    reactions.right.x,
    reactions.right.y,
  ]);
  const registers = registersFor(tape);
  return (figures) => {
    run(tape, inputs(figures), registers);
    return Array.from(tape.outputs, (register) => registers[register] as number);
  };
}

/** The structure walked from its other end, as a mirror leaves it. */
function fromOtherEnd(structure: Structure): Structure {
  const last = structure.kneesLeft + structure.kneesRight + 1;
  return {
    ...structure,
    kneesLeft: structure.kneesRight,
    kneesRight: structure.kneesLeft,
    loads: structure.loads.map((segment) => last - segment),
    cut: last - structure.cut,
  };
}

function transformed({ point, vector, stretch, flips }: Transformation, figures: Case): Case {
  const end = <T>(list: readonly T[]): readonly T[] => (flips ? [...list].reverse() : list);
  const ratio = (one: number): number => (flips ? 1 - one : one);
  return {
    points: end(figures.points.map(point)),
    through: end(figures.through.map(point)),
    loads: figures.loads.map((load) => {
      const off = vector(load.off);
      return {
        ratio: ratio(load.ratio),
        off: { x: off.x * stretch, y: off.y * stretch },
        force: vector(load.force),
      };
    }),
    cut: ratio(figures.cut),
    perturbation: figures.perturbation,
  };
}

/** What the figures of the transformed arch must be. */
function wanted({ vector, stretch, flips }: Transformation, plain: readonly number[]): number[] {
  const [limit = 0, moment = 0, finite = 0, N = 0, V = 0, lx = 0, ly = 0, rx = 0, ry = 0] = plain;
  const [left, right] = [vector({ x: lx, y: ly }), vector({ x: rx, y: ry })];
  const [first, second] = flips ? [right, left] : [left, right];
  // Walked from the other end, the moment rises where it fell.
  const shear = flips ? -V : V;
  return [
    limit * stretch,
    moment * stretch,
    // In a mirror the mechanism is driven from the other springing, and at a finite turn that is another position.
    flips ? Number.NaN : finite * stretch,
    N,
    shear,
    first.x,
    first.y,
    second.x,
    second.y,
  ];
}

describe.each(TRANSFORMATIONS)('an arch with its loads, $name,', (transformation) => {
  it.each([
    ['of straight segments', false],
    ['of arcs', true],
  ] as const)('%s has the same moments, forces and reactions, transformed with it', (_, curved) => {
    let worst = { share: 0, at: '' };
    let finite = 0;
    for (let s = 0; s < 16; s++) {
      const structure = randomStructure(6000 + s, { curved });
      const plain = reader(structure);
      const other = transformation.flips ? reader(fromOtherEnd(structure)) : plain;
      for (let i = 0; i < 32; i++) {
        const seed = s * 32 + i;
        // Every other arch is one that nobody would draw.
        const ugliness = UGLINESS[i % UGLINESS.length] as (typeof UGLINESS)[number];
        const drawn = i % 2 === 0 ? randomCase(structure, seed) : uglyCase(ugliness, structure, seed);
        const figures = { ...drawn, perturbation: 1e-3 };
        const found = other(transformed(transformation, figures));
        const before = plain(figures);
        const should = wanted(transformation, before);
        const [first, last] = [figures.points[0] as XY, figures.points.at(-1) as XY];
        const force = Math.max(
          ...figures.loads.map((load) => Math.hypot(load.force.x, load.force.y)),
          ...before.slice(3).map(Math.abs),
        );
        const reach = Math.hypot(last.x - first.x, last.y - first.y) * transformation.stretch;
        for (let k = 0; k < FIGURES; k++) {
          const [value, target] = [found[k] as number, should[k] as number];
          if (k === 2) {
            // The finite value waits where the mechanism can't follow; then it waits in both.
            if (!Number.isFinite(target)) continue;
            finite += 1;
          }
          const scale = k < 3 ? Math.max(force * reach, Math.abs(target)) : force;
          // On a site at 100 km coordinates are rounded to 1.5e-11 m, and at a finite turn of 1e-3 the displacements
          // are a thousandth of the span: so much is lost before anything is computed.
          const rounding = (100 * 2 ** -52 * transformation.reach) / reach;
          const lost = 1 + (k === 2 ? rounding / figures.perturbation : rounding) / AGREEMENT;
          const share = Math.abs(value - target) / scale / lost;
          if (!(share <= worst.share)) worst = { share, at: `structure ${s}, case ${i}, figure ${k}` };
        }
      }
    }
    if (!transformation.flips) expect(finite).toBeGreaterThan(200);
    expect(worst.share, worst.at).toBeLessThan(AGREEMENT);
  });
});
