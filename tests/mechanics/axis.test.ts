import { describe, expect, it } from 'vitest';
import {
  archThrough,
  axisLength,
  crownStart,
  hingeRise,
  type KeyPoint,
  type Role,
  shapePlaces,
  span,
  stationsAlong,
  towardsIntrados,
} from '../../src/mechanics/index.ts';
import { Refusal, Trace } from '../../src/tape/index.ts';
import { drawing, flat, keyPoints, prepared } from '../support/construction.ts';
import { randomFrom } from '../support/random.ts';

const ROLES: readonly Role[] = ['springing', 'knee', 'through', 'crown'];

/** Every order of up to six key points. */
function* orders(): Generator<readonly Role[]> {
  for (let count = 0; count <= 6; count++) {
    for (let code = 0; code < ROLES.length ** count; code++) {
      yield Array.from({ length: count }, (_, i) => ROLES[Math.floor(code / ROLES.length ** i) % 4] as Role);
    }
  }
}

describe('the order of key points', () => {
  it('is that of an arch, or is refused with words that say what to do', () => {
    let arches = 0;
    let refused = 0;
    for (const roles of orders()) {
      // Springing, knees, crown, knees, springing; before any but the first there may be one through point.
      const isArch = /^s(t?k)*t?c(t?k)*t?s$/.test(roles.map((role) => role[0]).join(''));
      const trace = new Trace();
      const points = roles.map((role, i) => [role, i, (i * i) % 5] as const);
      let refusal: unknown;
      try {
        const arch = archThrough(keyPoints(trace, points));
        const joints = roles.filter((role) => role !== 'through');
        expect(arch.segments).toHaveLength(joints.length - 1);
        expect(arch.leftSegments).toBe(joints.indexOf('crown'));
        expect(arch.segments.filter(({ arc }) => arc !== undefined)).toHaveLength(
          roles.length - joints.length,
        );
        arches += 1;
      } catch (error) {
        refusal = error;
        refused += 1;
      }
      expect(refusal === undefined, roles.join(', ')).toBe(isArch);
      if (isArch) continue;
      expect(refusal, roles.join(', ')).toBeInstanceOf(Refusal);
      const { code, message } = refusal as Refusal;
      expect(code).toBe('axis-order');
      expect(message, roles.join(', ')).toMatch(
        /^(an axis|a springing|key points \d) .*: (link more|put .*|make it a knee|a rigid corner is a knee|one is enough, .*)$/,
      );
    }
    // By hand: with three to six key points, 1 + 4 + 10 + 22 fit the order.
    expect(arches).toBe(37);
    expect(refused).toBe(1 + 4 + 16 + 64 + 256 + 1024 + 4096 - 37);
  });
});

describe('an axis', () => {
  const ROLE_OF: readonly Role[] = ['springing', 'knee', 'crown', 'knee', 'springing'];
  const measured = drawing(5, 0, (points) => {
    const arch = archThrough(points.map((point, i): KeyPoint => ({ role: ROLE_OF[i] as Role, point })));
    return [...arch.starts, axisLength(arch), crownStart(arch), span(arch), hingeRise(arch)];
  });

  it('is measured along its segments, its span on plan, its rise off the line of the springings', () => {
    for (let seed = 0; seed < 100; seed++) {
      const random = randomFrom(seed);
      const at = Array.from({ length: 5 }, () => [random(-30, 30), random(-30, 30)] as const);
      const { values, queries } = measured(...at.flat());
      expect(queries).toEqual([]);
      const lengths = at
        .slice(1)
        .map(([x, y], i) => Math.hypot(x - (at[i]?.[0] ?? 0), y - (at[i]?.[1] ?? 0)));
      const starts = [0];
      for (const length of lengths) starts.push((starts.at(-1) as number) + length);
      const [a, c, b] = [at[0], at[2], at[4]] as [
        readonly [number, number],
        readonly [number, number],
        readonly [number, number],
      ];
      // Twice the area of the triangle of the hinges (shoelace formula) over its base.
      const area = a[0] * (b[1] - c[1]) + b[0] * (c[1] - a[1]) + c[0] * (a[1] - b[1]);
      const rise = area / Math.hypot(b[0] - a[0], b[1] - a[1]);
      const wanted = [...starts, starts.at(-1), starts[2], Math.abs(b[0] - a[0]), rise];
      for (const [i, value] of values.entries()) expect(value).toBeCloseTo(wanted[i] as number, 9);
    }
  });

  it('with the springings at one place is a query with their distance, and no silent NaN', () => {
    for (const apart of [0, 1e-12, 0.9e-6]) {
      const { values, queries } = measured(3, 1, 2, 5, 6, 8, 9, 4, 3 + apart, 1);
      expect(queries).toHaveLength(1);
      expect(queries[0]).toMatch(/^The two springings are at one place \(.*m apart\): move one of them$/);
      expect(values.at(-1)).toBeNaN();
    }
    expect(measured(3, 1, 2, 5, 6, 8, 9, 4, 3 + 1.1e-6, 1).queries).toEqual([]);
  });

  it('is drawn from its key points, and along arcs from points between them', () => {
    const trace = new Trace();
    const arch = archThrough(
      keyPoints(trace, [
        ['springing', -5, 0],
        ['through', -3, 4],
        ['crown', 0, 5],
        ['knee', 4, 4],
        ['springing', 5, 0],
      ]),
    );
    const places = shapePlaces(arch);
    const { values } = prepared(trace, flat(...places.map(({ point }) => point)))();
    const at = Array.from(
      { length: places.length },
      (_, i) => [values[2 * i] as number, values[2 * i + 1] as number] as const,
    );
    expect(places).toHaveLength(17 + 2 + 2);
    // The arc is that of the circle x² + y² = 25.
    for (const [x, y] of at.slice(0, 17)) expect(Math.hypot(x, y)).toBeCloseTo(5, 12);
    for (const [i, wanted] of [
      [0, [-5, 0]],
      [16, [0, 5]],
      [17, [0, 5]],
      [18, [4, 4]],
      [20, [5, 0]],
    ] as const) {
      expect(at[i]?.[0]).toBeCloseTo(wanted[0], 12);
      expect(at[i]?.[1]).toBeCloseTo(wanted[1], 12);
    }
    expect(stationsAlong(arch, 4)).toHaveLength(15);
  });

  it('has its intrados below, on the right of the way from the left springing to the right one', () => {
    const trace = new Trace();
    const arch = archThrough(
      keyPoints(trace, [
        ['springing', 0, 0],
        ['knee', 0, 4],
        ['crown', 3, 8],
        ['springing', 6, 8],
      ]),
    );
    const inwards = stationsAlong(arch, 1).map((place) => towardsIntrados(place));
    const { values } = prepared(trace, flat(...inwards))();
    // Inside of a column is to the right, below a rafter of 3 : 4 is (4, −3) / 5, below a beam is down.
    const wanted = [1, 0, 1, 0, 0.8, -0.6, 0.8, -0.6, 0, -1, 0, -1];
    for (const [i, value] of values.entries()) expect(value).toBeCloseTo(wanted[i] as number, 12);
  });
});
