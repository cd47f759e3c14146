import { defineNode, input, kinds, optional, output } from '../../src/graph/index.ts';
import { point } from '../setting-out/kinds.ts';
import { load } from './kinds.ts';
import { pointLoadAt } from './point-load-at.ts';

export const inclinedLoad = defineNode({
  name: 'inclined-load',
  title: 'Point load by direction',
  band: 'loads',
  help: 'A force at a point, from its size and direction: −90° is straight down, 0° to the right.',
  inputs: {
    at: input(point, 'At'),
    size: input(kinds.force, 'Size', '10 kN'),
    direction: input(kinds.angle, 'Direction', '-90°'),
    tiedTo: optional(point, 'Tied to'),
  },
  outputs: { load: output(load, 'Load') },
  trace: ({ at, size, direction, tiedTo }) => {
    const force = { x: size.times(direction.cosine()), y: size.times(direction.sine()) };
    return { load: pointLoadAt(at, force, tiedTo) };
  },
  example: {
    inputs: { at: ['4 m', '6 m'], size: '20 kN', direction: '-90°' },
    gives: {
      load: [
        ['4 m', '6 m'],
        ['0 kN', '-20 kN'],
      ],
    },
  },
});
