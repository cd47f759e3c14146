import type { Scalar } from '../tape/index.ts';

/** A place on a drawing, in metres. */
export interface XY {
  readonly x: number;
  readonly y: number;
}

/** One thing to draw, in metres and newtons. How it looks is for the drawing to say. */
export type Mark =
  | { readonly mark: 'point'; readonly at: XY }
  | { readonly mark: 'line'; readonly from: XY; readonly to: XY }
  | { readonly mark: 'circle'; readonly centre: XY; readonly radius: number }
  | { readonly mark: 'curve'; readonly points: readonly XY[] }
  | {
      readonly mark: 'axis';
      readonly points: readonly XY[];
      readonly springings: readonly [XY, XY];
      readonly crown: XY;
      readonly knees: readonly XY[];
    }
  | { readonly mark: 'load'; readonly at: XY; readonly force: XY; readonly tie?: XY }
  | { readonly mark: 'reaction'; readonly at: XY; readonly force: XY }
  /** A perturbed mechanism: its axis, and the circles that found it. */
  | {
      readonly mark: 'mechanism';
      readonly points: readonly XY[];
      readonly hinges: readonly XY[];
      readonly circles: readonly { readonly centre: XY; readonly radius: number }[];
    }
  /** Bending moments along an axis: places, unit normals towards the intrados, values. */
  | {
      readonly mark: 'moments';
      readonly points: readonly XY[];
      readonly normals: readonly XY[];
      readonly values: readonly number[];
    }
  /** An arch repeated along its bays, with members of a depth and breadth. */
  | {
      readonly mark: 'hall';
      readonly points: readonly XY[];
      readonly bays: number;
      readonly spacing: number;
      readonly depth: number;
      readonly breadth: number;
      readonly purlins: readonly XY[];
    };

/** A value with figures in place of its scalars, and without its functions. */
export type Figures<T> = T extends Scalar
  ? number
  : T extends (...args: never[]) => unknown
    ? undefined
    : T extends readonly (infer U)[]
      ? readonly Figures<U>[]
      : T extends object
        ? { readonly [K in keyof T]: Figures<T[K]> }
        : T;
