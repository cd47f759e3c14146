import { arcLength, arcThrough } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { arc as arcKind, point } from './kinds.ts';

export const arc = defineNode({
  name: 'arc',
  title: 'Arc through three points',
  band: 'setting-out',
  help: 'The arc from a first point through a second to a third, with its centre, radius, length and angle at the centre.',
  inputs: { from: input(point, 'From'), through: input(point, 'Through'), to: input(point, 'To') },
  outputs: {
    arc: output(arcKind, 'Arc'),
    centre: output(point, 'Centre'),
    radius: output(kinds.length, 'Radius'),
    length: output(kinds.length, 'Length'),
    sweep: output(kinds.angle, 'Angle at the centre'),
  },
  trace({ from, through, to }) {
    const made = arcThrough(from, through, to);
    return {
      arc: made,
      centre: made.centre,
      radius: made.radius,
      length: arcLength(made),
      sweep: made.sweep,
    };
  },
  example: {
    inputs: { from: ['-5 m', '0 m'], through: ['0 m', '5 m'], to: ['5 m', '0 m'] },
    gives: { centre: ['0 m', '0 m'], radius: '5 m', sweep: '-180°' },
  },
});
