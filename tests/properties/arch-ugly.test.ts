import { describe, expect, it } from 'vitest';
import { cross, subtract } from '../../src/geometry/index.ts';
import { internalForces, type Place, placeOnSegment } from '../../src/mechanics/index.ts';
import { NONE } from '../../src/quantity/index.ts';
import {
  Block,
  evaluate,
  failedGuards,
  finish,
  queryText,
  registersFor,
  run,
  type Scalar,
} from '../../src/tape/index.ts';
import { type Case, frameOf, type Structure, type TracedArch, traceStructure } from '../support/arches.ts';
import { solveFrame, type XY } from '../support/frame.ts';
import { everyStructure, UGLINESS, type Ugliness, uglyCase } from '../support/uglyArches.ts';

const CASES = 64;

/**
 * The largest moment of an arch: at both sides of each load, at each knee and at stations between. Between loads on
 * straight segments the moment runs straight; on arcs the true largest may be more, which only makes it stricter.
 */
function largestMoment({ trace, arch, loads, moment }: TracedArch): Scalar {
  const at = (place: Place): Scalar => internalForces(arch, loads, moment.reactions, place).moment;
  const stations = arch.segments.flatMap((segment, i) =>
    (segment.arc === undefined ? [1] : [0.25, 0.5, 0.75, 1]).map((ratio) =>
      at(placeOnSegment(arch, i, trace.constant(ratio, NONE))),
    ),
  );
  const atLoads = loads.flatMap((load) => {
    const before = at(load.place);
    return [before, before.minus(cross(subtract(load.at, load.place.point), load.force))];
  });
  return [...stations, ...atLoads, moment.forces.moment]
    .map((one) => one.absolute())
    .reduce((most, one) => most.most(one));
}

interface Worst {
  share: number;
  at: string;
}

/** The worst difference of the two routes over structures and cases, as a share of each arch's own largest moment. */
function worstOf(ugliness: Ugliness, structures: readonly Structure[], seed: number): Worst {
  const worst: Worst = { share: 0, at: '' };
  for (const [s, structure] of structures.entries()) {
    const traced = traceStructure(structure);
    const { virtualWork, forces } = traced.moment;
    const tape = finish(traced.trace, [virtualWork.limit, forces.moment, largestMoment(traced)]);
    const cases = Array.from({ length: CASES }, (_, i) =>
      uglyCase(ugliness, structure, seed + s * CASES + i),
    );
    const inputs = cases.map((figures) => traced.inputs(figures));
    const columns = tape.inputs.map((_, k) => inputs.map((one) => one[k] as number));
    const [limits, moments, largest] = new Block(tape, CASES).run(columns, CASES) as [
      Float64Array,
      Float64Array,
      Float64Array,
    ];
    for (let i = 0; i < CASES; i++) {
      const share = Math.abs((limits[i] as number) - (moments[i] as number)) / (largest[i] as number);
      if (share <= worst.share) continue;
      const at = `seed ${seed + s * CASES + i} of ${JSON.stringify(structure)}`;
      if (Number.isFinite(share)) Object.assign(worst, { share, at });
      else throw new Error(`${at} has no moment: ${queriesOf(tape, inputs[i] as number[])}`);
    }
  }
  return worst;
}

function queriesOf(tape: ReturnType<typeof finish>, inputs: readonly number[]): string {
  const registers = registersFor(tape);
  run(tape, inputs, registers);
  return failedGuards(tape, registers)
    .map((query) => queryText(query))
    .join('; ');
}

describe('both routes to a moment agree to 1e-10 of the largest one', () => {
  it.each(UGLINESS)('on 1,024 arches $name', (ugliness) => {
    const { share, at } = worstOf(ugliness, everyStructure(1), 10_000);
    expect(share, at).toBeLessThan(1e-10);
  });

  it.each(UGLINESS)('on 1,024 arches of arcs, $name', (ugliness) => {
    const { share, at } = worstOf(ugliness, everyStructure(2, { curved: true }), 20_000);
    expect(share, at).toBeLessThan(1e-10);
  });

  it.each(UGLINESS)('on 1,024 arches $name, where loads and cut are found by nearness', (ugliness) => {
    const { share, at } = worstOf(ugliness, everyStructure(3, { found: true }), 30_000);
    expect(share, at).toBeLessThan(1e-10);
  });
});

/** Loads in sixteenths of a segment and the cut between two of them, so that no bar of the frame is very short. */
function inSixteenths(figures: Case): Case {
  const sixteenth = (ratio: number): number => 1 + Math.round(ratio * 14);
  return {
    ...figures,
    loads: figures.loads.map((load) => ({ ...load, ratio: sixteenth(load.ratio) / 16 })),
    cut: (sixteenth(figures.cut) - 0.5) / 16,
  };
}

describe('the independent plane-frame solution', () => {
  // Knees that almost meet give very short bars beside long ones, and very flat arches very large displacements: both
  // spoil the stiffness equations, not the arch.
  const fair = UGLINESS.filter(({ name }) => !/^(flat|with knees close|with the crown close)/.test(name));

  it.each(fair)('gives the same reactions, N, V and M to 1e-8 on 96 arches $name', (ugliness) => {
    const worst: Worst = { share: 0, at: '' };
    for (const [s, structure] of everyStructure(4).entries()) {
      const traced = traceStructure(structure);
      const { reactions, forces, virtualWork } = traced.moment;
      const tape = finish(traced.trace, [
        reactions.left.x,
        reactions.left.y,
        reactions.right.x,
        reactions.right.y,
        forces.axial,
        forces.shear,
        forces.moment,
        virtualWork.limit,
      ]);
      for (let i = 0; i < 6; i++) {
        const seed = 40_000 + s * 6 + i;
        const figures = inSixteenths(uglyCase(ugliness, structure, seed));
        const ours = evaluate(tape, traced.inputs(figures));
        const { arch, loads } = frameOf(structure, figures);
        const { left, right, cuts } = solveFrame(arch, loads, [
          { segment: structure.cut, ratio: figures.cut },
        ]);
        const { N, V, M } = cuts[0] as (typeof cuts)[number];
        const force = Math.max(...loads.map((load) => Math.hypot(load.force.x, load.force.y)));
        const reach = Math.max(
          ...figures.points.map(({ x, y }) =>
            Math.hypot(x - (figures.points[0] as XY).x, y - (figures.points[0] as XY).y),
          ),
        );
        for (const [k, theirs] of [left.x, left.y, right.x, right.y, N, V, M, M].entries()) {
          const share = Math.abs((ours[k] as number) - theirs) / (k < 6 ? force : force * reach);
          if (!(share <= worst.share))
            Object.assign(worst, { share, at: `seed ${seed}, figure ${k}, ${JSON.stringify(structure)}` });
        }
      }
    }
    expect(worst.share, worst.at).toBeLessThan(1e-8);
  });
});
