import type { Mark, XY } from '../../src/graph/index.ts';

/** A rectangle of the drawing, in metres. */
export interface Frame {
  readonly left: number;
  readonly bottom: number;
  readonly right: number;
  readonly top: number;
}

/** The least frame about what is drawn: the arch and its loads where there is one, else every point. */
export function frameOf(marks: readonly Mark[]): Frame {
  const axes = marks.filter(({ mark }) => mark === 'axis' || mark === 'load');
  const points = (axes.some(({ mark }) => mark === 'axis') ? axes : marks).flatMap(pointsOf);
  if (points.length === 0) return { left: -1, bottom: -1, right: 11, top: 7 };
  const xs = points.map(({ x }) => x);
  const ys = points.map(({ y }) => y);
  const [left, right, bottom, top] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const margin = Math.max(right - left, top - bottom, 1) * 0.12;
  return {
    left: left - margin,
    bottom: bottom - margin * 1.6,
    right: right + margin,
    top: top + margin * 1.3,
  };
}

function pointsOf(mark: Mark): readonly XY[] {
  switch (mark.mark) {
    case 'point':
      return [mark.at];
    case 'line':
      return [mark.from, mark.to];
    case 'load':
    case 'reaction':
      return [mark.at];
    case 'circle':
      return [
        { x: mark.centre.x - mark.radius, y: mark.centre.y - mark.radius },
        { x: mark.centre.x + mark.radius, y: mark.centre.y + mark.radius },
      ];
    default:
      return mark.points;
  }
}
