import { motionBetween, moved, turnOf } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, many, output, outputs } from '../../src/graph/index.ts';
import { chord, point } from './kinds.ts';

export const rigidGroup = defineNode({
  name: 'rigid-group',
  title: 'Rigid group',
  band: 'setting-out',
  help: 'Points tied to a chord, carried along when the chord moves to a new place of the same length.',
  inputs: {
    chord: input(chord, 'Chord'),
    movedTo: input(chord, 'Chord moved to'),
    points: many(point, 'Points'),
  },
  outputs: { points: outputs(point, 'Moved points'), turn: output(kinds.angle, 'Turn') },
  trace({ chord: before, movedTo, points }) {
    const motion = motionBetween(before, movedTo);
    return { points: points.map((tied) => moved(motion, tied)), turn: turnOf(motion) };
  },
  example: {
    inputs: {
      chord: [
        ['0 m', '0 m'],
        ['4 m', '0 m'],
      ],
      movedTo: [
        ['1 m', '1 m'],
        ['1 m', '5 m'],
      ],
      points: [['2 m', '1 m']],
    },
    gives: { points: [['0 m', '3 m']], turn: '90°' },
  },
});
