import type { Scalar } from '../tape/index.ts';
import { type Arch, axisLength } from './arch.ts';
import { type InternalForces, internalForces, type Reactions, reactions } from './equilibrium.ts';
import type { PlacedLoad } from './load.ts';
import { type Mechanism, releaseMoment } from './mechanism.ts';
import type { Place } from './place.ts';
import { UNMOVED } from './tolerance.ts';
import { type VirtualWorkMoment, virtualWorkMoment } from './virtualWork.ts';

/** The moment at a cut of an arch, by both routes. */
export interface ArchMoment {
  readonly mechanism: Mechanism;
  readonly virtualWork: VirtualWorkMoment;
  readonly reactions: Reactions;
  readonly forces: InternalForces;
  /** Virtual work less equilibrium: 0 but for rounding. */
  readonly difference: Scalar;
}

/**
 * The bending moment at a cut of an arch under point loads, by virtual work and by equilibrium. The two have
 * nothing in common but the geometry.
 *
 * @param perturbation the turn that drives the mechanism: a variable of its own (`Trace.mark`).
 */
export function archMoment(
  arch: Arch,
  loads: readonly PlacedLoad[],
  cut: Place,
  perturbation: Scalar,
): ArchMoment {
  const mechanism = releaseMoment(arch, cut, perturbation);
  const virtualWork = virtualWorkMoment({
    perturbation,
    loads,
    moved: loads.map((load) => mechanism.move(load)),
    closing: mechanism.closing,
    negligible: axisLength(arch).times(UNMOVED),
  });
  const found = reactions(arch, loads);
  const forces = internalForces(arch, loads, found, cut);
  return {
    mechanism,
    virtualWork,
    reactions: found,
    forces,
    difference: virtualWork.limit.minus(forces.moment),
  };
}
