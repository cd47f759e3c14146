import { circle as makeCircle } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { circle as circleKind, point } from './kinds.ts';

export const circle = defineNode({
  name: 'circle',
  title: 'Circle',
  band: 'setting-out',
  help: 'The circle about a centre with a radius.',
  inputs: { centre: input(point, 'Centre'), radius: input(kinds.length, 'Radius', '1 m') },
  outputs: { circle: output(circleKind, 'Circle') },
  trace: ({ centre, radius }) => ({ circle: makeCircle(centre, radius) }),
  example: {
    inputs: { centre: ['2 m', '1 m'], radius: '3 m' },
    gives: { circle: [['2 m', '1 m'], '3 m'] },
  },
});
