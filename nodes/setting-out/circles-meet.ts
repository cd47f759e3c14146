import { circlesMeet as meet } from '../../src/geometry/index.ts';
import { choice, defineNode, input, optional, output } from '../../src/graph/index.ts';
import { branchOf } from './branch.ts';
import { circle, point } from './kinds.ts';

export const circlesMeet = defineNode({
  name: 'circles-meet',
  title: 'Intersection of two circles',
  band: 'setting-out',
  help: 'Where two circles meet: the point nearest to a reference, or the one to the left or right of the line from the first centre to the second.',
  inputs: {
    first: input(circle, 'First circle'),
    second: input(circle, 'Second circle'),
    reference: optional(point, 'Reference'),
  },
  settings: {
    branch: choice(
      'Which point',
      {
        nearest: 'nearest to the reference',
        left: 'left of the line of centres',
        right: 'right of the line of centres',
      },
      'nearest',
    ),
  },
  outputs: { point: output(point, 'Point') },
  trace: ({ first, second, reference }, { branch }) => ({
    point: meet(first, second, branchOf(branch, reference)),
  }),
  example: {
    inputs: { first: [['0 m', '0 m'], '5 m'], second: [['6 m', '0 m'], '5 m'], reference: ['3 m', '3 m'] },
    gives: { point: ['3 m', '4 m'] },
  },
});
