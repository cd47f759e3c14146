import {
  archMoment,
  archThrough,
  internalForces,
  kneePlace,
  type PlacedLoad,
  placeOnSegment,
  type Role,
} from '../../../src/mechanics/index.ts';
import { FORCE, LENGTH, NONE } from '../../../src/quantity/index.ts';
import { type Scalar, Trace } from '../../../src/tape/index.ts';
import { KEY_POINTS, LOADS, STATIONS } from './case.ts';

const ROLES: readonly Role[] = ['springing', 'knee', 'crown', 'knee', 'springing'];

/** The reference arch on a trace: its inputs in the order of `INPUTS`, and all that is read. */
export function traceReference(): {
  readonly trace: Trace;
  readonly inputs: readonly Scalar[];
  readonly outputs: readonly Scalar[];
  readonly kneeMoment: Scalar;
} {
  const trace = new Trace();
  const inputs: Scalar[] = [];
  const read = (dimension: Parameters<Trace['input']>[1]): Scalar => {
    const made = trace.input(`input ${inputs.length}`, dimension);
    inputs.push(made);
    return made;
  };
  const arch = archThrough(
    KEY_POINTS.map((_, i) => ({
      role: ROLES[i] as Role,
      point: { x: read(LENGTH), y: read(LENGTH) },
    })),
  );
  const loads: PlacedLoad[] = LOADS.map(([segment]) => {
    const place = placeOnSegment(arch, segment, read(NONE));
    return { at: place.point, force: { x: read(FORCE), y: read(FORCE) }, place };
  });
  const knee = archMoment(arch, loads, kneePlace(arch, 1), trace.mark(read(NONE)));
  const forces = STATIONS.map(([segment, ratio]) =>
    internalForces(arch, loads, knee.reactions, placeOnSegment(arch, segment, trace.constant(ratio, NONE))),
  );
  const { left, right, crown, residual } = knee.reactions;
  const outputs = [
    knee.virtualWork.limit,
    knee.virtualWork.finite,
    knee.forces.moment,
    knee.difference,
    left.x,
    left.y,
    right.x,
    right.y,
    crown.x,
    crown.y,
    residual,
    ...forces.flatMap(({ axial, shear, moment }) => [axial, shear, moment]),
  ];
  return { trace, inputs, outputs, kneeMoment: knee.virtualWork.limit };
}
