import { describe, expect, it } from 'vitest';
import { builtIn } from '../../nodes/index.ts';
import { BANDS, tidyPlaces } from '../../src/graph/index.ts';
import { openReady, READY } from '../support/graphs.ts';

const measures = { width: 240, gap: 24, height: (id: string) => 80 + (id.length % 5) * 24 };

describe.each(READY)('tidying %s', (name) => {
  const { document } = openReady(name);
  const places = tidyPlaces(document, builtIn, measures);
  const at = (id: string) => places.get(id) ?? [Number.NaN, Number.NaN];

  it('gives every node a place of its own', () => {
    const boxes = document.nodes.map(({ id }) => ({
      x: at(id)[0],
      y: at(id)[1],
      height: measures.height(id),
    }));
    for (const [i, a] of boxes.entries()) {
      for (const b of boxes.slice(i + 1)) {
        const apart = Math.abs(a.x - b.x) >= 240 || a.y + a.height <= b.y || b.y + b.height <= a.y;
        expect(apart).toBe(true);
      }
    }
  });

  it('puts the bands from left to right in the order of the work', () => {
    const band = (id: string, type: string) => [
      BANDS.indexOf(builtIn.find(type)?.band ?? 'quantities'),
      at(id)[0],
    ];
    const sorted = document.nodes
      .map(({ id, type }) => band(id, type))
      .toSorted((a, b) => (a[0] ?? 0) - (b[0] ?? 0));
    for (const [i, [own, x]] of sorted.entries()) {
      for (const [other, u] of sorted.slice(i + 1)) if (own !== other) expect(u).toBeGreaterThan(x as number);
    }
  });

  it('puts a node to the right of those of its band that it reads from', () => {
    const bandOf = (id: string) =>
      builtIn.find(document.nodes.find((node) => node.id === id)?.type ?? '')?.band;
    for (const { from, to } of document.links) {
      if (bandOf(from[0]) === bandOf(to[0])) expect(at(to[0])[0]).toBeGreaterThan(at(from[0])[0]);
    }
  });
});
