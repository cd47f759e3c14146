import { definePack, kinds } from '../../src/graph/index.ts';
import { angle } from './angle.ts';
import { areaLoad } from './area-load.ts';
import { count } from './count.ts';
import { force } from './force.ts';
import { formula } from './formula.ts';
import { length } from './length.ts';
import { lineLoad } from './line-load.ts';
import { number } from './number.ts';
import { reading } from './reading.ts';

/** Figures that are typed or slid, formulas, and readings. */
export const quantities = definePack({
  name: 'quantities',
  version: '1.0.0',
  kinds: kinds.figureKinds,
  nodes: [length, angle, force, lineLoad, areaLoad, number, count, formula, reading],
});
