import type { Circle, Point, Vector } from '../../src/geometry/index.ts';
import { defineKind, type Figures, type Kind, type Literal, type XY } from '../../src/graph/index.ts';
import {
  type Arch,
  archThrough,
  type KeyPoint,
  type Place,
  placeAlong,
  type Role,
} from '../../src/mechanics/index.ts';
import type { Scalar } from '../../src/tape/index.ts';
import { pointsOfArc, readPoint } from '../setting-out/kinds.ts';

/** A point of an axis, with what the arch does there. */
export const keyPoint: Kind<KeyPoint> = defineKind<KeyPoint>({
  name: 'key point',
  called: 'a key point',
  line: 'structure',
  literal: readKeyPoint,
});

export const arch: Kind<Arch> = defineKind<Arch>({
  name: 'arch',
  called: 'an arch',
  line: 'structure',
  literal: readArch,
  draw: (figures) => [
    {
      mark: 'axis',
      points: axisPoints(figures),
      springings: [figures.left, figures.right],
      crown: figures.crown,
      knees: figures.keyPoints.filter(({ role }) => role === 'knee').map(({ point }) => point),
    },
  ],
});

/** Points along an axis, close enough to draw it by straight lines. */
export function axisPoints({ segments }: Figures<Arch>): XY[] {
  return segments.flatMap(({ from, to, arc }, i) => {
    const points = arc === undefined ? [from, to] : pointsOfArc(arc);
    return i === 0 ? points : points.slice(1);
  });
}

/** A place on the axis of an arch, with the arch. */
export interface Station {
  readonly arch: Arch;
  readonly place: Place;
}

export const station: Kind<Station> = defineKind<Station>({
  name: 'station',
  called: 'a station',
  line: 'structure',
  literal: (literal, quantity) => {
    const [of = '', along = ''] = typeof literal === 'string' ? [] : literal;
    const made = readArch(of, quantity);
    return { arch: made, place: placeAlong(made, quantity(along)) };
  },
});

/** The perturbed mechanism of an arch that is released at a cut. */
export interface MovedArch {
  /** Places of the axis as the mechanism has moved them, with their distance along it; in no order. */
  readonly points: readonly { readonly along: Scalar; readonly at: Point }[];
  readonly hinges: readonly Point[];
  readonly circles: readonly Circle[];
}

export const mechanism: Kind<MovedArch> = defineKind<MovedArch>({
  name: 'mechanism',
  called: 'a mechanism',
  line: 'virtual',
  draw: ({ points, hinges, circles }) => {
    const ordered = points.toSorted((a, b) => a.along - b.along);
    return [{ mark: 'mechanism', points: ordered.map(({ at }) => at), hinges, circles }];
  },
});

/** A reaction: a force at a hinge. */
export interface Reaction {
  readonly at: Point;
  readonly force: Vector;
}

export const reaction: Kind<Reaction> = defineKind<Reaction>({
  name: 'reaction',
  called: 'a reaction',
  line: 'results',
  draw: ({ at, force }) => [{ mark: 'reaction', at, force }],
});

/** Bending moments along an axis. */
export interface MomentLine {
  readonly points: readonly Point[];
  /** Unit normals towards the intrados. */
  readonly normals: readonly Vector[];
  readonly values: readonly Scalar[];
}

export const momentLine: Kind<MomentLine> = defineKind<MomentLine>({
  name: 'moment line',
  called: 'a moment line',
  line: 'results',
  draw: (figures) => [{ mark: 'moments', ...figures }],
});

/** An arch that stands again and again along a building. */
export interface Hall {
  readonly arch: Arch;
  readonly bays: number;
  readonly spacing: Scalar;
  readonly depth: Scalar;
  readonly breadth: Scalar;
  readonly purlins: readonly Point[];
}

export const hall: Kind<Hall> = defineKind<Hall>({
  name: 'hall',
  called: 'a hall',
  line: 'structure',
  draw: ({ arch: of, bays, spacing, depth, breadth, purlins }) => [
    { mark: 'hall', points: axisPoints(of), bays, spacing, depth, breadth, purlins },
  ],
});

function readKeyPoint(literal: Literal, quantity: (text: Literal) => Scalar): KeyPoint {
  const [role = '', point = ''] = typeof literal === 'string' ? [] : literal;
  return { role: role as Role, point: readPoint(point, quantity) };
}

function readArch(literal: Literal, quantity: (text: Literal) => Scalar): Arch {
  const keyPoints = typeof literal === 'string' ? [] : literal;
  return archThrough(keyPoints.map((one) => readKeyPoint(one, quantity)));
}
