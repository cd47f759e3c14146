import { inclinationOf, lengthOf } from '../../src/geometry/index.ts';
import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { chord as chordKind, point } from './kinds.ts';

export const chord = defineNode({
  name: 'chord',
  title: 'Chord',
  band: 'setting-out',
  help: 'The straight connection of two points, with its length and inclination.',
  inputs: { from: input(point, 'From'), to: input(point, 'To') },
  outputs: {
    chord: output(chordKind, 'Chord'),
    length: output(kinds.length, 'Length'),
    inclination: output(kinds.angle, 'Inclination'),
  },
  trace({ from, to }) {
    const made = { from, to };
    return { chord: made, length: lengthOf(made), inclination: inclinationOf(made) };
  },
  example: {
    inputs: { from: ['1 m', '1 m'], to: ['4 m', '5 m'] },
    gives: { length: '5 m', inclination: '53.13010235415598°' },
  },
});
