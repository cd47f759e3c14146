/** Floor 3: statics and kinematics of three-hinged arches, on scalars. Signs as the conventions have them. */
export {
  type Arch,
  archThrough,
  axisLength,
  crownStart,
  hingeRise,
  type KeyPoint,
  type Role,
  span,
} from './arch.ts';
export { type ArchMoment, archMoment } from './archMoment.ts';
export { type InternalForces, internalForces, type Reactions, reactions } from './equilibrium.ts';
export { type PlacedLoad, type PointLoad, placeLoads, type Resultant, resultant } from './load.ts';
export { type Mechanism, releaseMoment } from './mechanism.ts';
export {
  isBefore,
  isLeft,
  kneePlace,
  type Place,
  placeAlong,
  placeNearest,
  placeOnSegment,
} from './place.ts';
export { forcesAlong, shapePlaces, stationsAlong, towardsIntrados } from './stations.ts';
export { AT_HINGE, DEAD_POINT, HINGES_IN_LINE, OFF_AXIS, SAME_PLACE, UNMOVED } from './tolerance.ts';
export {
  negligibleDisplacement,
  type PerturbedState,
  type VirtualWorkMoment,
  virtualWorkMoment,
} from './virtualWork.ts';
