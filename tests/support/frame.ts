import { CholeskyDecomposition, Matrix } from 'ml-matrix';

/**
 * A plane frame solved by the direct stiffness method: straight bars with axial and bending stiffness
 * (Euler–Bernoulli), three freedoms at a node. It shares no code and no method with the program, and so is a
 * check on it. SI units.
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

/** A place on the axis: a segment, counted from 0, and how far along it, from 0 to 1. */
export interface FrameCut {
  readonly segment: number;
  readonly ratio: number;
}

/** A force that is carried at a place of a segment, by a rigid arm where it acts elsewhere. */
export interface FrameLoad extends FrameCut {
  readonly at: XY;
  readonly force: XY;
}

/** Internal forces: tension, rate of change of the moment along the axis, moment with the intrados in tension. */
export interface FrameForces {
  readonly N: number;
  readonly V: number;
  readonly M: number;
}

export interface FrameResult {
  /** Of the ground on the arch. */
  readonly left: XY;
  readonly right: XY;
  /** Just before each cut: a load at the very place of the cut counts as after it. */
  readonly cuts: readonly FrameForces[];
  /** Of each point of the axis, in metres where the stiffness was given. */
  readonly displacements: readonly XY[];
}

/**
 * Places nearer than this share of the arch's size are joined at one node by rigid arms. Stiffness grows with the
 * cube of the nearness: beyond it the digits of the longer bars would be lost in the sums at the node.
 */
const NEAR = 1e-4;

/** A node of the frame. Its rotation before it and after it is one freedom, but for the hinges. */
interface Node {
  readonly at: XY;
  readonly x: number;
  readonly y: number;
  readonly rotationBefore: number;
  readonly rotationAfter: number;
}

/** A bar between two nodes, with the forces in it: they grow with each step of the solution. */
interface Bar {
  readonly from: Node;
  readonly to: Node;
  readonly along: XY;
  readonly length: number;
  readonly freedoms: readonly number[];
  tension: number;
  shear: number;
  momentBefore: number;
}

/** A node of one segment, with the segment's bars that end and begin at it. */
interface Stop {
  readonly ratio: number;
  readonly node: Node;
  ends?: Bar;
  begins?: Bar;
}

/**
 * Solves the frame.
 *
 * The forces in a statically determinate frame do not depend on its stiffness, which unless given (EA in N, EI in
 * N m²) is chosen so that the equations are well conditioned; displacements then have no scale.
 *
 * Throws where the hinges lie on one line, or so near it that the forces are not found to 11 digits.
 */
