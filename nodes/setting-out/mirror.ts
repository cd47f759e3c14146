import { mirrored } from '../../src/geometry/index.ts';
import { defineNode, input, output } from '../../src/graph/index.ts';
import { chord, point } from './kinds.ts';

export const mirror = defineNode({
  name: 'mirror',
  title: 'Mirror',
  band: 'setting-out',
  help: 'A point mirrored at the line through a chord.',
  inputs: { point: input(point, 'Point'), line: input(chord, 'Line') },
  outputs: { point: output(point, 'Mirrored point') },
  trace: ({ point: from, line }) => ({ point: mirrored(from, line) }),
  example: {
    inputs: {
      point: ['2 m', '5 m'],
      line: [
        ['6 m', '0 m'],
        ['6 m', '3 m'],
      ],
    },
    gives: { point: ['10 m', '5 m'] },
  },
});
