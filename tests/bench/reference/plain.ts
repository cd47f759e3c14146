import { LEFT_SEGMENTS, LOADS, STATIONS } from './case.ts';

/**
 * The reference arch as one would write it by hand on objects, without a tape: the same figures by the same
 * methods, the exact limit by numbers that carry their slope. It is what the tape is measured against.
 */

interface Pair {
  readonly x: number;
  readonly y: number;
}

const add = (a: Pair, b: Pair): Pair => ({ x: a.x + b.x, y: a.y + b.y });
const subtract = (a: Pair, b: Pair): Pair => ({ x: a.x - b.x, y: a.y - b.y });
const scale = (a: Pair, f: number): Pair => ({ x: a.x * f, y: a.y * f });
const cross = (a: Pair, b: Pair): number => a.x * b.y - a.y * b.x;
const dot = (a: Pair, b: Pair): number => a.x * b.x + a.y * b.y;
const distance = (a: Pair, b: Pair): number => Math.sqrt(dot(subtract(b, a), subtract(b, a)));

interface Load {
  readonly at: Pair;
  readonly force: Pair;
  readonly segment: number;
  readonly along: number;
}

/** A number and its slope by the perturbation. */
interface Dual {
  readonly v: number;
  readonly d: number;
}

interface DualPair {
  readonly x: Dual;
  readonly y: Dual;
}

const still = (v: number): Dual => ({ v, d: 0 });
const plus = (a: Dual, b: Dual): Dual => ({ v: a.v + b.v, d: a.d + b.d });
const minus = (a: Dual, b: Dual): Dual => ({ v: a.v - b.v, d: a.d - b.d });
const times = (a: Dual, b: Dual): Dual => ({ v: a.v * b.v, d: a.d * b.v + a.v * b.d });
const over = (a: Dual, b: Dual): Dual => ({ v: a.v / b.v, d: (a.d - (a.v / b.v) * b.d) / b.v });
const root = (a: Dual): Dual => ({ v: Math.sqrt(a.v), d: a.d / (2 * Math.sqrt(a.v)) });
const cosine = (a: Dual): Dual => ({ v: Math.cos(a.v), d: -Math.sin(a.v) * a.d });
const sine = (a: Dual): Dual => ({ v: Math.sin(a.v), d: Math.cos(a.v) * a.d });
const arctangent = (y: Dual, x: Dual): Dual => ({
  v: Math.atan2(y.v, x.v),
  d: (x.v * y.d - y.v * x.d) / (x.v * x.v + y.v * y.v),
});
const fixed = (p: Pair): DualPair => ({ x: still(p.x), y: still(p.y) });
const dualSubtract = (a: DualPair, b: DualPair): DualPair => ({ x: minus(a.x, b.x), y: minus(a.y, b.y) });
const dualAdd = (a: DualPair, b: DualPair): DualPair => ({ x: plus(a.x, b.x), y: plus(a.y, b.y) });

interface Motion {
  readonly c: Dual;
  readonly s: Dual;
  readonly pivot: Pair;
  readonly place: DualPair;
}

function move({ c, s, pivot, place }: Motion, p: Pair): DualPair {
  const { x, y } = fixed(subtract(p, pivot));
  return dualAdd(place, { x: minus(times(x, c), times(y, s)), y: plus(times(x, s), times(y, c)) });
}

function motionBetween(from: Pair, to: Pair, fromMoved: DualPair, toMoved: DualPair): Motion {
  const u = fixed(subtract(to, from));
  const v = dualSubtract(toMoved, fromMoved);
  const square = plus(times(u.x, u.x), times(u.y, u.y));
  return {
    c: over(plus(times(u.x, v.x), times(u.y, v.y)), square),
    s: over(minus(times(u.x, v.y), times(u.y, v.x)), square),
    pivot: from,
    place: fromMoved,
  };
}

function circlesMeet(a: DualPair, r: Dual, b: DualPair, s: Dual, near: Pair): DualPair {
  const apart = dualSubtract(b, a);
  const d = root(plus(times(apart.x, apart.x), times(apart.y, apart.y)));
  const foot = over(minus(plus(times(d, d), times(r, r)), times(s, s)), times(still(2), d));
  const half = root(minus(times(r, r), times(foot, foot)));
  const side = cross({ x: apart.x.v, y: apart.y.v }, { x: near.x - a.x.v, y: near.y - a.y.v }) < 0 ? -1 : 1;
  const along = over(foot, d);
  const across = times(still(side), over(half, d));
  return {
    x: plus(a.x, minus(times(apart.x, along), times(apart.y, across))),
    y: plus(a.y, plus(times(apart.y, along), times(apart.x, across))),
  };
}