export function solveFrame(
  arch: FrameArch,
  loads: readonly FrameLoad[],
  cuts: readonly FrameCut[],
  stiffness: { readonly EA?: number; readonly EI?: number } = {},
): FrameResult {
  const { points, crown } = arch;
  const last = points.length - 1;
  if (!(crown > 0 && crown < last)) throw new Error('the crown hinge must lie between the springings');
  for (const { segment, ratio } of [...loads, ...cuts]) {
    if (!(segment in points && segment < last && ratio >= 0 && ratio <= 1)) {
      throw new Error(`there is no place ${segment}, ${ratio} on the axis`);
    }
  }
  // Lengths in sizes of the arch, forces in sizes of the load, EI = 1: the equations are free of units.
  const origin = points[0] as XY;
  const size = Math.max(...points.map((point) => Math.hypot(point.x - origin.x, point.y - origin.y)));
  const unit = Math.max(0, ...loads.map(({ force }) => Math.hypot(force.x, force.y))) || 1;
  const EA = stiffness.EA ?? (stiffness.EI === undefined ? 1 : stiffness.EI * (10 / size) ** 2);
  const EI = stiffness.EI ?? EA * (size / 10) ** 2;
  const axial = (EA * size ** 2) / EI;
  const scaled = ({ x, y }: XY): XY => ({ x: (x - origin.x) / size, y: (y - origin.y) / size });

  let freedoms = 0;
  const nodeAt = (at: XY, hinge: boolean): Node => {
    const [x, y, rotationBefore] = [freedoms, freedoms + 1, freedoms + 2];
    freedoms += hinge ? 4 : 3;
    return { at, x, y, rotationBefore, rotationAfter: freedoms - 1 };
  };
  const corners = points.map((point, i) => nodeAt(scaled(point), i === crown));
  const bars: Bar[] = [];
  const stops = Array.from({ length: last }, (_, segment) => {
    const [from, to] = [corners[segment] as Node, corners[segment + 1] as Node];
    const run = { x: to.at.x - from.at.x, y: to.at.y - from.at.y };
    const length = Math.hypot(run.x, run.y);
    const along = { x: run.x / length, y: run.y / length };
    const found: Stop[] = [{ ratio: 0, node: from }];
    const ratios = [...loads, ...cuts].filter((one) => one.segment === segment).map(({ ratio }) => ratio);
    for (const ratio of ratios.sort((a, b) => a - b)) {
      const near = NEAR / length;
      if (ratio - (found.at(-1) as Stop).ratio < near || 1 - ratio < near) continue;
      const at = { x: from.at.x + run.x * ratio, y: from.at.y + run.y * ratio };
      found.push({ ratio, node: nodeAt(at, false) });
    }
    found.push({ ratio: 1, node: to });
    for (const [i, stop] of found.slice(1).entries()) {
      const before = found[i] as Stop;
      const bar: Bar = {
        from: before.node,
        to: stop.node,
        along,
        length: (stop.ratio - before.ratio) * length,
        freedoms: [
          ...[before.node.x, before.node.y, before.node.rotationAfter],
          ...[stop.node.x, stop.node.y, stop.node.rotationBefore],
        ],
        tension: 0,
        shear: 0,
        momentBefore: 0,
      };
      before.begins = bar;
      stop.ends = bar;
      bars.push(bar);
    }
    return found;
  });
  /** The stop that a place of a segment is joined to. */
  const stopOf = ({ segment, ratio }: FrameCut): Stop => {
    const found = stops[segment] as Stop[];
    const distance = (stop: Stop): number => Math.abs(stop.ratio - ratio);
    return found.reduce((best, stop) => (distance(stop) < distance(best) ? stop : best));
  };

  const placed = loads.map(({ segment, ratio, at, force }) => {
    const place = { segment, ratio, stop: stopOf({ segment, ratio }) };
    return { ...place, at: scaled(at), force: { x: force.x / unit, y: force.y / unit } };
  });
  const applied = new Float64Array(freedoms);
  for (const { stop, at, force } of placed) {
    const { node } = stop;
    increase(applied, node.x, force.x);
    increase(applied, node.y, force.y);
    // At the crown a load turns the side that it is tied to.
    const turned = stop.begins === undefined ? node.rotationBefore : node.rotationAfter;
    increase(applied, turned, momentAbout(node.at, at, force));
  }

  const [left, right] = [corners[0] as Node, corners[last] as Node];
  const held = new Set([left.x, left.y, right.x, right.y]);
  const free = Array.from({ length: freedoms }, (_, i) => i).filter((i) => !held.has(i));
  const solve = solver(assemble(bars, freedoms, axial).selection(free, free));
  const moved = new Float64Array(freedoms);
  let rest = applied;
  let error = Number.POSITIVE_INFINITY;
  // Each step puts what the bars do not yet carry on the frame. The forces are added up rather than found from the
  // displacements, whose differences over a short bar have lost digits that the forces of a small step still have.
  for (let step = 0; step < 12; step++) {
    const more = solve(free.map((freedom) => rest[freedom] as number));
    const change = new Float64Array(freedoms);
    for (const [i, freedom] of free.entries()) change[freedom] = more[i] as number;
    for (const [i, value] of change.entries()) increase(moved, i, value);
    for (const bar of bars) deform(bar, change, axial);
    rest = applied.map((force) => force);
    for (const bar of bars) {
      for (const [i, force] of endForces(bar).entries()) increase(rest, bar.freedoms[i] as number, -force);
    }
    const now = Math.max(...free.map((freedom) => Math.abs(rest[freedom] as number)));
    if (!(now < error / 2)) break;
    error = now;
  }
  const largest = Math.max(...bars.flatMap((bar) => endForces(bar).map(Math.abs)));
  if (!(error <= 1e-11 * largest || largest === 0)) throw new Error('the frame is too near a mechanism');

  const ground = (node: Node): XY => ({
    x: -(rest[node.x] as number) * unit,
    y: -(rest[node.y] as number) * unit,
  });
  return {
    left: ground(left),
    right: ground(right),
    cuts: cuts.map((cut) => {
      const stop = stopOf(cut);
      const [from, to] = [corners[cut.segment] as Node, corners[cut.segment + 1] as Node];
      const at = {
        x: from.at.x + (to.at.x - from.at.x) * cut.ratio,
        y: from.at.y + (to.at.y - from.at.y) * cut.ratio,
      };
      // What the part before the cut presses on the part after it, about the cut: the end of the bar, and the
      // loads of the same node that lie between the bar's end and the cut.
      const first = stop.ends === undefined;
      const bar = (stop.ends ?? stop.begins) as Bar;
      const [x, y, turn] = (first ? endForces(bar).slice(0, 3) : endForces(bar).slice(3).map(opposite)) as [
        number,
        number,
        number,
      ];
      const total = { x, y, moment: turn + momentAbout(at, stop.node.at, { x, y }) };
      for (const load of placed) {
        if (load.stop !== stop || load.ratio < cut.ratio === first) continue;
        const sign = first ? -1 : 1;
        total.x += sign * load.force.x;
        total.y += sign * load.force.y;
        total.moment += sign * momentAbout(at, load.at, load.force);
      }
      const { along } = bar;
      return {
        N: -(total.x * along.x + total.y * along.y) * unit,
        V: (total.y * along.x - total.x * along.y) * unit,
        M: -total.moment * unit * size,
      };
    }),
    displacements: corners.map((node) => {
      const scale = (unit * size ** 3) / EI;
      return { x: (moved[node.x] as number) * scale, y: (moved[node.y] as number) * scale };
    }),
  };
}

