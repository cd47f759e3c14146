import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { placeAlong } from '../../src/mechanics/index.ts';
import { point } from '../setting-out/kinds.ts';
import { smallArch } from './example-arch.ts';
import { arch, station as stationKind } from './kinds.ts';

export const station = defineNode({
  name: 'station',
  title: 'Station',
  band: 'statics',
  help: 'The place of an arch at a distance along its axis from the left springing.',
  inputs: { arch: input(arch, 'Arch'), along: input(kinds.length, 'Distance along the axis', '3 m') },
  outputs: { station: output(stationKind, 'Station'), point: output(point, 'Point') },
  trace({ arch: of, along }) {
    const place = placeAlong(of, along);
    return { station: { arch: of, place }, point: place.point };
  },
  example: {
    inputs: {
      arch: smallArch,
      along: '6.5 m',
    },
    gives: { point: ['1.5 m', '6 m'] },
  },
});
