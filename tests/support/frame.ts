import { Matrix, solve } from 'ml-matrix';

/**
 * A plane frame solved by the direct stiffness method: straight bars with axial and bending stiffness, three
 * freedoms at a node. It shares no code and no method with the program, and so is a check on it. SI units.
 */

export interface XY {
  readonly x: number;
  readonly y: number;
}

/** A three-hinged arch of straight segments, pinned at both ends, hinged at one of its points. */
export interface FrameArch {
  /** From the left springing to the right one. */
  readonly points: readonly XY[];
  /** Which of the points is the crown hinge. */
  readonly crown: number;
}

/** A force that is carried at a place of a segment, by a rigid arm where it acts elsewhere. */
export interface FrameLoad {
  readonly segment: number;
  readonly ratio: number;
  readonly at: XY;
  readonly force: XY;
}

export interface FrameCut {
  readonly segment: number;
  readonly ratio: number;
}

export interface FrameResult {
  /** Of the ground on the arch. */
  readonly left: XY;
  readonly right: XY;
  /** Just before each cut: tension, rate of change of M, moment with the intrados in tension. */
  readonly cuts: readonly { readonly N: number; readonly V: number; readonly M: number }[];
}

interface Bar {
  readonly from: number;
  readonly to: number;
  /** Freedoms: two displacements and a rotation at either end. */
  readonly freedoms: readonly number[];
}

/**
 * Solves the frame. The forces of a statically determinate frame do not depend on its stiffness, which is chosen
 * so that the equations are well conditioned.
 */
export function solveFrame(
  arch: FrameArch,
  loads: readonly FrameLoad[],
  cuts: readonly FrameCut[],
): FrameResult {
  const span = Math.hypot(
    (arch.points.at(-1) as XY).x - (arch.points[0] as XY).x,
    (arch.points.at(-1) as XY).y - (arch.points[0] as XY).y,
  );
  const [EA, EI] = [1, (span / 10) ** 2];

  const nodes: XY[] = [arch.points[0] as XY];
  const bars: Bar[] = [];
  const nodeAt = new Map<string, number>();
  // Rotation freedoms follow the displacements; the crown has one for either side.
  const rotation: number[] = [0];
  let rotations = 1;
  const cutBar = new Map<string, number>();
  for (let segment = 0; segment + 1 < arch.points.length; segment++) {
    const [from, to] = [arch.points[segment] as XY, arch.points[segment + 1] as XY];
    const ratios = [...loads, ...cuts].filter((one) => one.segment === segment).map(({ ratio }) => ratio);
    const stops = [...new Set([0, ...ratios, 1])].sort((a, b) => a - b);
    let before = nodes.length - 1;
    nodeAt.set(`${segment} 0`, before);
    let beforeRotation = rotation[before] as number;
    if (segment === arch.crown) beforeRotation = rotations++;
    for (const ratio of stops.slice(1)) {
      nodes.push({ x: from.x + (to.x - from.x) * ratio, y: from.y + (to.y - from.y) * ratio });
      const here = nodes.length - 1;
      rotation[here] = rotations++;
      nodeAt.set(`${segment} ${ratio}`, here);
      cutBar.set(`${segment} ${ratio}`, bars.length);
      const hereRotation = rotation[here] as number;
      bars.push({
        from: before,
        to: here,
        freedoms: [2 * before, 2 * before + 1, beforeRotation, 2 * here, 2 * here + 1, hereRotation].map(
          (freedom, k) => (k % 3 === 2 ? -1 - freedom : freedom),
        ),
      });
      before = here;
      beforeRotation = hereRotation;
    }
  }
  const displacements = 2 * nodes.length;
  const index = (freedom: number): number => (freedom < 0 ? displacements - 1 - freedom : freedom);
  const size = displacements + rotations;
  const stiffness = Matrix.zeros(size, size);
  const forces = Matrix.zeros(size, 1);
  for (const bar of bars) {
    const k = globalStiffness(nodes, bar, EA, EI);
    for (let i = 0; i < 6; i++) {
      for (let j = 0; j < 6; j++) {
        const [row, column] = [index(bar.freedoms[i] as number), index(bar.freedoms[j] as number)];
        stiffness.set(row, column, stiffness.get(row, column) + k.get(i, j));
      }
    }
  }
  for (const { segment, ratio, at, force } of loads) {
    const node = nodeAt.get(`${segment} ${ratio}`) as number;
    const place = nodes[node] as XY;
    add(forces, 2 * node, force.x);
    add(forces, 2 * node + 1, force.y);
    const arm = (at.x - place.x) * force.y - (at.y - place.y) * force.x;
    // A load at the very beginning of a segment turns that segment, not the one before.
    const bar = ratio === 0 ? firstBar(bars, node) : undefined;
    const turned = bar === undefined ? -1 - (rotation[node] as number) : (bar.freedoms[2] as number);
    add(forces, index(turned), arm);
  }
  const last = nodes.length - 1;
  const held = new Set([0, 1, 2 * last, 2 * last + 1]);
  const free = Array.from({ length: size }, (_, i) => i).filter((i) => !held.has(i));
  const reduced = stiffness.selection(free, free);
  const right = forces.selection(free, [0]);
  let found = solve(reduced, right);
  // One step of refinement takes out the rounding of the elimination.
  found = Matrix.add(found, solve(reduced, Matrix.sub(right, reduced.mmul(found))));
  const moved = Matrix.zeros(size, 1);
  for (const [i, freedom] of free.entries()) moved.set(freedom, 0, found.get(i, 0));
  const total = Matrix.sub(stiffness.mmul(moved), forces);

  return {
    left: { x: total.get(0, 0), y: total.get(1, 0) },
    right: { x: total.get(2 * last, 0), y: total.get(2 * last + 1, 0) },
    cuts: cuts.map(({ segment, ratio }) => {
      const bar = bars[cutBar.get(`${segment} ${ratio}`) as number] as Bar;
      const ends = globalStiffness(nodes, bar, EA, EI).mmul(
        Matrix.columnVector(bar.freedoms.map((freedom) => moved.get(index(freedom), 0))),
      );
      const [a, b] = [nodes[bar.from] as XY, nodes[bar.to] as XY];
      const length = Math.hypot(b.x - a.x, b.y - a.y);
      const [c, s] = [(b.x - a.x) / length, (b.y - a.y) / length];
      // What the node presses on the bar's end: along it, it pulls; anticlockwise, it puts the lower face,
      // the intrados, in tension; across it, it pushes up against the shear that would raise the moment.
      const [fx, fy, m] = [ends.get(3, 0), ends.get(4, 0), ends.get(5, 0)];
      return { N: fx * c + fy * s, V: -(-fx * s + fy * c), M: m };
    }),
  };
}

