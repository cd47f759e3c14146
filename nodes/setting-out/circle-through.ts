import { circleThrough as makeCircle } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { circle, point } from './kinds.ts';

export const circleThrough = defineNode({
  name: 'circle-through',
  title: 'Circle through a point',
  band: 'setting-out',
  help: 'The circle about a centre that passes through a point.',
  inputs: { centre: input(point, 'Centre'), through: input(point, 'Through') },
  outputs: { circle: output(circle, 'Circle'), radius: output(kinds.length, 'Radius') },
  trace({ centre, through }) {
    const made = makeCircle(centre, through);
    return { circle: made, radius: made.radius };
  },
  example: { inputs: { centre: ['0 m', '0 m'], through: ['3 m', '4 m'] }, gives: { radius: '5 m' } },
});
