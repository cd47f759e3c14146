import { describe, expect, it } from 'vitest';
import { type FrameArch, type FrameCut, type FrameLoad, solveFrame, type XY } from './frame.ts';
import { randomFrom } from './random.ts';

/** The plane-frame solution by itself, so that it is known to be right before the program is held against it. */

/** Expects a figure within a share of a scale. */
function near(value: number | undefined, expected: number, scale: number, share = 1e-11): void {
  expect(Math.abs((value ?? Number.NaN) - expected) / scale, `${value}, not ${expected}`).toBeLessThan(share);
}

const down = (force: number): XY => ({ x: 0, y: -force });

function placeOn({ points }: FrameArch, { segment, ratio }: FrameCut): XY {
  const [from, to] = [points[segment] as XY, points[segment + 1] as XY];
  return { x: from.x + (to.x - from.x) * ratio, y: from.y + (to.y - from.y) * ratio };
}

/** A force on the axis itself. */
function on(arch: FrameArch, segment: number, ratio: number, force: XY): FrameLoad {
  return { segment, ratio, at: placeOn(arch, { segment, ratio }), force };
}

/** A uniform load on a segment, in equal parts at the middles of equal lengths: the same resultant. */
function inParts(arch: FrameArch, segment: number, parts: number, total: XY): FrameLoad[] {
  const force = { x: total.x / parts, y: total.y / parts };
  return Array.from({ length: parts }, (_, i) => on(arch, segment, (i + 0.5) / parts, force));
}

/**
 * A uniform load on plan, brought to the two ends of each segment as a beam between them would: the moments at
 * the points of the axis stay the same.
 */
function atPoints(arch: FrameArch, segments: number, w: number): FrameLoad[] {
  return Array.from({ length: segments }, (_, i) => {
    const half = (w * ((arch.points[i + 1] as XY).x - (arch.points[i] as XY).x)) / 2;
    return [on(arch, i, 0, down(half)), on(arch, i, 1, down(half))];
  }).flat();
}

/** The end of each segment but the last. */
function ends(arch: FrameArch): FrameCut[] {
  return arch.points.slice(2).map((_, segment) => ({ segment, ratio: 1 }));
}

const [h, f, span, w] = [4.5, 3, 24, 7000];
/** A gable frame: columns of 4.5 m, a roof that rises 3 m, 24 m wide. */
const gable: FrameArch = {
  points: [
    { x: 0, y: 0 },
    { x: 0, y: h },
    { x: span / 2, y: h + f },
    { x: span, y: h },
    { x: span, y: 0 },
  ],
  crown: 2,
};

/** Two bars in a triangle of sides 5, 5 and 8 m. */
const triangle: FrameArch = {
  points: [
    { x: 0, y: 0 },
    { x: 4, y: 3 },
    { x: 8, y: 0 },
  ],
  crown: 1,
};

const rise = 6;
const parabola: FrameArch = {
  points: Array.from({ length: 17 }, (_, i) => {
    const x = (span * i) / 16;
    return { x, y: (4 * rise * x * (span - x)) / span ** 2 };
  }),
  crown: 8,
};

describe('a gable frame (Kleinlogel, Rigid Frame Formulas; from memory)', () => {
  it('presses outward with wL²/8(h+f) under a load on plan, and bends −Hh at the knees', () => {
    const loads = [
      ...inParts(gable, 1, 6, down((w * span) / 2)),
      ...inParts(gable, 2, 6, down((w * span) / 2)),
    ];
    const { left, right, cuts } = solveFrame(gable, loads, ends(gable));
    const H = (w * span ** 2) / (8 * (h + f));
    near(left.x, H, H);
    near(right.x, -H, H);
    near(left.y, (w * span) / 2, H);
    near(right.y, (w * span) / 2, H);
    near(cuts[0]?.M, -H * h, H * h);
    near(cuts[1]?.M, 0, H * h);
    near(cuts[2]?.M, -H * h, H * h);
    near(cuts[0]?.N, (-w * span) / 2, H);
    near(cuts[0]?.V, -H, H);
  });

  it('has a thrust of wh²/4(h+f) at the right under wind on the left column', () => {
    const { left, right, cuts } = solveFrame(gable, inParts(gable, 0, 5, { x: w * h, y: 0 }), ends(gable));
    const H = (w * h ** 2) / (4 * (h + f));
    near(right.x, -H, H);
    near(left.x, H - w * h, w * h);
    near(right.y, (w * h ** 2) / (2 * span), H);
    near(left.y, (-w * h ** 2) / (2 * span), H);
    // The left knee by hand: what is left of the wind's push after the column's share.
    near(cuts[0]?.M, (w * h - H) * h - (w * h ** 2) / 2, w * h ** 2);
    near(cuts[2]?.M, -H * h, w * h ** 2);
  });
});

