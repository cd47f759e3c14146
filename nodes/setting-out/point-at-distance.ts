import { pointAlong } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { chord, point } from './kinds.ts';

export const pointAtDistance = defineNode({
  name: 'point-at-distance',
  title: 'Point on chord by distance',
  band: 'setting-out',
  help: 'The point at a distance along a chord from its first end; it may lie beyond either end.',
  inputs: { chord: input(chord, 'Chord'), distance: input(kinds.length, 'Distance', '1 m') },
  outputs: { point: output(point, 'Point') },
  trace: ({ chord: line, distance }) => ({ point: pointAlong(line, distance) }),
  example: {
    inputs: {
      chord: [
        ['0 m', '0 m'],
        ['8 m', '6 m'],
      ],
      distance: '5 m',
    },
    gives: { point: ['4 m', '3 m'] },
  },
});
