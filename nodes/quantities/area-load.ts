import { kinds } from '../../src/graph/index.ts';
import { figureNode } from './slider.ts';

export const areaLoad = figureNode({
  name: 'area-load',
  title: 'Area load',
  help: 'A force for each area: snow, wind, a roof’s build-up.',
  kind: kinds.areaLoad,
  initial: '1 kN/m²',
});
