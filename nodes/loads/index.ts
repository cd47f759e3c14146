import { definePack } from '../../src/graph/index.ts';
import { inclinedLoad } from './inclined-load.ts';
import { load } from './kinds.ts';
import { pointLoad } from './point-load.ts';

/** What the arch has to carry. */
export const loads = definePack({
  name: 'loads',
  version: '1.0.0',
  kinds: [load],
  nodes: [pointLoad, inclinedLoad],
});
