import { kinds } from '../../src/graph/index.ts';
import { figureNode } from './slider.ts';

export const lineLoad = figureNode({
  name: 'line-load',
  title: 'Line load',
  help: 'A force for each length of a member.',
  kind: kinds.lineLoad,
  initial: '2 kN/m',
});