describe('arches of a known shape (Timoshenko and Young, Theory of Structures; from memory)', () => {
  it('the parabola carries a full load on plan without bending, with a thrust of wL²/8f', () => {
    const { left, cuts } = solveFrame(parabola, atPoints(parabola, 16, w), ends(parabola));
    const H = (w * span ** 2) / (8 * rise);
    near(left.x, H, H);
    for (const { M } of cuts) near(M, 0, w * span ** 2);
  });

  it('the parabola loaded on its left half bends ±wL²/64 at its quarter points, with a thrust of wL²/16f', () => {
    const { left, right, cuts } = solveFrame(parabola, atPoints(parabola, 8, w), ends(parabola));
    const [H, M] = [(w * span ** 2) / (16 * rise), (w * span ** 2) / 64];
    near(left.x, H, H);
    near(left.y, (3 * w * span) / 8, H);
    near(right.y, (w * span) / 8, H);
    near(cuts[3]?.M, M, M);
    near(cuts[7]?.M, 0, M);
    near(cuts[11]?.M, -M, M);
  });

  it('a force P at a distance a from the left makes a thrust of Pa/2f', () => {
    for (const knee of [1, 4, 8]) {
      const a = (parabola.points[knee] as XY).x;
      const { left } = solveFrame(parabola, [on(parabola, knee - 1, 1, down(w))], []);
      near(left.x, (w * a) / (2 * rise), w);
    }
  });

  it('the quarter point of the parabola bends 3L/32 under a force of 1 there, −L/16 under one at the crown', () => {
    const cut = { segment: 3, ratio: 1 };
    near(solveFrame(parabola, [on(parabola, 3, 1, down(1))], [cut]).cuts[0]?.M, (3 * span) / 32, span);
    near(solveFrame(parabola, [on(parabola, 7, 1, down(1))], [cut]).cuts[0]?.M, -span / 16, span);
  });

  it('the semicircle bends (wR²/2)(sin²θ − sin θ) under a load on plan, −wR²/8 at 30°', () => {
    const R = 10;
    const angle = (i: number): number => (Math.PI * i) / 24;
    const semicircle: FrameArch = {
      points: Array.from({ length: 25 }, (_, i) => ({
        x: -R * Math.cos(angle(i)),
        y: R * Math.sin(angle(i)),
      })),
      crown: 12,
    };
    const { cuts } = solveFrame(semicircle, atPoints(semicircle, 24, w), ends(semicircle));
    for (const [i, { M }] of cuts.entries()) {
      const sin = Math.sin(angle(i + 1));
      near(M, ((w * R ** 2) / 2) * (sin ** 2 - sin), w * R ** 2);
    }
    near(cuts[3]?.M, (-w * R ** 2) / 8, w * R ** 2);
  });
});

