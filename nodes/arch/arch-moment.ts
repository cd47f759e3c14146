import { defineNode, input, kinds, many, output, outputs } from '../../src/graph/index.ts';
import { archMoment as find, placeLoads, shapePlaces } from '../../src/mechanics/index.ts';
import { load } from '../loads/kinds.ts';
import { point } from '../setting-out/kinds.ts';
import { exampleArch, exampleKneeMoment, exampleLoads } from './example-arch.ts';
import { mechanism, station } from './kinds.ts';

export const archMoment = defineNode({
  name: 'arch-moment',
  title: 'Arch moment',
  band: 'statics',
  help: 'The bending moment at a station by virtual work on the released arch, and by equilibrium, with the difference of the two.',
  inputs: {
    station: input(station, 'Station'),
    loads: many(load, 'Loads'),
    perturbation: input(kinds.perturbation, 'Perturbation', '2°'),
  },
  outputs: {
    limit: output(kinds.moment, 'Moment, exact limit'),
    finite: output(kinds.moment, 'Moment at the finite perturbation'),
    equilibrium: output(kinds.moment, 'Moment by equilibrium'),
    difference: output(kinds.moment, 'Difference of the two routes'),
    along: outputs(kinds.length, 'Displacement along each load'),
    change: output(kinds.angle, 'Change of angle'),
    moved: outputs(point, 'Moved points'),
    mechanism: output(mechanism, 'Perturbed mechanism'),
  },
  trace({ station: { arch, place }, loads, perturbation }) {
    const placed = placeLoads(arch, loads);
    const found = find(arch, placed, place, perturbation.trace.mark(perturbation));
    return {
      limit: found.virtualWork.limit,
      finite: found.virtualWork.finite,
      equilibrium: found.forces.moment,
      difference: found.difference,
      along: found.virtualWork.along,
      change: found.mechanism.closing,
      moved: placed.map((one) => found.mechanism.move(one)),
      mechanism: {
        points: [...shapePlaces(arch), place].map((at) => ({
          along: at.along,
          at: found.mechanism.move({ at: at.point, place: at }),
        })),
        hinges: found.mechanism.movedHinges,
        circles: found.mechanism.circles,
      },
    };
  },
  example: {
    inputs: { station: [exampleArch, '4 m'], loads: exampleLoads, perturbation: '2°' },
    gives: { limit: exampleKneeMoment, equilibrium: exampleKneeMoment },
  },
});
