import type { Case, Structure } from './arches.ts';
import type { XY } from './frame.ts';
import { randomFrom } from './random.ts';

type Random = ReturnType<typeof randomFrom>;

/** Where the hinges of an arch are, and how far its knees bulge out of the lines between them. */
interface Shape {
  /** The crown's place along the line of the springings, as a share of their distance, and its rise off it. */
  readonly share: number;
  readonly rise: number;
  /** By how much the line of the springings rises from left to right, as an angle. */
  readonly slope: number;
  readonly bulge: () => number;
  /** The places of knees along the line of their hinges, as shares of it. */
  readonly along: (i: number, count: number) => number;
}

/** Kinds of arches that nobody would draw, and everybody passes through while dragging a point. */
export interface Ugliness {
  readonly name: string;
  shape(random: Random): Partial<Shape>;
  /** What is done to the points in the end. */
  finish?(points: XY[], structure: Structure, random: Random): XY[];
  loads?(loads: Case['loads'], random: Random): Case['loads'];
}

/**
 * The flattest arch here has its crown this share of the span off the line of the springings. A flatter one has a
 * moment by both routes too, but half the chord of its circles loses digits as the inverse square of that share: below
 * 1e-3 an agreement of 1e-10 is no longer to be had in a straight half.
 */
export const FLATTEST = 2e-3;

export const UGLINESS: readonly Ugliness[] = [
  {
    name: 'flat',
    shape: (random) => ({ rise: FLATTEST * 10 ** random(0, 1), share: random(0.2, 0.8) }),
  },
  { name: 'steep as a needle', shape: (random) => ({ rise: random(1.5, 6), share: random(0.1, 0.9) }) },
  {
    name: 'with one springing far above the other',
    shape: (random) => ({ slope: random(0.6, 1.4) * (random(0, 1) < 0.5 ? -1 : 1), rise: random(0.15, 1) }),
  },
  {
    name: 'with the crown beyond a springing',
    shape: (random) => ({
      share: random(0, 1) < 0.5 ? random(-0.8, -0.05) : random(1.05, 1.8),
      rise: random(0.2, 1),
    }),
  },
  {
    name: 'hanging, with the crown below the springings',
    shape: (random) => ({ rise: -random(0.1, 0.9), bulge: () => random(-0.3, 0.1) }),
  },
  {
    name: 'folded, with the axis crossing itself',
    shape: (random) => ({ bulge: () => random(-1.2, 1.2), along: () => random(-0.4, 1.4) }),
  },
  {
    name: 'with knees close to one another and to the hinges',
    shape: (random) => {
      const near = random(0, 1) < 0.5 ? 0.002 : 0.99;
      return { along: (i) => near + i * 0.002, bulge: () => random(0.001, 0.01) };
    },
  },
  {
    name: 'with the crown close to a springing',
    shape: (random) => {
      const left = random(0, 1) < 0.5;
      return { share: left ? 0.01 : 0.99, rise: random(0.02, 0.05) };
    },
  },
  {
    name: 'of columns and beams on round figures',
    shape: () => ({ slope: 0, rise: 0.5, share: 0.5 }),
    finish: (points, { kneesLeft, kneesRight }) => {
      const rows: readonly (readonly XY[])[] = [
        [],
        [{ x: 0, y: 6 }],
        [
          { x: 0, y: 4 },
          { x: 4, y: 6 },
        ],
        [
          { x: 0, y: 3 },
          { x: 3, y: 3 },
          { x: 3, y: 6 },
        ],
      ];
      const left = rows[kneesLeft] as readonly XY[];
      const right = (rows[kneesRight] as readonly XY[]).map(({ x, y }) => ({ x: 20 - x, y })).reverse();
      const made = [{ x: 0, y: 0 }, ...left, { x: 10, y: 6 }, ...right, { x: 20, y: 0 }];
      if (made.length !== points.length) throw new Error('a row of knees for each number of them');
      return made;
    },
  },
  {
    name: 'at a dead point, the last knee in line with the crown and the springing beyond it',
    shape: (random) => ({ rise: random(0.2, 0.5) }),
    finish: (points, { kneesLeft }, random) => {
      if (kneesLeft === 0) return points;
      const [crown, end] = [points[kneesLeft + 1] as XY, points.at(-1) as XY];
      const back = random(0.1, 0.5);
      const knee = { x: crown.x + (crown.x - end.x) * back, y: crown.y + (crown.y - end.y) * back };
      return points.map((point, i) => (i === kneesLeft ? knee : point));
    },
  },
  {
    name: 'under one load a million times the others',
    shape: (random) => ({ share: random(0.2, 0.8), rise: random(0.15, 0.8) }),
    loads: (loads, random) => {
      const heavy = random.whole(0, loads.length - 1);
      return loads.map((load, i) => ({
        ...load,
        force: i === heavy ? load.force : { x: load.force.x * 1e-6, y: load.force.y * 1e-6 },
      }));
    },
  },
  {
    name: 'with loads hung from as far off as the span',
    shape: (random) => ({ share: random(0.2, 0.8), rise: random(0.15, 0.8) }),
    loads: (loads, random) =>
      loads.map((load) => ({ ...load, off: { x: random(-20, 20), y: random(-20, 20) } })),
  },
];