describe('statics by hand', () => {
  it('two bars under a force at the crown are pressed, and do not bend', () => {
    const load = on(triangle, 0, 1, down(6));
    const { left, right, cuts } = solveFrame(
      triangle,
      [load],
      [
        { segment: 0, ratio: 0.25 },
        { segment: 1, ratio: 0.5 },
      ],
    );
    near(left.x, 4, 4);
    near(left.y, 3, 4);
    near(right.x, -4, 4);
    near(right.y, 3, 4);
    for (const { N, V, M } of cuts) {
      near(N, -5, 5);
      near(V, 0, 5);
      near(M, 0, 5);
    }
  });

  it('a force of 10 on a bracket, 1 beside and 2 below the middle of the left bar, turns it there', () => {
    // About A: 10·3 = 8 B, so B = 3.75 upwards; about C: 3 H = 4·3.75, so H = 5.
    const load = { segment: 0, ratio: 0.5, at: { x: 3, y: -0.5 }, force: down(10) };
    const { left, right, cuts } = solveFrame(
      triangle,
      [load],
      [
        { segment: 0, ratio: 0.5 },
        { segment: 0, ratio: 0.625 },
      ],
    );
    near(left.x, 5, 10);
    near(left.y, 6.25, 10);
    near(right.x, -5, 10);
    near(right.y, 3.75, 10);
    // Before the bracket 6.25·2 − 5·1.5; beyond it, from the right, 3.75·5.5 − 5·1.875.
    const [before, beyond] = cuts;
    near(before?.M, 5, 10);
    near(before?.N, -7.75, 10);
    near(before?.V, 2, 10);
    near(beyond?.M, 11.25, 10);
    near(beyond?.N, -1.75, 10);
    near(beyond?.V, -6, 10);
  });

  it('a bracket at the crown turns the half that it is tied to', () => {
    const at = { x: 4, y: 5 };
    const force = { x: 6, y: 0 };
    // About A and B: ±30/8 upwards. About C, whichever half is free of the force: H = 3.75·4/3.
    const tiedLeft = solveFrame(triangle, [{ segment: 0, ratio: 1, at, force }], [{ segment: 0, ratio: 1 }]);
    near(tiedLeft.left.y, -3.75, 6);
    near(tiedLeft.right.x, -5, 6);
    near(tiedLeft.left.x, -1, 6);
    near(tiedLeft.cuts[0]?.M, -12, 6);
    const tiedRight = solveFrame(triangle, [{ segment: 1, ratio: 0, at, force }], [{ segment: 0, ratio: 1 }]);
    near(tiedRight.left.y, -3.75, 6);
    near(tiedRight.left.x, -5, 6);
    near(tiedRight.right.x, -1, 6);
    near(tiedRight.cuts[0]?.M, 0, 6);
  });

  it('a force on a springing goes into the ground', () => {
    const loads = [on(triangle, 0, 0, { x: 2, y: -3 }), on(triangle, 1, 1, { x: -5, y: -7 })];
    const { left, right, cuts } = solveFrame(triangle, loads, [{ segment: 0, ratio: 0.5 }]);
    near(left.x, -2, 7);
    near(left.y, 3, 7);
    near(right.x, 5, 7);
    near(right.y, 7, 7);
    near(cuts[0]?.N, 0, 7);
  });
  it('a cut where a segment begins lies before the loads of that place', () => {
    const begins = [0, 1, 2, 3].map((segment) => ({ segment, ratio: 0 }));
    const loads = begins.map(({ segment }) => {
      const { at, ...load } = on(gable, segment, 0, { x: 300, y: -1000 });
      return { ...load, at: { x: at.x + 1, y: at.y } };
    });
    const { cuts } = solveFrame(gable, loads, [...begins, ...ends(gable)]);
    // At a knee the moment goes on as it is, N and V by the same force in another direction.
    for (const i of [1, 2, 3]) {
      const [begin, end] = [cuts[i], cuts[i + 3]];
      near(begin?.M, end?.M ?? Number.NaN, 1e4);
      near(Math.hypot(begin?.N ?? 0, begin?.V ?? 0), Math.hypot(end?.N ?? 0, end?.V ?? 0), 1e3);
    }
    near(cuts[0]?.M, 0, 1e4);
    near(cuts[5]?.M, 0, 1e4);
  });

  it('no load, no force', () => {
    const { left, cuts, displacements } = solveFrame(gable, [], [{ segment: 1, ratio: 0.5 }]);
    near(left.x, 0, 1);
    near(cuts[0]?.M, 0, 1);
    near(displacements[2]?.y, 0, 1);
  });
});

