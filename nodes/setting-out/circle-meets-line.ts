import { circleMeetsLine as meet } from '../../src/geometry/index.ts';
import { choice, defineNode, input, optional, output } from '../../src/graph/index.ts';
import { branchOf } from './branch.ts';
import { chord, circle, point } from './kinds.ts';

export const circleMeetsLine = defineNode({
  name: 'circle-meets-line',
  title: 'Intersection of circle and line',
  band: 'setting-out',
  help: 'Where a circle meets the line through a chord: the point nearest to a reference, or the first or second along the chord.',
  inputs: {
    circle: input(circle, 'Circle'),
    line: input(chord, 'Line'),
    reference: optional(point, 'Reference'),
  },
  settings: {
    branch: choice(
      'Which point',
      {
        nearest: 'nearest to the reference',
        first: 'first along the chord',
        second: 'second along the chord',
      },
      'nearest',
    ),
  },
  outputs: { point: output(point, 'Point') },
  trace: ({ circle: round, line, reference }, { branch }) => ({
    point: meet(round, line, branchOf(branch, reference)),
  }),
  example: {
    inputs: {
      circle: [['0 m', '0 m'], '5 m'],
      line: [
        ['-9 m', '3 m'],
        ['9 m', '3 m'],
      ],
    },
    settings: { branch: 'second' },
    gives: { point: ['4 m', '3 m'] },
  },
});
