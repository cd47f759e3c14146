import { definePack } from '../../src/graph/index.ts';
import { archMoment } from './arch-moment.ts';
import { axis } from './axis.ts';
import { crown } from './crown.ts';
import { difference } from './difference.ts';
import { forcesAtStation } from './forces-at-station.ts';
import { hall } from './hall.ts';
import * as kinds from './kinds.ts';
import { knee } from './knee.ts';
import { momentLine } from './moment-line.ts';
import { reactions } from './reactions.ts';
import { springing } from './springing.ts';
import { station } from './station.ts';
import { stationAtKnee } from './station-at-knee.ts';
import { stationOnSegment } from './station-on-segment.ts';
import { throughPoint } from './through-point.ts';

/** The three-hinged arch: its axis, and what it carries at any station. */
export const arch = definePack({
  name: 'arch',
  version: '1.0.0',
  kinds: [
    kinds.keyPoint,
    kinds.arch,
    kinds.station,
    kinds.mechanism,
    kinds.reaction,
    kinds.momentLine,
    kinds.hall,
  ],
  nodes: [
    springing,
    knee,
    crown,
    throughPoint,
    axis,
    station,
    stationAtKnee,
    stationOnSegment,
    reactions,
    archMoment,
    forcesAtStation,
    difference,
    momentLine,
    hall,
  ],
});
