import { describe, expect, it } from 'vitest';
import type { Role } from '../../src/mechanics/index.ts';
import { HandArch } from '../support/handArch.ts';
import { randomFrom } from '../support/random.ts';

/**
 * Under vertical loads the moment at any point of an arch is the thrust times the vertical distance between the axis
 * and the linear arch, which is the moment line of a simple beam to the scale of the thrust.
 *
 * Source: H. T. Eddy, Researches in Graphical Statics (1878), known as his theorem; from memory.
 */

interface Drawn {
  readonly points: readonly (readonly [Role, number, number])[];
  /** Loads at places on plan, downwards. */
  readonly loads: readonly { readonly segment: number; readonly ratio: number; readonly down: number }[];
}

/** An arch whose axis goes on from left to right all the way, with springings at different levels. */
function drawn(seed: number): Drawn {
  const random = randomFrom(seed);
  const knees = [random.whole(0, 3), random.whole(0, 3)] as const;
  const count = knees[0] + knees[1] + 3;
  let x = random(-20, 20);
  const [level, rise] = [random(-4, 4), random(5, 15)];
  const crown = knees[0] + 1;
  const points = Array.from({ length: count }, (_, i): readonly [Role, number, number] => {
    x += i === 0 ? 0 : random(1, 8);
    if (i === 0) return ['springing', x, 0];
    if (i === count - 1) return ['springing', x, level];
    return [i === crown ? 'crown' : 'knee', x, rise * random(0.6, 1) + (i === crown ? 2 : 0)];
  });
  const loads = Array.from({ length: random.whole(1, 6) }, () => ({
    segment: random.whole(0, count - 2),
    ratio: random(0, 1),
    down: random(1e3, 50e3),
  }));
  return { points, loads };
}

describe('the thrust times the distance of the linear arch from the axis', () => {
  it('is the moment by both routes at all knees and stations of 150 arches under vertical loads', () => {
    for (let seed = 0; seed < 150; seed++) {
      const { points, loads } = drawn(seed);
      const arch = new HandArch(points);
      const at = (segment: number, ratio: number) => {
        const [[, x0, y0], [, x1, y1]] = [points[segment], points[segment + 1]] as [
          readonly [Role, number, number],
          readonly [Role, number, number],
        ];
        return { x: x0 + (x1 - x0) * ratio, y: y0 + (y1 - y0) * ratio };
      };
      for (const { segment, ratio, down } of loads) arch.load(arch.place(segment, ratio), 0, -down);
      const [from, to] = [at(0, 0), at(points.length - 2, 1)];
      const span = to.x - from.x;
      // The simple beam of the same span under the same loads.
      const beam = (x: number): number =>
        loads.reduce((total, { segment, ratio, down }) => {
          const a = at(segment, ratio).x - from.x;
          const here = x - from.x;
          return total + down * (here <= a ? (here * (span - a)) / span : (a * (span - here)) / span);
        }, 0);
      const above = ({ x, y }: { x: number; y: number }): number =>
        y - from.y - ((to.y - from.y) * (x - from.x)) / span;
      const crown = points.findIndex(([role]) => role === 'crown');
      const c = at(crown, 0);
      const thrust = beam(c.x) / above(c);
      expect(Math.abs(arch.reactions().left.x / thrust - 1), `seed ${seed}`).toBeLessThan(1e-12);
      for (let segment = 0; segment < points.length - 1; segment++) {
        for (const ratio of [0.35, 1]) {
          if (ratio === 1 && points[segment + 1]?.[0] !== 'knee') continue;
          const here = at(segment, ratio);
          const linear = beam(here.x) / thrust;
          for (const moment of arch.moments(arch.place(segment, ratio))) {
            const gap = Math.abs(moment - thrust * (linear - above(here)));
            // Of moments of the size of H times the rise.
            expect(gap / (thrust * above(c)), `seed ${seed}, segment ${segment}`).toBeLessThan(1e-12);
          }
        }
      }
    }
  });
});
