import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readings, sliders } from '../../src/graph/index.ts';
import { everyFigure, openReady, READY, texts } from '../support/graphs.ts';
import { randomFrom } from '../support/random.ts';

/**
 * The readings of the ready graphs, in SI units, as they were when last looked at. They guard against change and
 * are no check of truth, which stands in tests/published and tests/properties. A change has to be explained.
 */
const expectations: Record<string, Record<string, number>> = JSON.parse(
  readFileSync(join(import.meta.dirname, 'expectations.json'), 'utf8'),
);

describe.each(READY)('%s', (name) => {
  it('opens without a query, with a title, a remark, a rail and readings', () => {
    const session = openReady(name);
    expect(texts(session)).toEqual([]);
    const { title, remark, rail } = session.document;
    expect(title.length).toBeGreaterThan(3);
    expect(remark?.length ?? 0).toBeGreaterThan(60);
    expect(rail.length).toBeGreaterThan(5);
    expect(sliders(session).length + readings(session).length).toBe(rail.length);
  });

  it('gives the readings that it gave', () => {
    const found = Object.fromEntries(readings(openReady(name)).map(({ id, value }) => [id, value]));
    const expected = expectations[name] ?? {};
    expect(Object.keys(found)).toEqual(Object.keys(expected));
    for (const [id, value] of Object.entries(expected)) {
      // Differences of two routes are rounding, and differ from machine to machine.
      expect(Math.abs((found[id] ?? Number.NaN) - value)).toBeLessThanOrEqual(1e-9 * Math.abs(value) + 1e-12);
    }
  });

  it('gives figures or queries at 100 random settings of its sliders, and never a figure that is none', () => {
    const session = openReady(name);
    const random = randomFrom(7);
    for (let i = 0; i < 100; i++) {
      for (const slider of sliders(session)) {
        const { lower, upper, measure } = slider;
        if (lower === undefined || upper === undefined) throw new Error(`${slider.name} has no bounds`);
        const value = i < 2 ? [lower, upper][i] : random(lower, upper);
        const text = `${(value as number) / measure.units.SI.factor} ${measure.units.SI.symbol}`;
        session.edit({ edit: 'set-value', id: slider.id, input: 'value', text });
      }
      expect(everyFigure(session).every(Number.isFinite)).toBe(true);
      if (readings(session).some(({ value }) => value === undefined)) {
        expect(session.queries.length).toBeGreaterThan(0);
      }
    }
  });

  it('has sliders that stand within their bounds', () => {
    const session = openReady(name);
    for (const { id, name: called, lower = Number.NaN, upper = Number.NaN } of sliders(session)) {
      const value = session.value(id, 'value') as number;
      expect(value, called).toBeGreaterThanOrEqual(lower);
      expect(value, called).toBeLessThanOrEqual(upper);
    }
  });

  it('lays its nodes out so that none lies on another', () => {
    const places = openReady(name).document.nodes.map(({ place }) => place ?? [0, 0]);
    for (const [i, [x, y]] of places.entries()) {
      for (const [u, v] of places.slice(i + 1)) {
        expect(Math.abs(x - u) >= 240 || Math.abs(y - v) >= 60).toBe(true);
      }
    }
  });

  it('agrees in both routes to 1e-10 of the moment', () => {
    const session = openReady(name);
    for (const { id, type } of session.document.nodes) {
      if (type !== 'arch/arch-moment') continue;
      const [work, statics] = [session.value(id, 'limit'), session.value(id, 'equilibrium')] as number[];
      expect(Math.abs((work ?? Number.NaN) / (statics ?? Number.NaN) - 1)).toBeLessThan(1e-10);
    }
  });
});

describe('the ferry hall', () => {
  it('has the same knee moment wired by hand as by the arch nodes, to 1e-12, at 200 settings', () => {
    const [hand, arch] = [openReady('ferry-hall-by-hand'), openReady('ferry-hall')] as const;
    const random = randomFrom(3);
    let compared = 0;
    for (let i = 0; i < 200; i++) {
      const values = readings(hand).map(({ value }) => value);
      const other = readings(arch).find(({ id }) => id === 'knee-moment')?.value;
      if (values[0] !== undefined && other !== undefined) {
        compared += 1;
        // Near a moment of 0 what counts is the moments of the single loads, some 100 kN·m.
        expect(Math.abs(values[0] - other)).toBeLessThan(1e-12 * Math.max(Math.abs(other), 1e5));
      }
      for (const { id, lower = 0, upper = 0, measure } of sliders(hand)) {
        const text = `${random(lower, upper) / measure.units.SI.factor} ${measure.units.SI.symbol}`;
        for (const session of [hand, arch]) session.edit({ edit: 'set-value', id, input: 'value', text });
      }
    }
    expect(compared).toBeGreaterThan(190);
  });
});
