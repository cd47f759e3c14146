import { motionBetween, turnOf } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { chord } from '../setting-out/kinds.ts';

export const changeOfAngle = defineNode({
  name: 'change-of-angle',
  title: 'Change of angle at a cut',
  band: 'statics',
  help: 'By how much the angle between the two sides of a cut changes when both move: the turn of the left side less that of the right, positive where the angle on the intrados closes.',
  inputs: {
    left: input(chord, 'Left side'),
    leftMoved: input(chord, 'Left side, moved'),
    right: input(chord, 'Right side'),
    rightMoved: input(chord, 'Right side, moved'),
  },
  outputs: { change: output(kinds.angle, 'Change of angle') },
  trace: ({ left, leftMoved, right, rightMoved }) => ({
    change: turnOf(motionBetween(left, leftMoved)).minus(turnOf(motionBetween(right, rightMoved))),
  }),
  example: {
    inputs: {
      left: [
        ['0 m', '0 m'],
        ['3 m', '0 m'],
      ],
      leftMoved: [
        ['0 m', '0 m'],
        ['0 m', '3 m'],
      ],
      right: [
        ['3 m', '0 m'],
        ['5 m', '0 m'],
      ],
      rightMoved: [
        ['0 m', '3 m'],
        ['2 m', '3 m'],
      ],
    },
    gives: { change: '90°' },
  },
});
