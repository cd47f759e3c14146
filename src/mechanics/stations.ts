import type { Vector } from '../geometry/index.ts';
import { NONE } from '../quantity/index.ts';
import type { Arch } from './arch.ts';
import { type InternalForces, internalForces, reactions } from './equilibrium.ts';
import type { PlacedLoad } from './load.ts';
import { type Place, placeOnSegment } from './place.ts';

/** Places along the whole axis, `each` steps to a segment, both ends of every segment among them. */
export function stationsAlong(arch: Arch, each: number): Place[] {
  return arch.segments.flatMap((_, segment) => stepsOn(arch, segment, each));
}

/** Places along the whole axis from which its shape can be drawn by straight lines. */
export function shapePlaces(arch: Arch): Place[] {
  return arch.segments.flatMap(({ arc }, segment) => stepsOn(arch, segment, arc === undefined ? 1 : 16));
}

function stepsOn(arch: Arch, segment: number, steps: number): Place[] {
  const { trace } = arch.left.x;
  return Array.from({ length: steps + 1 }, (_, i) =>
    placeOnSegment(arch, segment, trace.constant(i / steps, NONE)),
  );
}

/** The internal forces at each of several places. */
export function forcesAlong(
  arch: Arch,
  loads: readonly PlacedLoad[],
  places: readonly Place[],
): InternalForces[] {
  const found = reactions(arch, loads);
  return places.map((place) => internalForces(arch, loads, found, place));
}

/** The normal of the axis at a place, towards the intrados: to the right of the way from left to right. */
export function towardsIntrados({ direction }: Place): Vector {
  return { x: direction.y, y: direction.x.negated() };
}
