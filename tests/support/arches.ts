import {
  type Arch,
  type ArchMoment,
  archMoment,
  archThrough,
  type KeyPoint,
  type PlacedLoad,
  placeAlong,
  placeLoads,
  placeOnSegment,
} from '../../src/mechanics/index.ts';
import { FORCE, LENGTH, NONE } from '../../src/quantity/index.ts';
import { type Scalar, Trace } from '../../src/tape/index.ts';
import type { FrameArch, FrameLoad, XY } from './frame.ts';
import { randomFrom } from './random.ts';

/** What of an arch is known while tracing. */
export interface Structure {
  readonly kneesLeft: number;
  readonly kneesRight: number;
  /** Segment of each load. */
  readonly loads: readonly number[];
  readonly cut: number;
  /** Whether segments become arcs, through a point beside their middle. */
  readonly curved: boolean;
  /** Whether places are found while the tape runs, and not known while tracing. */
  readonly found: boolean;
}

/** The figures of an arch. */
export interface Case {
  readonly points: readonly XY[];
  readonly through: readonly XY[];
  readonly loads: readonly { readonly ratio: number; readonly off: XY; readonly force: XY }[];
  readonly cut: number;
  readonly perturbation: number;
}

export function randomStructure(seed: number, options: Partial<Structure> = {}): Structure {
  const random = randomFrom(seed);
  const [kneesLeft, kneesRight] = [random.whole(0, 3), random.whole(0, 3)];
  const segments = kneesLeft + kneesRight + 2;
  const loads = Array.from({ length: random.whole(1, 8) }, () => random.whole(0, segments - 1));
  return {
    kneesLeft,
    kneesRight,
    loads,
    cut: random.whole(0, segments - 1),
    curved: false,
    found: random(0, 1) < 0.5,
    ...options,
  };
}

/**
 * Figures for a structure. The crown lies anywhere over the span and at least 0.12 of it off the line of the
 * springings: nearer to that line all forces grow without bound, and digits are lost in both routes alike.
 */
export function randomCase(structure: Structure, seed: number): Case {
  const random = randomFrom(seed);
  const span = random(6, 80);
  const a = { x: random(-50, 50), y: random(-5, 5) };
  const b = { x: a.x + span, y: a.y + random(-0.25, 0.25) * span };
  const share = random(0.15, 0.85);
  const rise = random(0.12, 0.9) * span;
  const c = { x: a.x + (b.x - a.x) * share, y: a.y + (b.y - a.y) * share + rise };
  const half = (from: XY, to: XY, knees: number): XY[] => {
    const length = Math.hypot(to.x - from.x, to.y - from.y);
    return Array.from({ length: knees }, (_, i) => {
      const t = (i + random(0.75, 1.25)) / (knees + 1);
      // Mostly bulging outwards, sometimes the wrong way.
      const out = (random(0, 1) < 0.85 ? random(0.03, 0.3) : random(-0.1, 0.02)) * length;
      return {
        x: from.x + (to.x - from.x) * t - ((to.y - from.y) / length) * out,
        y: from.y + (to.y - from.y) * t + ((to.x - from.x) / length) * out,
      };
    });
  };
  const points = [a, ...half(a, c, structure.kneesLeft), c, ...half(c, b, structure.kneesRight), b];
  const through = points.slice(1).map((to, i) => {
    const from = points[i] as XY;
    const swell = random(0.05, 0.4) * (random(0, 1) < 0.2 ? -1 : 1);
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
  return { points, through, loads, cut: random(0.03, 0.97), perturbation: random(0.005, 0.03) };
}

/** A structure on a trace. */
export interface TracedArch {
  readonly trace: Trace;
  readonly arch: Arch;
  readonly loads: readonly PlacedLoad[];
  readonly perturbation: Scalar;
  readonly moment: ArchMoment;
  /** The inputs' values for a case, in the order of the trace's inputs. */
  inputs(figures: Case): number[];
}

export function traceStructure(structure: Structure): TracedArch {
  const trace = new Trace();
  const readers: ((figures: Case) => number)[] = [];
  const read = (dimension: typeof LENGTH, reader: (figures: Case) => number): Scalar => {
    readers.push(reader);
    return trace.input(`input ${readers.length}`, dimension);
  };
  const at = (list: 'points' | 'through', i: number) => ({
    x: read(LENGTH, (figures) => (figures[list][i] as XY).x),
    y: read(LENGTH, (figures) => (figures[list][i] as XY).y),
  });
  const { kneesLeft, kneesRight } = structure;
  const last = kneesLeft + kneesRight + 2;
  const keyPoints: KeyPoint[] = [];
  for (let i = 0; i <= last; i++) {
    const role = i === 0 || i === last ? 'springing' : i === kneesLeft + 1 ? 'crown' : 'knee';
    keyPoints.push({ role, point: at('points', i) });
    if (structure.curved && i < last) keyPoints.push({ role: 'through', point: at('through', i) });
  }
  const arch = archThrough(keyPoints);
  const loads = structure.loads.map((segment, i) => {
    const place = placeOnSegment(
      arch,
      segment,
      read(NONE, (figures) => figures.loads[i]?.ratio ?? 0),
    );
    const off = {
      x: read(LENGTH, (figures) => figures.loads[i]?.off.x ?? 0),
      y: read(LENGTH, (figures) => figures.loads[i]?.off.y ?? 0),
    };
    const force = {
      x: read(FORCE, (figures) => figures.loads[i]?.force.x ?? 0),
      y: read(FORCE, (figures) => figures.loads[i]?.force.y ?? 0),
    };
    return { at: { x: place.point.x.plus(off.x), y: place.point.y.plus(off.y) }, force, place };
  });
  const known = placeOnSegment(
    arch,
    structure.cut,
    read(NONE, (figures) => figures.cut),
  );
  const perturbation = trace.mark(read(NONE, (figures) => figures.perturbation));
  const placed = structure.found
    ? placeLoads(
        arch,
        loads.map((load) => ({ at: load.at, force: load.force, tiedTo: load.place.point })),
      )
    : loads;
  const cut = structure.found ? placeAlong(arch, known.along) : known;
  return {
    trace,
    arch,
    loads: placed,
    perturbation,
    moment: archMoment(arch, placed, cut, perturbation),
    inputs: (figures) => readers.map((reader) => reader(figures)),
  };
}

/** The same case for the independent solution. */
export function frameOf(structure: Structure, figures: Case): { arch: FrameArch; loads: FrameLoad[] } {
  const { points } = figures;
  const loads = structure.loads.map((segment, i) => {
    const { ratio, off, force } = figures.loads[i] as Case['loads'][number];
    const [from, to] = [points[segment] as XY, points[segment + 1] as XY];
    const place = { x: from.x + (to.x - from.x) * ratio, y: from.y + (to.y - from.y) * ratio };
    return { segment, ratio, at: { x: place.x + off.x, y: place.y + off.y }, force };
  });
  return { arch: { points, crown: structure.kneesLeft + 1 }, loads };
}
