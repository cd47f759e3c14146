import { describe, expect, it } from 'vitest';
import {
  distance,
  mirrored,
  motionBetween,
  moved,
  type Point,
  pointOf,
  turnAbout,
  turnOf,
} from '../../src/geometry/index.ts';
import { NONE } from '../../src/quantity/index.ts';
import { evaluate, finish, type Scalar, Trace } from '../../src/tape/index.ts';
import { prepared } from '../support/construction.ts';
import { randomFrom } from '../support/random.ts';

function figures(trace: Trace, scalars: readonly Scalar[]): number[] {
  return [...evaluate(finish(trace, scalars), [])];
}

const at = (trace: Trace, x: number, y: number): Point => pointOf(trace, x, y);

describe('a rigid motion', () => {
  it('keeps every distance to 1e-12, and turns by the angle between the chords', () => {
    for (let seed = 0; seed < 200; seed++) {
      const random = randomFrom(seed);
      const trace = new Trace();
      const any = () => at(trace, random(-60, 60), random(-60, 60));
      const [from, to, first, second, place] = [any(), any(), any(), any(), any()] as const;
      const angle = random(-3.1, 3.1);
      const turn = turnAbout(place, trace.constant(angle, NONE));
      const motion = motionBetween({ from, to }, { from: moved(turn, from), to: moved(turn, to) });
      const [before = 0, after = 0, turned = 0, gap = 0] = figures(trace, [
        distance(first, second),
        distance(moved(motion, first), moved(motion, second)),
        turnOf(motion),
        distance(moved(motion, first), moved(turn, first)),
      ]);
      expect(Math.abs(after - before)).toBeLessThan(1e-12 * Math.max(before, 60));
      expect(turned).toBeCloseTo(angle, 10);
      expect(gap).toBeLessThan(1e-11);
    }
  });

  it('of a chord that changes its length is a query that says by how much', () => {
    const trace = new Trace();
    const motion = motionBetween(
      { from: at(trace, 0, 0), to: at(trace, 4, 0) },
      { from: at(trace, 0, 0), to: at(trace, 0, 4.25) },
    );
    expect(prepared(trace, [moved(motion, at(trace, 1, 1)).x])().queries).toEqual([
      'The chord changes its length by 0.2500\u00a0m when it is moved: a rigid group keeps its shape, so make both chords equally long',
    ]);
  });
});

describe('a mirror', () => {
  it('twice is no change, keeps distances and leaves its own line alone', () => {
    for (let seed = 0; seed < 100; seed++) {
      const random = randomFrom(seed);
      const trace = new Trace();
      const any = () => at(trace, random(-60, 60), random(-60, 60));
      const line = { from: any(), to: any() };
      const [p, q] = [any(), any()];
      const twice = mirrored(mirrored(p, line), line);
      const [gap = 1, before = 0, after = 0, onLine = 1] = figures(trace, [
        distance(twice, p).squared(),
        distance(p, q),
        distance(mirrored(p, line), mirrored(q, line)),
        distance(mirrored(line.to, line), line.to),
      ]);
      expect(Math.sqrt(gap)).toBeLessThan(1e-11);
      expect(after).toBeCloseTo(before, 10);
      expect(onLine).toBeLessThan(1e-11);
    }
  });
});
