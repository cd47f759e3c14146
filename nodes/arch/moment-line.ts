import { defineNode, input, kinds, many, output } from '../../src/graph/index.ts';
import { forcesAlong, placeLoads, stationsAlong, towardsIntrados } from '../../src/mechanics/index.ts';
import { load } from '../loads/kinds.ts';
import { exampleArch, exampleLoads } from './example-arch.ts';
import { arch, momentLine as momentLineKind } from './kinds.ts';

/** Steps to a segment: moments between point loads run straight, so that these are enough to draw them by. */
const STEPS = 24;

export const momentLine = defineNode({
  name: 'moment-line',
  title: 'Moment along the axis',
  band: 'statics',
  help: 'The bending moment along the whole axis by equilibrium, with its greatest and least value among 24 steps to a segment.',
  inputs: { arch: input(arch, 'Arch'), loads: many(load, 'Loads') },
  outputs: {
    line: output(momentLineKind, 'Moment line'),
    greatest: output(kinds.moment, 'Greatest moment'),
    least: output(kinds.moment, 'Least moment'),
  },
  trace({ arch: of, loads }) {
    const places = stationsAlong(of, STEPS);
    const values = forcesAlong(of, placeLoads(of, loads), places).map(({ moment }) => moment);
    return {
      line: { points: places.map(({ point }) => point), normals: places.map(towardsIntrados), values },
      greatest: values.reduce((most, value) => most.most(value)),
      least: values.reduce((least, value) => least.least(value)),
    };
  },
  // The greatest moment stands under the load: 7.5 · 3 − 2.142857 · 5.5 kN·m (statics by hand).
  example: {
    inputs: { arch: exampleArch, loads: exampleLoads },
    gives: { greatest: '10.714285714285714 kN*m', least: '-8.571428571428571 kN*m' },
  },
});
