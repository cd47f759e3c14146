import { describe, expect, it } from 'vitest';
import type { Role } from '../../src/mechanics/index.ts';
import { HandArch } from '../support/handArch.ts';

/**
 * "As hangs the flexible line, so but inverted will stand the rigid arch."
 *
 * Source: R. Hooke, A Description of Helioscopes (1676), as an anagram; from memory. The chain of equal links with a
 * weight at each joint is statics by hand: the slopes of the links grow by equal steps W/H from the lowest joint.
 */

/** Links of one length to each side of the crown, in the shape in which they hang with weights W at every joint. */
function chain(links: number, length: number, weightOverThrust: number, turned: -1 | 1) {
  const slope = (i: number): number => Math.atan((i + 0.5) * weightOverThrust);
  const half: [number, number][] = [[0, 0]];
  for (let i = 0; i < links; i++) {
    const [x, y] = half[i] as [number, number];
    half.push([x + length * Math.cos(slope(i)), y + turned * length * Math.sin(slope(i))]);
  }
  const right = half.slice(1);
  const left = right.map(([x, y]) => [-x, y] as [number, number]).reverse();
  const points = [...left, [0, 0] as [number, number], ...right];
  const last = points.length - 1;
  return points.map(([x, y], i): readonly [Role, number, number] => [
    i === 0 || i === last ? 'springing' : i === links ? 'crown' : 'knee',
    x,
    y,
  ]);
}

describe('an arch in the shape of a hanging chain', () => {
  const [LINKS, LENGTH, WEIGHT, THRUST] = [7, 2.5, 12_000, 40_000];

  it.each([
    ['inverted, stands in compression', -1],
    ['as it hangs, is in tension', 1],
  ] as const)('%s alone: no moment at any joint or within a link', (_, turned) => {
    const arch = new HandArch(chain(LINKS, LENGTH, WEIGHT / THRUST, turned));
    for (let i = 1; i < 2 * LINKS; i++) arch.load(arch.corner(i), 0, -WEIGHT);
    const { left, right } = arch.reactions();
    expect(left.x).toBeCloseTo(-turned * THRUST, 7);
    expect(right.x).toBeCloseTo(turned * THRUST, 7);
    expect(left.y).toBeCloseTo(WEIGHT * (LINKS - 0.5), 7);
    for (let segment = 0; segment < 2 * LINKS; segment++) {
      // Counted from the crown; the first link on either side carries half of the crown's weight.
      const i = segment < LINKS ? LINKS - 1 - segment : segment - LINKS;
      const { N, V } = arch.forces(arch.place(segment, 0.4));
      expect(N).toBeCloseTo(turned * Math.hypot(THRUST, (i + 0.5) * WEIGHT), 7);
      expect(V).toBeCloseTo(0, 7);
      for (const ratio of [0.4, 1]) {
        // The springings and the crown are hinges, and can't be cut for a moment.
        if (ratio === 1 && (segment === LINKS - 1 || segment === 2 * LINKS - 1)) continue;
        for (const moment of arch.moments(arch.place(segment, ratio))) {
          // Rounding of H times the rise, some 300 kN·m.
          expect(Math.abs(moment)).toBeLessThan(1e-10 * THRUST * LINKS * LENGTH);
        }
      }
    }
  });

  it('bends under anything else, as under one more weight', () => {
    const arch = new HandArch(chain(LINKS, LENGTH, WEIGHT / THRUST, -1));
    for (let i = 1; i < 2 * LINKS; i++) arch.load(arch.corner(i), 0, -WEIGHT);
    arch.load(arch.corner(3), 0, -WEIGHT);
    for (const moment of arch.moments(arch.corner(3))) expect(moment).toBeGreaterThan(1e4);
  });
});
