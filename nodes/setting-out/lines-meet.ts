import { linesMeet as meet } from '../../src/geometry/index.ts';
import { defineNode, input, output } from '../../src/graph/index.ts';
import { chord, point } from './kinds.ts';

export const linesMeet = defineNode({
  name: 'lines-meet',
  title: 'Intersection of two lines',
  band: 'setting-out',
  help: 'Where the lines through two chords meet; it may be beyond their ends.',
  inputs: { first: input(chord, 'First line'), second: input(chord, 'Second line') },
  outputs: { point: output(point, 'Point') },
  trace: ({ first, second }) => ({ point: meet(first, second) }),
  example: {
    inputs: {
      first: [
        ['0 m', '0 m'],
        ['2 m', '1 m'],
      ],
      second: [
        ['6 m', '0 m'],
        ['6 m', '1 m'],
      ],
    },
    gives: { point: ['6 m', '3 m'] },
  },
});
