import { type Point, pointOf } from '../../src/geometry/index.ts';
import type { KeyPoint } from '../../src/mechanics/index.ts';
import { type Dimension, LENGTH } from '../../src/quantity/index.ts';
import {
  failedGuards,
  finish,
  queryText,
  registersFor,
  run,
  type Scalar,
  Trace,
} from '../../src/tape/index.ts';

/** What a person would see of a construction: its figures, the texts of its queries, and the figures in those. */
export interface Outcome {
  readonly values: readonly number[];
  readonly queries: readonly string[];
  readonly figures: readonly number[];
}

export type Construction = (...values: readonly number[]) => Outcome;

/** A construction on a trace of its own, to be run at many places: one number for each dimension. */
export function construction(
  dimensions: readonly Dimension[],
  build: (inputs: readonly Scalar[], trace: Trace) => readonly Scalar[],
): Construction {
  const trace = new Trace();
  const inputs = dimensions.map((dimension, i) => trace.input(`input ${i}`, dimension));
  return prepared(trace, build(inputs, trace));
}

/** What the scalars of a trace come to, run by run. */
export function prepared(trace: Trace, scalars: readonly Scalar[]): Construction {
  const tape = finish(trace, scalars);
  const registers = registersFor(tape);
  return (...values) => {
    run(tape, values, registers);
    const failed = failedGuards(tape, registers);
    return {
      values: Array.from(tape.outputs, (register) => registers[register] as number),
      queries: failed.map((query) => queryText(query)),
      figures: failed.flatMap(({ figures }) => figures.map(({ value }) => value)),
    };
  };
}

/** A construction of points and lengths alone: two numbers for each point, then one for each length. */
export function drawing(
  points: number,
  lengths: number,
  build: (points: readonly Point[], lengths: readonly Scalar[], trace: Trace) => readonly Scalar[],
): Construction {
  return construction(new Array<Dimension>(2 * points + lengths).fill(LENGTH), (inputs, trace) => {
    const at = (i: number): Point => ({ x: inputs[2 * i] as Scalar, y: inputs[2 * i + 1] as Scalar });
    return build(
      Array.from({ length: points }, (_, i) => at(i)),
      inputs.slice(2 * points),
      trace,
    );
  });
}

export function flat(...points: readonly Point[]): Scalar[] {
  return points.flatMap(({ x, y }) => [x, y]);
}

const FIGURE = /\d[^:]*(m|°|\u2032|\u2033)/;
const REMEDY =
  /\b(bring|change|give|lengthen|link|lower|make|move|put|raise|say|shorten|take|tie|turn)\b[^:]*$/i;

/**
 * What is wrong with an outcome, in words; '' where nothing is. A construction either gives finite figures or says
 * in a query what is wrong, by how much (a figure with its unit) and what to change.
 */
export function complaint({ values, queries }: Outcome): string {
  if (queries.length === 0) {
    return values.every(Number.isFinite) ? '' : `${values.join(', ')}, and no query says why`;
  }
  for (const text of queries) {
    if (text.includes('?')) return `a figure is missing: ${text}`;
    if (!FIGURE.test(text)) return `no figure with a unit: ${text}`;
    if (!REMEDY.test(text)) return `nothing to change: ${text}`;
  }
  return '';
}

/** Key points given in metres. */
export function keyPoints(
  trace: Trace,
  points: readonly (readonly [role: KeyPoint['role'], x: number, y: number])[],
): KeyPoint[] {
  return points.map(([role, x, y]) => ({ role, point: pointOf(trace, x, y) }));
}