/** The moment about a point of a force that acts at another, anticlockwise. */
function momentAbout(about: XY, at: XY, force: XY): number {
  return (at.x - about.x) * force.y - (at.y - about.y) * force.x;
}

function opposite(value: number): number {
  return -value;
}

function increase(values: Float64Array, i: number, by: number): void {
  values[i] = (values[i] as number) + by;
}

/**
 * How the end displacements and rotations of a bar lengthen it and turn its ends away from its chord: the rows of
 * stretch, turn before and turn after.
 */
function deformations({ along: { x, y }, length }: Bar): readonly (readonly number[])[] {
  const [turnX, turnY] = [y / length, x / length];
  return [
    [-x, -y, 0, x, y, 0],
    [-turnX, turnY, 1, turnX, -turnY, 0],
    [-turnX, turnY, 0, turnX, -turnY, 1],
  ];
}

/**
 * The stiffness of the frame, of EI = 1: EA/l against stretch, 4EI/l and 2EI/l against the turns of the ends (any
 * book on matrix structural analysis; from memory).
 */
function assemble(bars: readonly Bar[], freedoms: number, axial: number): Matrix {
  const total = Matrix.zeros(freedoms, freedoms);
  for (const bar of bars) {
    const rows = new Matrix(deformations(bar).map((row) => [...row]));
    const basic = new Matrix([
      [axial, 0, 0],
      [0, 4, 2],
      [0, 2, 4],
    ]).div(bar.length);
    const ends = rows.transpose().mmul(basic).mmul(rows);
    for (const [i, row] of bar.freedoms.entries()) {
      for (const [j, column] of bar.freedoms.entries()) {
        total.set(row, column, total.get(row, column) + ends.get(i, j));
      }
    }
  }
  return total;
}

/** Solves for a right side, the equations first scaled to a diagonal of ones. */
function solver(stiffness: Matrix): (right: readonly number[]) => number[] {
  const scale = stiffness.diagonal().map((value) => 1 / Math.sqrt(value));
  const balanced = Matrix.zeros(scale.length, scale.length);
  for (const [i, a] of scale.entries()) {
    // The two halves are rounded differently, and the decomposition asks for the same.
    for (const [j, b] of scale.slice(0, i + 1).entries()) {
      const value = stiffness.get(i, j) * a * b;
      balanced.set(i, j, value);
      balanced.set(j, i, value);
    }
  }
  const decomposition = new CholeskyDecomposition(balanced);
  if (!decomposition.isPositiveDefinite()) throw new Error('the frame is a mechanism');
  return (right) => {
    const column = Matrix.columnVector(right.map((value, i) => value * (scale[i] as number)));
    return decomposition
      .solve(column)
      .getColumn(0)
      .map((value, i) => value * (scale[i] as number));
  };
}

/** Adds to the forces in a bar what a small movement of its ends makes. */
function deform(bar: Bar, change: Float64Array, axial: number): void {
  const { from, to, along, length } = bar;
  const [byX, byY] = [
    (change[to.x] as number) - (change[from.x] as number),
    (change[to.y] as number) - (change[from.y] as number),
  ];
  const chord = (byY * along.x - byX * along.y) / length;
  const before = (change[from.rotationAfter] as number) - chord;
  const after = (change[to.rotationBefore] as number) - chord;
  bar.tension += (axial * (byX * along.x + byY * along.y)) / length;
  bar.shear += (6 * (before + after)) / length ** 2;
  bar.momentBefore -= (4 * before + 2 * after) / length;
}

/**
 * Forces and moments of the nodes on a bar, first where it begins and then where it ends. A moment that puts the
 * intrados (below, where the bar runs to the right) in tension turns its beginning clockwise, its end anticlockwise.
 */
function endForces({ along, length, tension, shear, momentBefore }: Bar): number[] {
  const x = -tension * along.x - shear * along.y;
  const y = -tension * along.y + shear * along.x;
  return [x, y, -momentBefore, -x, -y, momentBefore + shear * length];
}
