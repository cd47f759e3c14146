import { pointOnArc as place } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { arc, point } from './kinds.ts';

export const pointOnArc = defineNode({
  name: 'point-on-arc',
  title: 'Point on arc',
  band: 'setting-out',
  help: 'The point at a ratio of the way along an arc: 0 at its first end, 1 at its last.',
  inputs: { arc: input(arc, 'Arc'), ratio: input(kinds.number, 'Ratio', '0.5') },
  outputs: { point: output(point, 'Point') },
  trace: ({ arc: curve, ratio }) => ({ point: place(curve, ratio) }),
  example: {
    inputs: {
      arc: [
        ['5 m', '0 m'],
        ['0 m', '5 m'],
        ['-5 m', '0 m'],
      ],
      ratio: '0.5',
    },
    gives: { point: ['0 m', '5 m'] },
  },
});
