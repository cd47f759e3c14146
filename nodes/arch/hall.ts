import { defineNode, input, kinds, many, output } from '../../src/graph/index.ts';
import { point } from '../setting-out/kinds.ts';
import { exampleArch } from './example-arch.ts';
import { arch, hall as hallKind } from './kinds.ts';

export const hall = defineNode({
  name: 'hall',
  title: 'Hall',
  band: 'handover',
  help: 'The arch repeated along the building: how many bays, how far apart, how deep and broad its members are drawn, and where purlins run.',
  inputs: {
    arch: input(arch, 'Arch'),
    bays: input(kinds.count, 'Bays', '6'),
    spacing: input(kinds.length, 'Bay spacing', '5 m'),
    depth: input(kinds.length, 'Depth of the members', '0.6 m'),
    breadth: input(kinds.length, 'Breadth of the members', '0.2 m'),
    purlins: many(point, 'Purlins'),
  },
  outputs: { hall: output(hallKind, 'Hall'), length: output(kinds.length, 'Length of the hall') },
  trace({ arch: of, bays, spacing, depth, breadth, purlins }) {
    return { hall: { arch: of, bays, spacing, depth, breadth, purlins }, length: spacing.times(bays) };
  },
  example: {
    inputs: { arch: exampleArch, bays: '6', spacing: '5 m' },
    gives: { length: '30 m' },
  },
});
