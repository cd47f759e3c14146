import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { kneePlace } from '../../src/mechanics/index.ts';
import { point } from '../setting-out/kinds.ts';
import { smallArch } from './example-arch.ts';
import { arch, station } from './kinds.ts';

export const stationAtKnee = defineNode({
  name: 'station-at-knee',
  title: 'Station at a knee',
  band: 'statics',
  help: 'The place of an arch at one of its knees, counted from the left springing; the side to the left of the knee.',
  inputs: { arch: input(arch, 'Arch'), knee: input(kinds.count, 'Knee', '1') },
  outputs: { station: output(station, 'Station'), point: output(point, 'Point') },
  trace({ arch: of, knee }) {
    const place = kneePlace(of, knee);
    return { station: { arch: of, place }, point: place.point };
  },
  example: {
    inputs: {
      arch: smallArch,
      knee: '1',
    },
    gives: { point: ['0 m', '4 m'] },
  },
});
