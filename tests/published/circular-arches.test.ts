import { describe, expect, it } from 'vitest';
import { HandArch } from '../support/handArch.ts';

/**
 * Semicircular three-hinged arches of two true arcs.
 *
 * Source: S. Timoshenko and D. H. Young, Theory of Structures, for the crown load and the load on plan; the ring under
 * uniform pressure from any book on the strength of materials (N = −pR); all from memory. The arch under its own weight
 * is statics by hand, as below. θ is counted from the left springing.
 */

const [R, Q] = [10, 6_000];

function semicircle(): HandArch {
  const at = (degrees: number) =>
    [-R * Math.cos((degrees * Math.PI) / 180), R * Math.sin((degrees * Math.PI) / 180)] as const;
  return new HandArch([
    ['springing', -R, 0],
    // Anywhere on the arcs will do, and the middle is no better.
    ['through', ...at(37)],
    ['crown', 0, R],
    ['through', ...at(144)],
    ['springing', R, 0],
  ]);
}

/** The place at θ in degrees. */
function at(arch: HandArch, degrees: number) {
  return degrees <= 90 ? arch.place(0, degrees / 90) : arch.place(1, degrees / 90 - 1);
}

/** The arch under a load of `size(θ)` for each radian, in `slices` equal slices each loaded at its middle. */
function sliced(slices: number, size: (theta: number) => readonly [x: number, y: number]): HandArch {
  const arch = semicircle();
  for (let i = 0; i < slices; i++) {
    const degrees = ((i + 0.5) * 180) / slices;
    const [x, y] = size((degrees * Math.PI) / 180);
    arch.load(at(arch, degrees), (x * Math.PI) / slices, (y * Math.PI) / slices);
  }
  return arch;
}

/**
 * Holds that a figure goes to its limit with the square of the slices, as sums by their middles do, where the cut is at
 * the edge of a slice: three times as many slices leave a ninth.
 */
function expectSecondOrder(figure: (slices: number) => number, exact: number, size: number): void {
  const [coarse, fine] = [figure(36) - exact, figure(108) - exact];
  expect(Math.abs(fine) / size).toBeLessThan(1e-3);
  // Where nothing is left to converge, both are rounding.
  if (Math.abs(coarse) / size > 1e-9) expect(coarse / fine).toBeCloseTo(9, 1);
}

const ANGLES = [15, 30, 45, 60, 75, 120, 165];

describe('a semicircular three-hinged arch', () => {
  it('under a load P at its crown has the thrust P/2 and M = (PR/2)(1 − cos θ − sin θ), least −0.2071 PR at 45°', () => {
    const P = 50_000;
    const arch = semicircle();
    arch.load(at(arch, 90), 0, -P);
    const { left, right } = arch.reactions();
    for (const [found, wanted] of [
      [left.x, P / 2],
      [left.y, P / 2],
      [right.x, -P / 2],
      [right.y, P / 2],
    ] as const) {
      expect(found).toBeCloseTo(wanted, 8);
    }
    for (const degrees of ANGLES) {
      const theta = ((degrees <= 90 ? degrees : 180 - degrees) * Math.PI) / 180;
      const wanted = ((P * R) / 2) * (1 - Math.cos(theta) - Math.sin(theta));
      for (const moment of arch.moments(at(arch, degrees))) expect(moment).toBeCloseTo(wanted, 6);
    }
    const least = (P * R * (1 - Math.SQRT2)) / 2;
    for (const moment of arch.moments(at(arch, 45))) {
      expect(moment).toBeCloseTo(least, 6);
      expect(moment / (P * R)).toBeCloseTo(-0.2071, 4);
    }
  });

  it('under its own weight q has the thrust qR(π/2 − 1) and the moments of statics by hand', () => {
    const weight = (slices: number) => sliced(slices, () => [0, -Q * R]);
    expectSecondOrder((slices) => weight(slices).reactions().left.x, Q * R * (Math.PI / 2 - 1), Q * R);
    for (const degrees of ANGLES) {
      const theta = ((degrees <= 90 ? degrees : 180 - degrees) * Math.PI) / 180;
      // V x − H y less the weight of the arc up to θ on its arm, ∫ q (cos φ − cos θ) R² dφ.
      const exact =
        Q * R ** 2 * ((Math.PI / 2) * (1 - Math.cos(theta) - Math.sin(theta)) + theta * Math.cos(theta));
      for (const route of [0, 1]) {
        expectSecondOrder(
          (slices) => {
            const arch = weight(slices);
            return arch.moments(at(arch, degrees))[route] as number;
          },
          exact,
          Q * R ** 2,
        );
      }
    }
  });

  it('under a uniform pressure on its extrados is a ring: N = −pR and no moment anywhere', () => {
    const pressed = (slices: number) =>
      sliced(slices, (theta) => [Q * R * Math.cos(theta), -Q * R * Math.sin(theta)]);
    expectSecondOrder((slices) => pressed(slices).reactions().left.y, Q * R, Q * R);
    for (const degrees of ANGLES) {
      for (const route of [0, 1]) {
        expectSecondOrder(
          (slices) => {
            const arch = pressed(slices);
            return arch.moments(at(arch, degrees))[route] as number;
          },
          0,
          Q * R ** 2,
        );
      }
      expectSecondOrder(
        (slices) => {
          const arch = pressed(slices);
          return arch.forces(at(arch, degrees)).N;
        },
        -Q * R,
        Q * R,
      );
    }
  });
});
