import {
  arcSegment,
  COINCIDENT,
  cross,
  distance,
  type Point,
  type Segment,
  straightSegment,
  subtract,
} from '../geometry/index.ts';
import { LENGTH } from '../quantity/index.ts';
import { guard, Refusal, type Scalar, say } from '../tape/index.ts';
import { HINGES_IN_LINE } from './tolerance.ts';

/** What a point on an axis is: where the arch is pinned, bends, hinges, or only passes through on an arc. */
export type Role = 'springing' | 'knee' | 'through' | 'crown';

export interface KeyPoint {
  readonly role: Role;
  readonly point: Point;
}

/** A three-hinged arch: two rigid halves, hinged at the springings and at the crown. */
export interface Arch {
  readonly keyPoints: readonly KeyPoint[];
  /** Straight or circular, from the left springing to the right one. */
  readonly segments: readonly Segment[];
  /** How many of the segments belong to the left half. */
  readonly leftSegments: number;
  /** Distance along the axis from the left springing to the beginning of each segment; one more for the end. */
  readonly starts: readonly Scalar[];
  readonly left: Point;
  readonly crown: Point;
  readonly right: Point;
}

/**
 * The arch through ordered key points: springing, any number of knees, crown, any number of knees, springing.
 * A `through` point between two of them makes their segment the arc through it.
 *
 * @throws Refusal where the order is not that of an arch.
 */
export function archThrough(keyPoints: readonly KeyPoint[]): Arch {
  checkOrder(keyPoints.map(({ role }) => role));
  const segments: Segment[] = [];
  let leftSegments = 0;
  let from: Point | undefined;
  let through: Point | undefined;
  for (const { role, point } of keyPoints) {
    if (role === 'through') {
      through = point;
      continue;
    }
    if (from !== undefined) {
      segments.push(through === undefined ? straightSegment(from, point) : arcSegment(from, through, point));
    }
    if (role === 'crown') leftSegments = segments.length;
    from = point;
    through = undefined;
  }
  const [first, last] = [keyPoints[0], keyPoints.at(-1)];
  const crown = keyPoints.find(({ role }) => role === 'crown');
  if (first === undefined || last === undefined || crown === undefined) throw new Error('order was checked');
  const starts = [first.point.x.trace.constant(0, LENGTH)];
  for (const segment of segments) starts.push((starts.at(-1) as Scalar).plus(segment.length));
  return {
    keyPoints,
    segments,
    leftSegments,
    starts,
    left: first.point,
    crown: crown.point,
    right: last.point,
  };
}

/** The length of the axis from springing to springing. */
export function axisLength(arch: Arch): Scalar {
  return arch.starts.at(-1) as Scalar;
}

/** Distance along the axis from the left springing to the crown hinge. */
export function crownStart(arch: Arch): Scalar {
  return arch.starts[arch.leftSegments] as Scalar;
}

/** The span: the distance of the springings on plan. */
export function span(arch: Arch): Scalar {
  return arch.right.x.minus(arch.left.x).absolute();
}

/** By how much the crown hinge lies off the line of the springings: 0 is a mechanism. Positive above the line. */
export function hingeRise(arch: Arch): Scalar {
  const base = subtract(arch.right, arch.left);
  return cross(base, subtract(arch.crown, arch.left)).over(springingDistance(arch));
}

/** The distance of the springings, guarded: where they are at one place there is no line for a crown to be off. */
function springingDistance({ left, right }: Arch): Scalar {
  const apart = distance(left, right);
  return guard(
    apart,
    apart.above(apart.trace.constant(COINCIDENT, LENGTH)),
    say('springings-coincide')`The two springings are at one place (${apart} apart): move one of them`,
  );
}

/**
 * Passes a value on where the arch has stiffness: a query where its three hinges lie on one line.
 */
export function whereStiff(arch: Arch, value: Scalar): Scalar {
  const off = hingeRise(arch).absolute();
  return guard(
    value,
    off.above(springingDistance(arch).times(HINGES_IN_LINE)),
    say(
      'hinges-in-line',
    )`The three hinges lie on one line (the crown is ${off} off it): the arch has no stiffness against loads across it. Raise or lower the crown`,
  );
}

function checkOrder(roles: readonly Role[]): void {
  const refuse = (message: string): never => {
    throw new Refusal('axis-order', message);
  };
  if (roles.length < 3) {
    refuse(
      `an axis needs a springing, a crown and a springing at least, and has ${count(roles.length, 'key point')}: link more`,
    );
  }
  if (roles[0] !== 'springing' || roles.at(-1) !== 'springing') {
    const which = roles[0] !== 'springing' ? `first key point is a ${roles[0]}` : `last is a ${roles.at(-1)}`;
    refuse(`an axis runs from springing to springing, but its ${which}: put the key points in order`);
  }
  const inner = roles.slice(1, -1);
  const crowns = inner.filter((role) => role === 'crown').length;
  if (crowns !== 1) refuse(`an axis has one crown, not ${crowns}: a rigid corner is a knee`);
  const springings = inner.filter((role) => role === 'springing').length;
  if (springings > 0) refuse('a springing stands between the ends of the axis: make it a knee');
  const doubled = roles.findIndex((role, i) => role === 'through' && roles[i + 1] === 'through');
  if (doubled !== -1) {
    refuse(
      `key points ${doubled + 1} and ${doubled + 2} both say where an arc passes: one is enough, put a knee between them`,
    );
  }
}

function count(n: number, what: string): string {
  return `${n === 0 ? 'no' : n} ${what}${n === 1 ? '' : 's'}`;
}
