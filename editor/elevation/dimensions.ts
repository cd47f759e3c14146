import { type SVGTemplateResult, svg } from 'lit';
import type { Mark, XY } from '../../src/graph/index.ts';

type Place = (at: XY) => readonly [number, number];

/** Span beneath the arch and height of the crown beside it, as dimension lines. */
export function dimensionsOf(
  axis: Mark & { mark: 'axis' },
  place: Place,
  text: (metres: number) => string,
): SVGTemplateResult {
  const [left, right] = axis.springings;
  const low = Math.min(left.y, right.y);
  const [x1, base] = place({ x: left.x, y: low });
  const [x2] = place({ x: right.x, y: low });
  const y = base + 44;
  const edge = Math.max(...axis.points.map((point) => place(point)[0])) + 34;
  const [, crownY] = place(axis.crown);
  const [, lowY] = place({ x: 0, y: low });
  return svg`
    ${dimension([x1, y], [x2, y], text(Math.abs(right.x - left.x)))}
    ${dimension([edge, lowY], [edge, crownY], text(axis.crown.y - low))}`;
}

function dimension(
  [x1, y1]: readonly [number, number],
  [x2, y2]: readonly [number, number],
  text: string,
): SVGTemplateResult {
  const level = y1 === y2;
  const tick = ([x, y]: readonly [number, number]) => `M${x - 5} ${y + 5}L${x + 5} ${y - 5}`;
  const [x, y] = level ? [(x1 + x2) / 2, y1 - 6] : [x1 + 8, (y1 + y2) / 2 + 4];
  return svg`
    <path class="dimension" d="M${x1} ${y1}L${x2} ${y2}${tick([x1, y1])}${tick([x2, y2])}" />
    <text class="dimension-text" x=${x} y=${y} text-anchor=${level ? 'middle' : 'start'}>${text}</text>`;
}