function work(loads: readonly Load[], points: readonly Pair[], perturbation: number) {
  const [a, k, c, , b] = points as [Pair, Pair, Pair, Pair, Pair];
  const p: Dual = { v: perturbation, d: 1 };
  const wall: Motion = { c: cosine(p), s: sine(p), pivot: a, place: fixed(a) };
  const kMoved = move(wall, k);
  const cMoved = circlesMeet(kMoved, still(distance(k, c)), fixed(b), still(distance(c, b)), c);
  const rafter = motionBetween(k, c, kMoved, cMoved);
  const right = motionBetween(c, b, cMoved, fixed(b));
  let sum = still(0);
  for (const load of loads) {
    const body = load.segment === 0 ? wall : load.segment < LEFT_SEGMENTS ? rafter : right;
    const u = dualSubtract(move(body, load.at), fixed(load.at));
    sum = plus(sum, plus(times(still(load.force.x), u.x), times(still(load.force.y), u.y)));
  }
  const closing = minus(p, arctangent(rafter.s, rafter.c));
  return { sum, closing };
}

/** All that the traced reference arch gives, in its order. */
export function plainReference(inputs: readonly number[]): number[] {
  const points: Pair[] = [];
  for (let i = 0; i < 5; i++) points.push({ x: inputs[2 * i] as number, y: inputs[2 * i + 1] as number });
  const [a, k, c, , b] = points as [Pair, Pair, Pair, Pair, Pair];
  const segments = points.slice(1).map((to, i) => ({ from: points[i] as Pair, to }));
  const lengths = segments.map(({ from, to }) => distance(from, to));
  const starts = lengths.map((_, i) => lengths.slice(0, i).reduce((sum, length) => sum + length, 0));
  const placeOn = (segment: number, ratio: number) => {
    const { from, to } = segments[segment] as { from: Pair; to: Pair };
    const length = lengths[segment] as number;
    return {
      point: add(from, scale(subtract(to, from), ratio)),
      direction: scale(subtract(to, from), 1 / length),
      along: (starts[segment] as number) + length * ratio,
    };
  };
  const loads: Load[] = LOADS.map(([segment], i) => {
    const [ratio, x, y] = inputs.slice(10 + 3 * i, 13 + 3 * i) as [number, number, number];
    const { point, along } = placeOn(segment, ratio);
    return { at: point, force: { x, y }, segment, along };
  });
  const p = inputs[10 + 3 * LOADS.length] as number;

  const finite = work(loads, points, p);
  const limit = work(loads, points, 0);
  const byWork = -limit.sum.d / limit.closing.d;
  const atFinite = -finite.sum.v / finite.closing.v;

  const [u, v] = [subtract(a, c), subtract(a, b)];
  const total = loads.reduce((sum, { force }) => add(sum, force), { x: 0, y: 0 });
  const onLeft = loads.filter(({ segment }) => segment < LEFT_SEGMENTS);
  const m1 = onLeft.reduce((sum, { at, force }) => sum + cross(subtract(at, c), force), 0);
  const m2 = loads.reduce((sum, { at, force }) => sum + cross(subtract(at, b), force), 0);
  const left = scale(subtract(scale(u, m2), scale(v, m1)), 1 / cross(u, v));
  const right = scale(add(left, total), -1);
  const leftLoads = onLeft.reduce((sum, { force }) => add(sum, force), { x: 0, y: 0 });
  const crown = scale(add(left, leftLoads), -1);
  const residual =
    loads
      .filter(({ segment }) => segment >= LEFT_SEGMENTS)
      .reduce((sum, { at, force }) => sum + cross(subtract(at, c), force), 0) + cross(subtract(b, c), right);

  const forcesAt = (place: { point: Pair; direction: Pair; along: number }) => {
    const before = loads.filter(({ along }) => along < place.along);
    const force = before.reduce((sum, load) => add(sum, load.force), left);
    const moment = before.reduce(
      (sum, load) => sum + cross(subtract(place.point, load.at), load.force),
      cross(subtract(place.point, a), left),
    );
    return { axial: -dot(force, place.direction), shear: cross(place.direction, force), moment };
  };
  const atKnee = forcesAt({ point: k, direction: placeOn(0, 1).direction, along: starts[1] as number });
  const stations = STATIONS.map(([segment, ratio]) => forcesAt(placeOn(segment, ratio)));
  return [
    byWork,
    atFinite,
    atKnee.moment,
    byWork - atKnee.moment,
    left.x,
    left.y,
    right.x,
    right.y,
    crown.x,
    crown.y,
    residual,
    ...stations.flatMap(({ axial, shear, moment }) => [axial, shear, moment]),
  ];
}
