import { defineNode, input, kinds, many, output, outputs } from '../../src/graph/index.ts';
import { negligibleDisplacement, virtualWorkMoment } from '../../src/mechanics/index.ts';
import { load } from '../loads/kinds.ts';
import { point } from '../setting-out/kinds.ts';

export const moment = defineNode({
  name: 'moment',
  title: 'Virtual-work moment',
  band: 'statics',
  help: 'The bending moment at a released cut, from the work of the loads over the change of the angle. One moved point for each load, in the same order.',
  inputs: {
    perturbation: input(kinds.perturbation, 'Perturbation', '2°'),
    loads: many(load, 'Loads'),
    moved: many(point, 'Moved points'),
    change: input(kinds.angle, 'Change of angle', '0°'),
  },
  outputs: {
    limit: output(kinds.moment, 'Moment, exact limit'),
    finite: output(kinds.moment, 'Moment at the finite perturbation'),
    along: outputs(kinds.length, 'Displacement along each load'),
  },
  trace({ perturbation, loads, moved, change }) {
    const { limit, finite, along } = virtualWorkMoment({
      perturbation,
      loads,
      moved,
      closing: change,
      negligible: negligibleDisplacement(loads, perturbation.trace),
    });
    return { limit, finite, along };
  },
  // A lever of 2 m about the datum, released there, with 10 kN down at its end: M = 10 · 2 kN·m.
  example: {
    around: {
      nodes: [
        { id: 'turn', type: 'virtual-work/perturbation' },
        { id: 'datum', type: 'setting-out/point' },
        { id: 'end', type: 'setting-out/point', values: { across: '2 m' } },
        { id: 'moved', type: 'setting-out/turn' },
        { id: 'load', type: 'loads/point-load', values: { up: '-10 kN' } },
      ],
      links: [
        { from: ['end', 'point'], to: ['moved', 'point'] },
        { from: ['datum', 'point'], to: ['moved', 'centre'] },
        { from: ['turn', 'turn'], to: ['moved', 'angle'] },
        { from: ['end', 'point'], to: ['load', 'at'] },
        { from: ['turn', 'turn'], to: ['this', 'perturbation'] },
        { from: ['load', 'load'], to: ['this', 'loads'] },
        { from: ['moved', 'point'], to: ['this', 'moved'] },
        { from: ['turn', 'turn'], to: ['this', 'change'] },
      ],
    },
    gives: { limit: '20 kN*m' },
  },
});
