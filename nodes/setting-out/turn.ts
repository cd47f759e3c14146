import { moved, turnAbout } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, many, output, outputs } from '../../src/graph/index.ts';
import { point } from './kinds.ts';

export const turn = defineNode({
  name: 'turn',
  title: 'Turn about a point',
  band: 'setting-out',
  help: 'A point turned about a centre by an angle, anticlockwise; further points can be turned with it.',
  inputs: {
    point: input(point, 'Point'),
    centre: input(point, 'Centre'),
    angle: input(kinds.angle, 'Angle', '10°'),
    others: many(point, 'Further points'),
  },
  outputs: { point: output(point, 'Turned point'), others: outputs(point, 'Further points, turned') },
  trace({ point: from, centre, angle, others }) {
    const motion = turnAbout(centre, angle);
    return { point: moved(motion, from), others: others.map((other) => moved(motion, other)) };
  },
  example: {
    inputs: { point: ['3 m', '1 m'], centre: ['1 m', '1 m'], angle: '90°' },
    gives: { point: ['1 m', '3 m'] },
  },
});
