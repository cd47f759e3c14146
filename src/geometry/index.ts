/** Floor 2: plane geometry on scalars. Points in metres, angles in radians, anticlockwise from +x. */
export { type Arc, arcLength, arcThrough, chordOf, directionOnArc, nearestOnArc, pointOnArc } from './arc.ts';
export { type Chord, chordFrom, directionOf, inclinationOf, lengthOf, pointAlong } from './chord.ts';
export { type Circle, circle, circleThrough } from './circle.ts';
export { type Branch, circleMeetsLine, circlesMeet, type LineBranch, linesMeet } from './intersection.ts';
export {
  chooseMotion,
  type Motion,
  mirrored,
  motionBetween,
  moved,
  turnAbout,
  turned,
  turnOf,
} from './motion.ts';
export { arcSegment, type Segment, straightSegment } from './segment.ts';
export { COINCIDENT, GRAZING, PARALLEL, RIGID, TOUCHING } from './tolerance.ts';
export {
  add,
  angleFrom,
  between,
  chooseVector,
  cross,
  distance,
  dot,
  magnitude,
  type Point,
  pointOf,
  reverse,
  scale,
  subtract,
  turnLeft,
  type Vector,
  zeroVector,
} from './vector.ts';
