import { kinds } from '../../src/graph/index.ts';
import { figureNode } from './slider.ts';

export const force = figureNode({
  name: 'force',
  title: 'Force',
  help: 'The size of a force.',
  kind: kinds.force,
  initial: '10 kN',
});
