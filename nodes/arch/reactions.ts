import { defineNode, input, kinds, many, output, outputs } from '../../src/graph/index.ts';
import { reactions as find, placeLoads } from '../../src/mechanics/index.ts';
import { load } from '../loads/kinds.ts';
import { exampleArch, exampleLoads, exampleThrust } from './example-arch.ts';
import { arch, reaction } from './kinds.ts';

export const reactions = defineNode({
  name: 'reactions',
  title: 'Reactions',
  band: 'statics',
  help: 'What the ground presses on the arch with at each springing, and the right half on the left half at the crown: to the right and up are positive.',
  inputs: { arch: input(arch, 'Arch'), loads: many(load, 'Loads') },
  outputs: {
    leftAcross: output(kinds.force, 'Left springing, across'),
    leftUp: output(kinds.force, 'Left springing, up'),
    rightAcross: output(kinds.force, 'Right springing, across'),
    rightUp: output(kinds.force, 'Right springing, up'),
    crownAcross: output(kinds.force, 'Crown, across'),
    crownUp: output(kinds.force, 'Crown, up'),
    residual: output(kinds.moment, 'Residual moment at the crown'),
    reactions: outputs(reaction, 'Reactions of the ground'),
  },
  trace({ arch: of, loads }) {
    const { left, right, crown, residual } = find(of, placeLoads(of, loads));
    return {
      leftAcross: left.x,
      leftUp: left.y,
      rightAcross: right.x,
      rightUp: right.y,
      crownAcross: crown.x,
      crownUp: crown.y,
      residual,
      reactions: [
        { at: of.left, force: left },
        { at: of.right, force: right },
      ],
    };
  },
  example: {
    inputs: { arch: exampleArch, loads: exampleLoads },
    gives: { leftAcross: exampleThrust, leftUp: '7.5 kN', rightUp: '2.5 kN' },
  },
});