function firstBar(bars: readonly Bar[], node: number): Bar | undefined {
  return bars.find(({ from }) => from === node);
}

function add(vector: Matrix, row: number, value: number): void {
  vector.set(row, 0, vector.get(row, 0) + value);
}

/**
 * Stiffness of a bar in global directions: EA/l along it, 12EI/l³, 6EI/l², 4EI/l and 2EI/l across it (any book on
 * matrix structural analysis; from memory).
 */
function globalStiffness(nodes: readonly XY[], bar: Bar, EA: number, EI: number): Matrix {
  const [a, b] = [nodes[bar.from] as XY, nodes[bar.to] as XY];
  const length = Math.hypot(b.x - a.x, b.y - a.y);
  const [c, s] = [(b.x - a.x) / length, (b.y - a.y) / length];
  const k = EA / length;
  const [p, q, r] = [(12 * EI) / length ** 3, (6 * EI) / length ** 2, (2 * EI) / length];
  const local = new Matrix([
    [k, 0, 0, -k, 0, 0],
    [0, p, q, 0, -p, q],
    [0, q, 2 * r, 0, -q, r],
    [-k, 0, 0, k, 0, 0],
    [0, -p, -q, 0, p, -q],
    [0, q, r, 0, -q, 2 * r],
  ]);
  const turn = new Matrix([
    [c, s, 0, 0, 0, 0],
    [-s, c, 0, 0, 0, 0],
    [0, 0, 1, 0, 0, 0],
    [0, 0, 0, c, s, 0],
    [0, 0, 0, -s, c, 0],
    [0, 0, 0, 0, 0, 1],
  ]);
  return turn.transpose().mmul(local).mmul(turn);
}
