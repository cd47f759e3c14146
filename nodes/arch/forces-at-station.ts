import { defineNode, input, kinds, many, output } from '../../src/graph/index.ts';
import { internalForces, placeLoads, reactions } from '../../src/mechanics/index.ts';
import { load } from '../loads/kinds.ts';
import { exampleArch, exampleKneeMoment, exampleLoads } from './example-arch.ts';
import { station } from './kinds.ts';

export const forcesAtStation = defineNode({
  name: 'forces-at-station',
  title: 'Moment by equilibrium',
  band: 'statics',
  help: 'Axial force, shear force and bending moment at a station, from the reactions and loads on one side of it. Tension is positive; a moment is positive where it puts the intrados in tension.',
  inputs: { station: input(station, 'Station'), loads: many(load, 'Loads') },
  outputs: {
    moment: output(kinds.moment, 'Bending moment M'),
    shear: output(kinds.force, 'Shear force V'),
    axial: output(kinds.force, 'Axial force N'),
  },
  trace({ station: { arch, place }, loads }) {
    const placed = placeLoads(arch, loads);
    return internalForces(arch, placed, reactions(arch, placed), place);
  },
  example: {
    inputs: { station: [exampleArch, '4 m'], loads: exampleLoads },
    gives: { moment: exampleKneeMoment, axial: '-7.5 kN' },
  },
});
