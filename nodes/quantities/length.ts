import { kinds } from '../../src/graph/index.ts';
import { figureNode } from './slider.ts';

export const length = figureNode({
  name: 'length',
  title: 'Length',
  help: 'A length: a span, a rise, a bay spacing.',
  kind: kinds.length,
  initial: '3 m',
});
