import { lengthOf } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { point } from './kinds.ts';

export const distance = defineNode({
  name: 'distance',
  title: 'Distance',
  band: 'setting-out',
  help: 'How far one point is from another: straight, across and up.',
  inputs: { from: input(point, 'From'), to: input(point, 'To') },
  outputs: {
    distance: output(kinds.length, 'Distance'),
    across: output(kinds.length, 'Across'),
    up: output(kinds.length, 'Up'),
  },
  trace: ({ from, to }) => ({
    distance: lengthOf({ from, to }),
    across: to.x.minus(from.x),
    up: to.y.minus(from.y),
  }),
  example: {
    inputs: { from: ['1 m', '1 m'], to: ['4 m', '-3 m'] },
    gives: { distance: '5 m', across: '3 m', up: '-4 m' },
  },
});
