import {
  type Arch,
  archMoment,
  archThrough,
  internalForces,
  type Place,
  type PlacedLoad,
  placeOnSegment,
  type Role,
  reactions,
} from '../../src/mechanics/index.ts';
import { FORCE, NONE } from '../../src/quantity/index.ts';
import { type Scalar, Trace } from '../../src/tape/index.ts';
import { keyPoints, prepared } from './construction.ts';
import type { XY } from './frame.ts';

/** An arch given in plain numbers, as a book gives it, with what the program says of it in plain numbers. */
export class HandArch {
  readonly trace = new Trace();
  readonly arch: Arch;
  private readonly loads: PlacedLoad[] = [];

  constructor(points: readonly (readonly [role: Role, x: number, y: number])[]) {
    this.arch = archThrough(keyPoints(this.trace, points));
  }

  /** A place on a segment, which is counted from 0. */
  place(segment: number, ratio: number): Place {
    return placeOnSegment(this.arch, segment, this.trace.constant(ratio, NONE));
  }

  /** The place of a corner: of a springing, a knee or the crown, counted from 0 at the left springing. */
  corner(i: number): Place {
    return i === 0 ? this.place(0, 0) : this.place(i - 1, 1);
  }

  load(place: Place, x: number, y: number): this {
    const force = { x: this.trace.constant(x, FORCE), y: this.trace.constant(y, FORCE) };
    this.loads.push({ at: place.point, place, force });
    return this;
  }

  /**
   * A uniform load over a straight segment by half of it at either end. For all corners and for the reactions that is
   * the same load; within the segment the spread load bends more, like a beam between the ends.
   */
  spread(segment: number, x: number, y: number): this {
    return this.load(this.corner(segment), x / 2, y / 2).load(this.corner(segment + 1), x / 2, y / 2);
  }

  read(scalars: readonly Scalar[]): readonly number[] {
    const { values, queries } = prepared(this.trace, scalars)();
    if (queries.length > 0) throw new Error(queries.join('; '));
    return values;
  }

  /** The moment at a place by virtual work and by equilibrium. */
  moments(place: Place): readonly number[] {
    const p = this.trace.mark(this.trace.constant(1e-4, NONE));
    const { virtualWork, forces } = archMoment(this.arch, this.loads, place, p);
    return this.read([virtualWork.limit, forces.moment]);
  }

  forces(place: Place): { readonly N: number; readonly V: number } {
    const { axial, shear } = internalForces(this.arch, this.loads, reactions(this.arch, this.loads), place);
    const [N = Number.NaN, V = Number.NaN] = this.read([axial, shear]);
    return { N, V };
  }

  /** What the ground presses on the springings with. */
  reactions(): { readonly left: XY; readonly right: XY } {
    const { left, right } = reactions(this.arch, this.loads);
    const [lx = Number.NaN, ly = Number.NaN, rx = Number.NaN, ry = Number.NaN] = this.read([
      left.x,
      left.y,
      right.x,
      right.y,
    ]);
    return { left: { x: lx, y: ly }, right: { x: rx, y: ry } };
  }
}

/** The corners of a polygon on a parabola, at equal steps on plan: y = 4 f x (L − x) / L². */
export function parabola(span: number, rise: number, steps: number): (readonly [Role, number, number])[] {
  return Array.from({ length: steps + 1 }, (_, i): readonly [Role, number, number] => {
    const x = (span * i) / steps;
    const role = i === 0 || i === steps ? 'springing' : i === steps / 2 ? 'crown' : 'knee';
    return [role, x, (4 * rise * x * (span - x)) / span ** 2];
  });
}
