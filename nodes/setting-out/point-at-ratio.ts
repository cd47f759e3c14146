import { between } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { chord, point } from './kinds.ts';

export const pointAtRatio = defineNode({
  name: 'point-at-ratio',
  title: 'Point on chord by ratio',
  band: 'setting-out',
  help: 'The point at a ratio of the way along a chord: 0 at its first end, 1 at its second.',
  inputs: { chord: input(chord, 'Chord'), ratio: input(kinds.number, 'Ratio', '0.5') },
  outputs: { point: output(point, 'Point') },
  trace: ({ chord: { from, to }, ratio }) => ({ point: between(from, to, ratio) }),
  example: {
    inputs: {
      chord: [
        ['0 m', '0 m'],
        ['8 m', '6 m'],
      ],
      ratio: '0.25',
    },
    gives: { point: ['2 m', '1.5 m'] },
  },
});
