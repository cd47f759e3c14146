import { kinds } from '../../src/graph/index.ts';
import { figureNode } from './slider.ts';

export const number = figureNode({
  name: 'number',
  title: 'Number',
  help: 'A plain number: a ratio, a coefficient, a share.',
  kind: kinds.number,
  initial: '1',
});
