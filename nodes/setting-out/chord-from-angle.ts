import { chordFrom } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { chord, point } from './kinds.ts';

export const chordFromAngle = defineNode({
  name: 'chord-from-angle',
  title: 'Chord by angle and length',
  band: 'setting-out',
  help: 'The chord that starts at a point with an inclination and a length; its second end follows.',
  inputs: {
    from: input(point, 'From'),
    inclination: input(kinds.angle, 'Inclination', '30°'),
    length: input(kinds.length, 'Length', '3 m'),
  },
  outputs: { chord: output(chord, 'Chord'), end: output(point, 'Second end') },
  trace({ from, inclination, length }) {
    const made = chordFrom(from, inclination, length);
    return { chord: made, end: made.to };
  },
  example: {
    inputs: { from: ['1 m', '2 m'], inclination: '90°', length: '6 m' },
    gives: { end: ['1 m', '8 m'] },
  },
});