describe('displacements', () => {
  it('two bars shorten: the crown goes down by P l / (2 EA sin²α) (statics by hand, Hooke)', () => {
    const EA = 3e6;
    const { displacements } = solveFrame(triangle, [on(triangle, 0, 1, down(600))], [], { EA });
    const drop = (600 * 5) / (2 * EA * 0.6 ** 2);
    near(displacements[1]?.y, -drop, drop);
    near(displacements[1]?.x, 0, drop);
  });

  it('a square portal sags PL²(h + L/2)/(24 EI) by bending, and by its shortening (unit load by hand)', () => {
    const [EA, EI, L, P] = [2e8, 4e6, 10, 5000];
    const portal: FrameArch = {
      points: [
        { x: 0, y: 0 },
        { x: 0, y: h },
        { x: L / 2, y: h },
        { x: L, y: h },
        { x: L, y: 0 },
      ],
      crown: 2,
    };
    const bending = (P * L ** 2 * (h + L / 2)) / (24 * EI);
    // Columns carry P/2, the beam PL/4h.
    const shortening = (P * h) / (2 * EA) + (P * L ** 3) / (16 * h ** 2 * EA);
    const { displacements } = solveFrame(portal, [on(portal, 1, 1, down(P))], [], { EA, EI });
    near(displacements[2]?.y, -(bending + shortening), bending, 1e-9);
  });

  it('mirror in a symmetric arch under a symmetric load', () => {
    const { displacements } = solveFrame(
      parabola,
      inParts(parabola, 7, 3, down(w)).concat(inParts(parabola, 8, 3, down(w))),
      [],
    );
    const largest = Math.max(...displacements.map(({ y }) => Math.abs(y)));
    for (const [i, { x, y }] of displacements.entries()) {
      const mirrored = displacements[16 - i] as XY;
      near(-mirrored.x, x, largest, 1e-9);
      near(mirrored.y, y, largest, 1e-9);
    }
    near(displacements[8]?.x, 0, largest, 1e-9);
  });

  it('are reciprocal: the first load moves the place of the second as the second moves that of the first (Maxwell)', () => {
    const stiffness = { EA: 1e8, EI: 2e7 };
    for (const [i, j] of [
      [1, 2],
      [1, 3],
      [2, 3],
    ] as const) {
      const first = solveFrame(gable, [on(gable, i - 1, 1, { x: 1, y: 0 })], [], stiffness).displacements[j];
      const second = solveFrame(gable, [on(gable, j - 1, 1, { x: 0, y: 1 })], [], stiffness).displacements[i];
      near(first?.y, second?.x ?? Number.NaN, 1e-6, 1e-9);
    }
  });

  it('depend on the stiffness, but the forces do not', () => {
    const loads = inParts(gable, 1, 3, { x: 500, y: -2000 });
    const cuts = [{ segment: 1, ratio: 0.3 }];
    const [soft, stiff] = [
      { EA: 1e6, EI: 1e6 },
      { EA: 5e9, EI: 3e8 },
    ].map((stiffness) => solveFrame(gable, loads, cuts, stiffness));
    near(soft?.left.x, stiff?.left.x ?? Number.NaN, 2000);
    near(soft?.cuts[0]?.M, stiff?.cuts[0]?.M ?? Number.NaN, 1e4);
    expect(Math.abs(soft?.displacements[2]?.y ?? 0)).toBeGreaterThan(
      100 * Math.abs(stiff?.displacements[2]?.y ?? Number.NaN),
    );
  });
});

/** Moment about a point of a force at another, anticlockwise. */
function momentAbout(about: XY, at: XY, force: XY): number {
  return (at.x - about.x) * force.y - (at.y - about.y) * force.x;
}

function randomArch(random: ReturnType<typeof randomFrom>): FrameArch {
  const span = random(5, 100);
  const [left, right] = [random.whole(1, 5), random.whole(1, 5)];
  const [skew, flat] = [random(-0.3, 0.3) * span, random(0.1, 0.8) * span];
  const share = random(0.2, 0.8);
  const points = Array.from({ length: left + right + 1 }, (_, i) => {
    const t = i <= left ? (share * i) / left : share + ((1 - share) * (i - left)) / right;
    const fixed = i === 0 || i === left || i === left + right;
    const out = t < share ? t / share : (1 - t) / (1 - share);
    return {
      x: span * t + (fixed ? 0 : random(-0.1, 0.1) * (span / (left + right))),
      y: skew * t + flat * (fixed ? out : Math.sqrt(out) * random(0.8, 1.2)),
    };
  });
  return { points, crown: left };
}

/**
 * Expects equilibrium of a solved arch: of all of it, of its left part at the crown, and of all to the left of each
 * cut. In a statically determinate arch only one set of forces does that. Answers the worst share of the largest.
 */
