import { defineKind, type Kind, type Literal } from '../../src/graph/index.ts';
import {
  type Arch,
  archThrough,
  type KeyPoint,
  type Place,
  placeAlong,
  type Role,
} from '../../src/mechanics/index.ts';
import type { Scalar } from '../../src/tape/index.ts';
import { readPoint } from '../setting-out/kinds.ts';

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
});

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

function readKeyPoint(literal: Literal, quantity: (text: Literal) => Scalar): KeyPoint {
  const [role = '', point = ''] = typeof literal === 'string' ? [] : literal;
  return { role: role as Role, point: readPoint(point, quantity) };
}

function readArch(literal: Literal, quantity: (text: Literal) => Scalar): Arch {
  const keyPoints = typeof literal === 'string' ? [] : literal;
  return archThrough(keyPoints.map((one) => readKeyPoint(one, quantity)));
}
