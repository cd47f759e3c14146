import { definePack } from '../../src/graph/index.ts';
import { changeOfAngle } from './change-of-angle.ts';
import { moment } from './moment.ts';
import { perturbation } from './perturbation.ts';

/** Moments from the movement of a mechanism, wired by hand. */
export const virtualWork = definePack({
  name: 'virtual-work',
  version: '1.0.0',
  nodes: [perturbation, changeOfAngle, moment],
});
