import { describe, expect, it } from 'vitest';
import { type GraphDocument, orderNodes } from '../../src/graph/index.ts';
import { graphOf } from '../support/graphs.ts';
import { randomFrom } from '../support/random.ts';

/** A graph of nodes with one-letter ids, from arrows such as "ab bc": a feeds b, b feeds c. */
function graph(ids: string, arrows: string): GraphDocument {
  const nodes = [...ids].map((id) => ({ id, type: 'x/y' }));
  return graphOf(nodes, arrows === '' ? [] : arrows.split(' ').map(([from, to]) => `${from}.o > ${to}.i`));
}

const sorted = (ids: Iterable<string>): string => [...ids].toSorted().join('');

describe('the order of nodes', () => {
  it('is that of the document where links leave it open', () => {
    expect(orderNodes(graph('cab', '')).order).toEqual(['c', 'a', 'b']);
  });

  it('has each node behind all that it reads, in 300 random graphs with loops', () => {
    const random = randomFrom(21);
    let loops = 0;
    for (let i = 0; i < 300; i++) {
      const count = random.whole(1, 14);
      const ids = 'abcdefghijklmn'.slice(0, count);
      const any = (): string => ids[random.whole(0, count - 1)] as string;
      const arrows = Array.from({ length: random.whole(0, 2 * count) }, () => any() + any());
      const document = graph(ids, arrows.join(' '));
      const found = orderNodes(document);
      const reach = reachable(ids, arrows);
      const onLoop = [...ids].filter((id) => reach.get(id)?.has(id));
      const behind = [...ids].filter(
        (id) => !onLoop.includes(id) && onLoop.some((from) => reach.get(from)?.has(id)),
      );
      expect(sorted(found.loops.keys())).toBe(sorted(onLoop));
      expect(sorted(found.behindLoops)).toBe(sorted(behind));
      expect(sorted([...found.order, ...onLoop, ...behind])).toBe(sorted(ids));
      const place = new Map([...found.order, ...found.behindLoops].map((id, k) => [id, k]));
      for (const [from = '', to = ''] of arrows) {
        const [source, reader] = [place.get(from), place.get(to)];
        if (source !== undefined && reader !== undefined) expect(source).toBeLessThan(reader);
      }
      for (const loop of found.loops.values()) {
        loops += 1;
        for (const [k, id] of loop.entries()) {
          expect(arrows).toContain(id + (loop[(k + 1) % loop.length] as string));
        }
      }
    }
    expect(loops).toBeGreaterThan(200);
  });

  it('counts a node that reads itself as a loop of one', () => {
    const { order, loops, behindLoops } = orderNodes(graph('abc', 'ab bb bc'));
    expect(order).toEqual(['a']);
    expect([...loops]).toEqual([['b', ['b']]]);
    expect([...behindLoops]).toEqual(['c']);
  });

  it('tells two loops apart, and what lies between them is behind the first', () => {
    const { loops, behindLoops } = orderNodes(graph('abcde', 'ab ba bc cd de ed'));
    expect(sorted(loops.get('a') ?? [])).toBe('ab');
    expect(sorted(loops.get('d') ?? [])).toBe('de');
    expect([...behindLoops]).toEqual(['c']);
  });

  it('does not mind two links between the same nodes, or ends that are not there', () => {
    expect(orderNodes(graph('ba', 'ab ab xa bx')).order).toEqual(['a', 'b']);
  });
});

/** What can be reached from each id by one arrow or more. */
function reachable(ids: string, arrows: readonly string[]): ReadonlyMap<string, ReadonlySet<string>> {
  return new Map(
    [...ids].map((id) => {
      const found = new Set<string>();
      const next = [id];
      for (let at = next.pop(); at !== undefined; at = next.pop()) {
        for (const [from, to = ''] of arrows) {
          if (from === at && !found.has(to)) {
            found.add(to);
            next.push(to);
          }
        }
      }
      return [id, found];
    }),
  );
}
