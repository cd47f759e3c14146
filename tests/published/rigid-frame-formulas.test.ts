import { describe, expect, it } from 'vitest';
import { HandArch } from '../support/handArch.ts';

/**
 * Three-hinged frames: the rectangular portal with a hinge in the middle of its beam, and the symmetric gable frame.
 *
 * Source: A. Kleinlogel, Rigid Frame Formulas; V. Leontovich, Frames and Arches. From memory; each value can be
 * followed by statics by hand. Forces in N, lengths in m; the knee moment is positive with the intrados in tension.
 */

const [SPAN, COLUMN, ROOF, W, P] = [24, 6, 4, 5_000, 30_000];
const HEIGHT = COLUMN + ROOF;

/** Rounding of figures of some hundred kN and kN·m. */
const [N, NM] = [1e-8, 1e-7];

function frame(roof: number): HandArch {
  return new HandArch([
    ['springing', 0, 0],
    ['knee', 0, COLUMN],
    ['crown', SPAN / 2, COLUMN + roof],
    ['knee', SPAN, COLUMN],
    ['springing', SPAN, 0],
  ]);
}

function expectFrame(
  of: HandArch,
  wanted: {
    readonly left: readonly [x: number, y: number];
    readonly right: readonly [x: number, y: number];
    readonly knees: readonly [left: number, right: number];
  },
): void {
  const { left, right } = of.reactions();
  const found = [left.x, left.y, right.x, right.y];
  for (const [i, value] of [...wanted.left, ...wanted.right].entries()) {
    expect(Math.abs((found[i] as number) - value), `reaction ${i}`).toBeLessThan(N);
  }
  for (const [i, corner] of [1, 3].entries()) {
    for (const [route, moment] of of.moments(of.corner(corner)).entries()) {
      const gap = Math.abs(moment - (wanted.knees[i] as number));
      expect(gap, `knee ${i + 1}, route ${route + 1}`).toBeLessThan(NM);
    }
  }
}

describe('a three-hinged rectangular portal', () => {
  it('under a uniform load on its beam has the thrust wL²/8h and −wL²/8 at its corners', () => {
    const portal = frame(0)
      .spread(1, 0, -W * (SPAN / 2))
      .spread(2, 0, -W * (SPAN / 2));
    const thrust = (W * SPAN ** 2) / (8 * COLUMN);
    expectFrame(portal, {
      left: [thrust, (W * SPAN) / 2],
      right: [-thrust, (W * SPAN) / 2],
      knees: [(-W * SPAN ** 2) / 8, (-W * SPAN ** 2) / 8],
    });
    // A beam is cut at the quarter point: −wL²/32. The halves of the load at the ends leave out w(L/4)²/2 of it.
    for (const moment of portal.moments(portal.place(1, 0.5))) {
      const beam = (W * (SPAN / 2) ** 2) / 8;
      expect(Math.abs(moment + beam - (-W * SPAN ** 2) / 32)).toBeLessThan(NM);
    }
  });

  it('under a horizontal load at a corner has half of it at either springing and ±Ph/2 at its corners', () => {
    const portal = frame(0);
    portal.load(portal.corner(1), P, 0);
    expectFrame(portal, {
      left: [-P / 2, (-P * COLUMN) / SPAN],
      right: [-P / 2, (P * COLUMN) / SPAN],
      knees: [(P * COLUMN) / 2, (-P * COLUMN) / 2],
    });
  });

  it('under wind on its left column has 3wh/4 and wh/4 at its springings and ±wh²/4 at its corners', () => {
    const portal = frame(0).spread(0, W * COLUMN, 0);
    expectFrame(portal, {
      left: [-(3 / 4) * W * COLUMN, (-W * COLUMN ** 2) / (2 * SPAN)],
      right: [-(1 / 4) * W * COLUMN, (W * COLUMN ** 2) / (2 * SPAN)],
      knees: [(W * COLUMN ** 2) / 4, (-W * COLUMN ** 2) / 4],
    });
  });
});

describe('a symmetric three-hinged gable frame', () => {
  it('under a uniform load on plan has the thrust wL²/8(h+f) and −Hh at its knees', () => {
    const gable = frame(ROOF)
      .spread(1, 0, -W * (SPAN / 2))
      .spread(2, 0, -W * (SPAN / 2));
    const thrust = (W * SPAN ** 2) / (8 * HEIGHT);
    expectFrame(gable, {
      left: [thrust, (W * SPAN) / 2],
      right: [-thrust, (W * SPAN) / 2],
      knees: [-thrust * COLUMN, -thrust * COLUMN],
    });
  });

  it('loaded on its left half only has the thrust wL²/16(h+f)', () => {
    const gable = frame(ROOF).spread(1, 0, -W * (SPAN / 2));
    const thrust = (W * SPAN ** 2) / (16 * HEIGHT);
    expectFrame(gable, {
      left: [thrust, (3 / 8) * W * SPAN],
      right: [-thrust, (1 / 8) * W * SPAN],
      knees: [-thrust * COLUMN, -thrust * COLUMN],
    });
  });

  it('under a load at its ridge has the thrust PL/4(h+f)', () => {
    const gable = frame(ROOF);
    gable.load(gable.corner(2), 0, -P);
    const thrust = (P * SPAN) / (4 * HEIGHT);
    expectFrame(gable, {
      left: [thrust, P / 2],
      right: [-thrust, P / 2],
      knees: [-thrust * COLUMN, -thrust * COLUMN],
    });
  });

  it('under uniform wind on its left column has the right-hand thrust wh²/4(h+f)', () => {
    const gable = frame(ROOF).spread(0, W * COLUMN, 0);
    const right = (W * COLUMN ** 2) / (4 * HEIGHT);
    const uplift = (W * COLUMN ** 2) / (2 * SPAN);
    const left = W * COLUMN - right;
    expectFrame(gable, {
      left: [-left, -uplift],
      right: [-right, uplift],
      knees: [left * COLUMN - (W * COLUMN ** 2) / 2, -right * COLUMN],
    });
  });

  it('under a horizontal load at its left knee has the right-hand thrust Ph/2(h+f)', () => {
    const gable = frame(ROOF);
    gable.load(gable.corner(1), P, 0);
    const right = (P * COLUMN) / (2 * HEIGHT);
    expectFrame(gable, {
      left: [right - P, (-P * COLUMN) / SPAN],
      right: [-right, (P * COLUMN) / SPAN],
      knees: [(P - right) * COLUMN, -right * COLUMN],
    });
  });

  it('under a horizontal load at its ridge has half of it at either springing and ±Ph/2 at its knees', () => {
    const gable = frame(ROOF);
    gable.load(gable.corner(2), P, 0);
    expectFrame(gable, {
      left: [-P / 2, (-P * HEIGHT) / SPAN],
      right: [-P / 2, (P * HEIGHT) / SPAN],
      knees: [(P * COLUMN) / 2, (-P * COLUMN) / 2],
    });
  });
});
