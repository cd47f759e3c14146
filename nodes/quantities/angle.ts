import { kinds } from '../../src/graph/index.ts';
import { figureNode } from './slider.ts';

export const angle = figureNode({
  name: 'angle',
  title: 'Angle',
  help: 'An angle, anticlockwise from the direction to the right.',
  kind: kinds.angle,
  initial: '30°',
});