/** Figures for a structure. Knees are at least 0.002 of their half's chord apart, hinges 0.01 of the span. */
export function uglyCase(ugliness: Ugliness, structure: Structure, seed: number): Case {
  const random = randomFrom(seed);
  const shape: Shape = {
    share: random(0.15, 0.85),
    rise: random(0.15, 0.9),
    slope: random(-0.25, 0.25),
    bulge: () => random(-0.1, 0.3),
    along: (i, count) => (i + random(0.75, 1.25)) / (count + 1),
    ...ugliness.shape(random),
  };
  const span = random(6, 60);
  const a = { x: random(-20, 20), y: random(-5, 5) };
  const [u, v] = [Math.cos(shape.slope) * span, Math.sin(shape.slope) * span];
  const b = { x: a.x + u, y: a.y + v };
  const c = {
    x: a.x + u * shape.share - v * shape.rise,
    y: a.y + v * shape.share + u * shape.rise,
  };
  const half = (from: XY, to: XY, knees: number): XY[] =>
    Array.from({ length: knees }, (_, i) => {
      const [t, out] = [shape.along(i, knees), shape.bulge()];
      const [dx, dy] = [to.x - from.x, to.y - from.y];
      return { x: from.x + dx * t - dy * out, y: from.y + dy * t + dx * out };
    });
  let points = [a, ...half(a, c, structure.kneesLeft), c, ...half(c, b, structure.kneesRight), b];
  points = ugliness.finish?.(points, structure, random) ?? points;
  const through = points.slice(1).map((to, i) => {
    const from = points[i] as XY;
    const swell = random(0.05, 0.9) * (random(0, 1) < 0.3 ? -1 : 1);
    return {
      x: (from.x + to.x) / 2 - (to.y - from.y) * swell,
      y: (from.y + to.y) / 2 + (to.x - from.x) * swell,
    };
  });
  const loads = structure.loads.map(() => ({
    ratio: random(0, 1),
    off: random(0, 1) < 0.7 ? { x: 0, y: 0 } : { x: random(-3, 3), y: random(-4, 1) },
    force: { x: random(-40e3, 40e3), y: random(-60e3, 20e3) },
  }));
  return {
    points,
    through,
    loads: ugliness.loads?.(loads, random) ?? loads,
    cut: random(0.03, 0.97),
    perturbation: 1e-5,
  };
}

/** One structure for every number of knees on either side, cut here and there, under one to eight loads. */
export function everyStructure(seed: number, options: Partial<Structure> = {}): Structure[] {
  return Array.from({ length: 16 }, (_, i) => {
    const random = randomFrom(seed * 16 + i);
    const [kneesLeft, kneesRight] = [i % 4, Math.floor(i / 4)];
    const segments = kneesLeft + kneesRight + 2;
    return {
      kneesLeft,
      kneesRight,
      loads: Array.from({ length: random.whole(1, 8) }, () => random.whole(0, segments - 1)),
      cut: random.whole(0, segments - 1),
      curved: false,
      found: false,
      ...options,
    };
  });
}