function imbalance(arch: FrameArch, loads: readonly FrameLoad[], cuts: readonly FrameCut[]): number {
  const { left, right, cuts: found } = solveFrame(arch, loads, cuts);
  const [a, b] = [arch.points[0] as XY, arch.points.at(-1) as XY];
  const size = Math.hypot(b.x - a.x, b.y - a.y);
  const force = Math.max(
    ...[left, right, ...loads.map((load) => load.force)].map(({ x, y }) => Math.hypot(x, y)),
  );
  /** All that acts on the arch before a place, and its moment about the place. */
  const before = (cut: FrameCut, about: XY): { x: number; y: number; moment: number } => {
    const total = { ...left, moment: momentAbout(about, a, left) };
    for (const load of loads) {
      const after = load.segment > cut.segment || (load.segment === cut.segment && load.ratio >= cut.ratio);
      if (after) continue;
      total.x += load.force.x;
      total.y += load.force.y;
      total.moment += momentAbout(about, load.at, load.force);
    }
    return total;
  };
  const all = before({ segment: arch.points.length, ratio: 0 }, b);
  const crown = before({ segment: arch.crown, ratio: 0 }, arch.points[arch.crown] as XY);
  const shares = [
    (all.x + right.x) / force,
    (all.y + right.y) / force,
    all.moment / (force * size),
    crown.moment / (force * size),
  ];
  for (const [i, cut] of cuts.entries()) {
    const { N, V, M } = found[i] as (typeof found)[number];
    const [from, to] = [arch.points[cut.segment] as XY, arch.points[cut.segment + 1] as XY];
    const length = Math.hypot(to.x - from.x, to.y - from.y);
    const [x, y] = [(to.x - from.x) / length, (to.y - from.y) / length];
    const total = before(cut, placeOn(arch, cut));
    shares.push((N + total.x * x + total.y * y) / force);
    shares.push((V - total.y * x + total.x * y) / force);
    shares.push((M + total.moment) / (force * size));
  }
  return Math.max(
    ...shares.map((share) => (Number.isFinite(share) ? Math.abs(share) : Number.POSITIVE_INFINITY)),
  );
}

describe('random arches', () => {
  const worst = (seed: number, ratio: (random: ReturnType<typeof randomFrom>) => number): number => {
    let largest = 0;
    for (let i = 0; i < 1000; i++) {
      const random = randomFrom(seed + i);
      const arch = randomArch(random);
      const place = (): FrameCut => ({
        segment: random.whole(0, arch.points.length - 2),
        ratio: ratio(random),
      });
      const loads = Array.from({ length: random.whole(1, 8) }, () => {
        const tied = place();
        const { x, y } = placeOn(arch, tied);
        const at = random(0, 1) < 0.5 ? { x, y } : { x: x + random(-2, 2), y: y + random(-2, 2) };
        return { ...tied, at, force: { x: random(-2e4, 2e4), y: random(-5e4, 1e4) } };
      });
      largest = Math.max(largest, imbalance(arch, loads, Array.from({ length: 4 }, place)));
    }
    return largest;
  };

  it('are in equilibrium as a whole, at the crown and to the left of each cut, to 1e-11', () => {
    expect(worst(1, (random) => random.whole(1, 12) / 12)).toBeLessThan(1e-11);
  });
  it('also where places lie anywhere', () => {
    expect(worst(5000, (random) => random(0, 1))).toBeLessThan(1e-11);
  });

  it('also where places lie together or next to each other, or at the ends of a segment', () => {
    const ratio = (random: ReturnType<typeof randomFrom>): number => {
      const near = random(0, 1) < 0.5 ? 0 : 10 ** random(-18, -2);
      return [near, 0.5 - near, 0.5 + near, 1 - near][random.whole(0, 3)] as number;
    };
    expect(worst(9000, ratio)).toBeLessThan(1e-11);
  });
});

describe('what is no frame', () => {
  it('is refused: hinges on one line, places off the axis, a crown at a springing', () => {
    const flat = { ...triangle, points: triangle.points.map(({ x }) => ({ x, y: 0 })) };
    expect(() => solveFrame(flat, [on(flat, 0, 1, down(1))], [])).toThrow('mechanism');
    expect(() => solveFrame(triangle, [], [{ segment: 2, ratio: 0 }])).toThrow('no place');
    expect(() => solveFrame(triangle, [], [{ segment: 1, ratio: 1.1 }])).toThrow('no place');
    expect(() => solveFrame({ ...triangle, crown: 2 }, [], [])).toThrow('crown hinge');
  });
});
