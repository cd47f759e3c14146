import { cross, type Point, subtract, type Vector } from '../geometry/index.ts';
import { FORCE, MOMENT } from '../quantity/index.ts';
import { type Condition, guard, type Scalar, say, sum } from '../tape/index.ts';
import { type Arch, axisLength } from './arch.ts';
import { type Place, placeNearest } from './place.ts';
import { OFF_AXIS } from './tolerance.ts';

/** A force at a point, in the plane of the arch. Gravity points down: its y is negative. */
export interface PointLoad {
  readonly at: Point;
  readonly force: Vector;
  /** Where on the arch a load off its axis is tied, by a rigid arm. Without it the load stands on the axis. */
  readonly tiedTo?: Point;
}

/** A load with the place of the arch that carries it. */
export interface PlacedLoad {
  readonly at: Point;
  readonly force: Vector;
  readonly place: Place;
}

/**
 * Finds where on the arch each load is carried: at its tie, or where it stands. A query where a load that is
 * not tied stands off the axis, or a tie lies off it.
 */
export function placeLoads(arch: Arch, loads: readonly PointLoad[]): PlacedLoad[] {
  return loads.map((load, i) => {
    const { place, off } = placeNearest(arch, load.tiedTo ?? load.at);
    const near = off.atMost(axisLength(arch).times(OFF_AXIS));
    const remedy =
      load.tiedTo === undefined
        ? 'move it onto the axis, or say which point of the axis it is tied to'
        : 'tie it to a point on the axis';
    const which = load.tiedTo === undefined ? `Load ${i + 1} stands` : `The tie of load ${i + 1} lies`;
    const along = guard(place.along, near, say('load-off-axis')`${which} ${off} off the axis: ${remedy}`);
    return { at: load.at, force: load.force, place: { ...place, along } };
  });
}

/** The resultant of loads: their force, and their moment about a point, anticlockwise positive. */
export interface Resultant {
  readonly force: Vector;
  readonly moment: Scalar;
}

/**
 * The resultant, about a point, of those loads for which a condition holds.
 *
 * Loads of which that is known while tracing are summed first: that sum is the same for all stations of a
 * segment, and so is computed once.
 */
export function resultant(
  loads: readonly PlacedLoad[],
  about: Point,
  which: (load: PlacedLoad) => Condition,
): Resultant {
  const { trace } = about.x;
  const counted = loads.map((load) => ({ load, share: which(load).scalar }));
  const isKnown = ({ share }: { readonly share: Scalar }) => trace.constantAt(share.index) !== undefined;
  const parts = [...counted.filter(isKnown), ...counted.filter((one) => !isKnown(one))].map(
    ({ load, share }) => ({
      x: load.force.x.times(share),
      y: load.force.y.times(share),
      moment: cross(subtract(load.at, about), load.force).times(share),
    }),
  );
  const [noForce, noMoment] = [trace.constant(0, FORCE), trace.constant(0, MOMENT)];
  return {
    force: {
      x: sum([noForce, ...parts.map(({ x }) => x)]),
      y: sum([noForce, ...parts.map(({ y }) => y)]),
    },
    moment: sum([noMoment, ...parts.map(({ moment }) => moment)]),
  };
}
