import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { point as pointKind } from './kinds.ts';

export const point = defineNode({
  name: 'point',
  title: 'Point',
  band: 'setting-out',
  help: 'A point from its distances across and up from the datum.',
  inputs: { across: input(kinds.length, 'Across', '0 m'), up: input(kinds.length, 'Up', '0 m') },
  outputs: { point: output(pointKind, 'Point') },
  trace: ({ across, up }) => ({ point: { x: across, y: up } }),
  example: { inputs: { across: '4 m', up: '3 m' }, gives: { point: ['4 m', '3 m'] } },
});
