import { defineKind, type Kind } from '../../src/graph/index.ts';
import type { PointLoad } from '../../src/mechanics/index.ts';
import { readPoint } from '../setting-out/kinds.ts';

/** A force at a point, with the point of the axis that it is tied to where it stands off it. */
export const load: Kind<PointLoad> = defineKind<PointLoad>({
  name: 'load',
  called: 'a load',
  line: 'structure',
  literal: (literal, quantity) => {
    const [at = '', force = ''] = typeof literal === 'string' ? [] : literal;
    return { at: readPoint(at, quantity), force: readPoint(force, quantity) };
  },
  draw: ({ at, force, tiedTo }) => [
    { mark: 'load', at, force, ...(tiedTo === undefined ? {} : { tie: tiedTo }) },
  ],
});
