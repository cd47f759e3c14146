import { nothing, type SVGTemplateResult, svg } from 'lit';
import type { Mark, XY } from '../../src/graph/index.ts';

/** How marks are drawn: metres to the units of the drawing, and how long forces and moments are drawn. */
export interface Scale {
  /** Drawing units for a metre. */
  readonly metre: number;
  /** Drawing units for a newton. */
  readonly force: number;
  /** Drawing units for a newton metre. */
  readonly moment: number;
  readonly place: (at: XY) => readonly [number, number];
  /** What is printed beside a force, in newtons. */
  readonly forceText: (newtons: number) => string;
  readonly momentText: (newtonMetres: number) => string;
  readonly circles: boolean;
}

type Drawn = SVGTemplateResult | typeof nothing;

/** One mark, in the units of the drawing. */
export function drawMark(mark: Mark, scale: Scale): Drawn {
  switch (mark.mark) {
    case 'point':
      return cross(scale.place(mark.at));
    case 'line':
      return svg`<path class="setting-out" d=${path([mark.from, mark.to], scale)} />`;
    case 'curve':
      return svg`<path class="setting-out" d=${path(mark.points, scale)} />`;
    case 'circle':
      return scale.circles ? circle(mark.centre, mark.radius, scale) : nothing;
    case 'axis':
      return axis(mark, scale);
    case 'load':
      return load(mark, scale);
    case 'reaction':
      return arrow(mark.at, mark.force, 'reaction', scale);
    case 'mechanism':
      return svg`
        ${scale.circles ? mark.circles.map(({ centre, radius }) => circle(centre, radius, scale)) : nothing}
        <path class="moved" d=${path(mark.points, scale)} />
        ${mark.hinges.map((hinge) => hingeAt(scale.place(hinge), 'moved-hinge'))}`;
    case 'moments':
      return moments(mark, scale);
    case 'hall':
      return nothing;
  }
}

function path(points: readonly XY[], { place }: Scale): string {
  return points.map((point, i) => `${i === 0 ? 'M' : 'L'}${place(point).join(' ')}`).join('');
}

function cross([x, y]: readonly [number, number]): SVGTemplateResult {
  return svg`<path class="point" d="M${x - 4} ${y}H${x + 4}M${x} ${y - 4}V${y + 4}" />`;
}

function circle(centre: XY, radius: number, scale: Scale): SVGTemplateResult {
  const [x, y] = scale.place(centre);
  return svg`<circle class="construction" cx=${x} cy=${y} r=${radius * scale.metre} />`;
}

function hingeAt([x, y]: readonly [number, number], kind: string): SVGTemplateResult {
  return svg`<circle class=${kind} cx=${x} cy=${y} r="5" />`;
}

function axis(mark: Mark & { mark: 'axis' }, scale: Scale): SVGTemplateResult {
  const supports = mark.springings.map((at) => {
    const [x, y] = scale.place(at);
    return svg`<path class="support" d="M${x} ${y + 4}L${x - 10} ${y + 20}H${x + 10}ZM${x - 16} ${y + 20}H${x + 16}" />`;
  });
  return svg`
    <path class="axis" d=${path(mark.points, scale)} />
    ${supports}
    ${mark.knees.map((knee) => {
      const [x, y] = scale.place(knee);
      return svg`<rect class="knee" x=${x - 4} y=${y - 4} width="8" height="8" />`;
    })}
    ${[...mark.springings, mark.crown].map((at) => hingeAt(scale.place(at), 'hinge'))}`;
}

function load(mark: Mark & { mark: 'load' }, scale: Scale): SVGTemplateResult {
  const tie =
    mark.tie === undefined ? nothing : svg`<path class="tie" d=${path([mark.tie, mark.at], scale)} />`;
  return svg`${tie}${arrow(mark.at, mark.force, 'load', scale)}`;
}

/** An arrow that ends at the point where the force acts, as long as the force is large, with its size beside it. */
function arrow(at: XY, force: XY, kind: string, scale: Scale): Drawn {
  const size = Math.hypot(force.x, force.y);
  const length = size * scale.force;
  if (length < 1) return nothing;
  const [x, y] = scale.place(at);
  const [dx, dy] = [force.x / size, -force.y / size];
  const [tailX, tailY] = [x - dx * length, y - dy * length];
  const head = Math.min(9, length);
  const wing = (side: number) =>
    `${x - dx * head + dy * head * 0.35 * side} ${y - dy * head - dx * head * 0.35 * side}`;
  return svg`
    <path class=${kind} d="M${tailX} ${tailY}L${x} ${y}M${wing(1)}L${x} ${y}L${wing(-1)}" />
    <text class="force-text" x=${tailX} y=${tailY - 5} text-anchor="middle">${scale.forceText(size)}</text>`;
}

/** Moments as ordinates on the tension face, hatched, with the greatest and least marked. */
function moments(mark: Mark & { mark: 'moments' }, scale: Scale): SVGTemplateResult {
  const tips = mark.points.map((point, i): readonly [number, number] => {
    const [x, y] = scale.place(point);
    const normal = mark.normals[i] ?? { x: 0, y: 0 };
    const length = (mark.values[i] ?? 0) * scale.moment;
    return [x + normal.x * length, y - normal.y * length];
  });
  const hatch = tips
    .map((tip, i) => `M${scale.place(mark.points[i] as XY).join(' ')}L${tip.join(' ')}`)
    .join('');
  const extremes = [Math.max(...mark.values), Math.min(...mark.values)].map((value) => {
    const tip = tips[mark.values.indexOf(value)] ?? [0, 0];
    return svg`<text class="moment-text" x=${tip[0]} y=${tip[1] - 4} text-anchor="middle">${scale.momentText(value)}</text>`;
  });
  return svg`
    <path class="hatch" d=${hatch} />
    <path class="moments" d=${tips.map((tip, i) => `${i === 0 ? 'M' : 'L'}${tip.join(' ')}`).join('')} />
    ${extremes}`;
}
