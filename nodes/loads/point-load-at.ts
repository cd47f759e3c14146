import type { Point, Vector } from '../../src/geometry/index.ts';
import type { PointLoad } from '../../src/mechanics/index.ts';

/** A load with its tie only where there is one. */
export function pointLoadAt(at: Point, force: Vector, tiedTo: Point | undefined): PointLoad {
  return { at, force, ...(tiedTo === undefined ? {} : { tiedTo }) };
}
