import type { XY } from './frame.ts';

/** A movement of the plane in plain numbers: how points, lengths and angles go to where they are wanted. */
export interface Transformation {
  readonly name: string;
  /** The factor of lengths. */
  readonly stretch: number;
  /** Whether left becomes right. */
  readonly flips: boolean;
  /** By how much directions turn, after a mirror, anticlockwise. */
  readonly turn: number;
  /** How large coordinates become, for their rounding. */
  readonly reach: number;
  point(at: XY): XY;
  /** Of a force or a direction: turned and mirrored only. */
  vector(of: XY): XY;
}

function transformation(
  name: string,
  { stretch = 1, flips = false, turn = 0, shift = { x: 0, y: 0 } }: Partial<Transformation> & { shift?: XY },
): Transformation {
  const [c, s] = [Math.cos(turn), Math.sin(turn)];
  const vector = ({ x, y }: XY): XY => {
    const u = flips ? -x : x;
    return { x: u * c - y * s, y: u * s + y * c };
  };
  return {
    name,
    stretch,
    flips,
    turn,
    reach: Math.hypot(shift.x, shift.y),
    vector,
    point: (at) => {
      const { x, y } = vector(at);
      return { x: x * stretch + shift.x, y: y * stretch + shift.y };
    },
  };
}

/** Turned, mirrored, scaled and shifted, and all of that at once; site coordinates of 100 km among them. */
export const TRANSFORMATIONS: readonly Transformation[] = [
  transformation('shifted', { shift: { x: 31.7, y: -12.3 } }),
  transformation('shifted to a site at 100 km', { shift: { x: 1e5, y: 3e4 } }),
  transformation('scaled down to a model', { stretch: 0.02 }),
  transformation('scaled up', { stretch: 40 }),
  transformation('turned by 17°', { turn: (17 * Math.PI) / 180 }),
  transformation('turned by a right angle', { turn: Math.PI / 2 }),
  transformation('turned upside down', { turn: Math.PI }),
  transformation('turned by −130°', { turn: (-130 * Math.PI) / 180 }),
  transformation('mirrored', { flips: true }),
  transformation('mirrored, turned, scaled and shifted', {
    flips: true,
    turn: 1.1,
    stretch: 3.5,
    shift: { x: -210, y: 77 },
  }),
];
