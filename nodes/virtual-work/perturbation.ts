import { defineNode, input, kinds, output } from '../../src/graph/index.ts';

export const perturbation = defineNode({
  name: 'perturbation',
  title: 'Perturbation',
  band: 'statics',
  help: 'The turn that drives a mechanism. Its size is for the drawing and for the value at a finite perturbation; the exact moment does not depend on it.',
  inputs: { size: input(kinds.angle, 'Size', '2°') },
  outputs: { turn: output(kinds.perturbation, 'Turn') },
  trace: ({ size }) => ({ turn: size.trace.mark(size) }),
  example: { inputs: { size: '2°' }, gives: { turn: '2°' } },
});
