import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { point } from './kinds.ts';

export const offsetPoint = defineNode({
  name: 'offset-point',
  title: 'Offset point',
  band: 'setting-out',
  help: 'A point at distances across and up from another.',
  inputs: {
    from: input(point, 'From'),
    across: input(kinds.length, 'Across', '0 m'),
    up: input(kinds.length, 'Up', '0 m'),
  },
  outputs: { point: output(point, 'Point') },
  trace: ({ from, across, up }) => ({ point: { x: from.x.plus(across), y: from.y.plus(up) } }),
  example: {
    inputs: { from: ['4 m', '3 m'], across: '-1 m', up: '2.5 m' },
    gives: { point: ['3 m', '5.5 m'] },
  },
});
