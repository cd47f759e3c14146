import { defineNode, input, kinds, optional, output } from '../../src/graph/index.ts';
import { point } from '../setting-out/kinds.ts';
import { load } from './kinds.ts';
import { pointLoadAt } from './point-load-at.ts';

export const pointLoad = defineNode({
  name: 'point-load',
  title: 'Point load',
  band: 'loads',
  help: 'A force at a point, from its components: to the right and up are positive, so that a weight is negative. A load off the axis is tied to a point of it.',
  inputs: {
    at: input(point, 'At'),
    across: input(kinds.force, 'Across', '0 kN'),
    up: input(kinds.force, 'Up', '-10 kN'),
    tiedTo: optional(point, 'Tied to'),
  },
  outputs: { load: output(load, 'Load') },
  trace: ({ at, across, up, tiedTo }) => ({ load: pointLoadAt(at, { x: across, y: up }, tiedTo) }),
  example: {
    inputs: { at: ['4 m', '6 m'], across: '3 kN', up: '-20 kN' },
    gives: {
      load: [
        ['4 m', '6 m'],
        ['3 kN', '-20 kN'],
      ],
    },
  },
});
