import { definePack } from '../../src/graph/index.ts';
import { angleBetween } from './angle-between.ts';
import { arc } from './arc.ts';
import { chord } from './chord.ts';
import { chordFromAngle } from './chord-from-angle.ts';
import { circle } from './circle.ts';
import { circleMeetsLine } from './circle-meets-line.ts';
import { circleThrough } from './circle-through.ts';
import { circlesMeet } from './circles-meet.ts';
import { distance } from './distance.ts';
import * as kinds from './kinds.ts';
import { linesMeet } from './lines-meet.ts';
import { mirror } from './mirror.ts';
import { offsetPoint } from './offset-point.ts';
import { point } from './point.ts';
import { pointAtDistance } from './point-at-distance.ts';
import { pointAtRatio } from './point-at-ratio.ts';
import { pointOnArc } from './point-on-arc.ts';
import { rigidGroup } from './rigid-group.ts';
import { turn } from './turn.ts';

/** Points, chords, circles, where they meet, and how they move. */
export const settingOut = definePack({
  name: 'setting-out',
  version: '1.0.0',
  kinds: [kinds.point, kinds.chord, kinds.circle, kinds.arc],
  nodes: [
    point,
    offsetPoint,
    pointAtRatio,
    pointAtDistance,
    chord,
    chordFromAngle,
    circle,
    circleThrough,
    arc,
    pointOnArc,
    circlesMeet,
    circleMeetsLine,
    linesMeet,
    turn,
    mirror,
    rigidGroup,
    angleBetween,
    distance,
  ],
});
