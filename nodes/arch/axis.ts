import { defineNode, kinds, many, output } from '../../src/graph/index.ts';
import { archThrough, axisLength, crownStart, hingeRise, span } from '../../src/mechanics/index.ts';
import { smallArch } from './example-arch.ts';
import { arch, keyPoint } from './kinds.ts';

export const axis = defineNode({
  name: 'axis',
  title: 'Arch axis',
  band: 'arch',
  help: 'The axis of a three-hinged arch through key points in order: springing, knees, crown, knees, springing.',
  inputs: { keyPoints: many(keyPoint, 'Key points') },
  outputs: {
    arch: output(arch, 'Arch'),
    span: output(kinds.length, 'Span'),
    rise: output(kinds.length, 'Rise of the crown above the line of the springings'),
    length: output(kinds.length, 'Length of the axis'),
    leftLength: output(kinds.length, 'Length of the left half'),
  },
  trace({ keyPoints }) {
    const made = archThrough(keyPoints);
    return {
      arch: made,
      span: span(made),
      rise: hingeRise(made),
      length: axisLength(made),
      leftLength: crownStart(made),
    };
  },
  example: {
    inputs: {
      keyPoints: smallArch,
    },
    gives: { span: '6 m', rise: '8 m', leftLength: '9 m' },
  },
});
