import { defineNode, input, kinds, output } from '../../src/graph/index.ts';

export const difference = defineNode({
  name: 'difference',
  title: 'Difference of the two routes',
  band: 'statics',
  help: 'By how much the moment by virtual work differs from the moment by equilibrium: in itself, and as a share of the latter.',
  inputs: {
    virtualWork: input(kinds.moment, 'By virtual work', '0 kN*m'),
    equilibrium: input(kinds.moment, 'By equilibrium', '0 kN*m'),
  },
  outputs: {
    difference: output(kinds.moment, 'Difference'),
    share: output(kinds.number, 'Share of the moment'),
  },
  trace({ virtualWork, equilibrium }) {
    const gap = virtualWork.minus(equilibrium);
    const { trace } = gap;
    const acts = equilibrium.absolute().above(0);
    const one = trace.constant(1, equilibrium.dimension);
    const zero = trace.constant(0, gap.over(one).dimension);
    // A moment of 0 has no share to speak of.
    return { difference: gap, share: acts.choose(gap.over(acts.choose(equilibrium, one)), zero) };
  },
  example: {
    inputs: { virtualWork: '101 kN*m', equilibrium: '100 kN*m' },
    gives: { difference: '1 kN*m', share: '0.01' },
  },
});
