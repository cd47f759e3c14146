import { angleFrom, directionOf } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { chord } from './kinds.ts';

export const angleBetween = defineNode({
  name: 'angle-between',
  title: 'Angle between chords',
  band: 'setting-out',
  help: 'The angle from the direction of one chord to that of another, anticlockwise, between −180° and 180°.',
  inputs: { first: input(chord, 'First chord'), second: input(chord, 'Second chord') },
  outputs: { angle: output(kinds.angle, 'Angle') },
  trace: ({ first, second }) => ({ angle: angleFrom(directionOf(first), directionOf(second)) }),
  example: {
    inputs: {
      first: [
        ['0 m', '0 m'],
        ['2 m', '0 m'],
      ],
      second: [
        ['0 m', '0 m'],
        ['1 m', '1 m'],
      ],
    },
    gives: { angle: '45°' },
  },
});
