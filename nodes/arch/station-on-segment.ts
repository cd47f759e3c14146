import { defineNode, input, kinds, output } from '../../src/graph/index.ts';
import { placeOnSegment } from '../../src/mechanics/index.ts';
import { point } from '../setting-out/kinds.ts';
import { smallArch } from './example-arch.ts';
import { arch, station } from './kinds.ts';

export const stationOnSegment = defineNode({
  name: 'station-on-segment',
  title: 'Station on a segment',
  band: 'statics',
  help: 'The place of an arch at a ratio of the way along one of its segments, which are counted from the left springing.',
  inputs: {
    arch: input(arch, 'Arch'),
    segment: input(kinds.count, 'Segment', '1'),
    ratio: input(kinds.number, 'Ratio', '0.5'),
  },
  outputs: { station: output(station, 'Station'), point: output(point, 'Point') },
  trace({ arch: of, segment, ratio }) {
    const place = placeOnSegment(of, segment - 1, ratio);
    return { station: { arch: of, place }, point: place.point };
  },
  example: {
    inputs: {
      arch: smallArch,
      segment: '2',
      ratio: '0.5',
    },
    gives: { point: ['1.5 m', '6 m'] },
  },
});
