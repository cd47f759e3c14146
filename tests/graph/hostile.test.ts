import { describe, expect, it } from 'vitest';
import { builtIn } from '../../nodes/index.ts';
import {
  FileError,
  type GraphDocument,
  type NodeRecord,
  readGraph,
  readings,
  Session,
  sceneOf,
  sliders,
  writeGraph,
} from '../../src/graph/index.ts';
import { everyFigure, graphOf, open, texts } from '../support/graphs.ts';

const plusOne = (i: number): NodeRecord => ({
  id: `n${i}`,
  type: 'quantities/formula',
  settings: { formula: 'x + 1' },
});

function chain(length: number, extra: readonly string[] = []): [NodeRecord[], string[]] {
  const nodes = Array.from({ length }, (_, i) => plusOne(i));
  const links = nodes.slice(1).map((_, i) => `n${i}.result > n${i + 1}.x`);
  return [nodes, [...links, ...extra]];
}

describe('a very large graph', () => {
  it('of a chain of 20,000 nodes runs', () => {
    const [nodes, links] = chain(20_000);
    const first = { ...(nodes[0] as NodeRecord), values: { x: '0' } };
    const document = readGraph(writeGraph(graphOf([first, ...nodes.slice(1)], links)));
    const session = new Session(document, builtIn);
    expect(session.queries).toEqual([]);
    expect(session.value('n19999', 'result')).toBe(20_000);
    session.edit({ edit: 'set-value', id: 'n0', input: 'x', text: '5' });
    expect(session.value('n19999', 'result')).toBe(20_005);
  });

  it('of a loop of 20,000 nodes is a query at each, of a readable length', () => {
    const session = open(...chain(20_000, ['n19999.result > n0.x']));
    expect(session.queries).toHaveLength(20_000);
    expect((texts(session)[7] as string).length).toBeLessThan(300);
  });

  it('of 20,000 nodes behind a loop of two waits', () => {
    const session = open(...chain(20_000, ['n1.result > n0.x']));
    expect(session.queries).toHaveLength(2);
    expect(session.state('n19999')).toBe('waits');
  });

  it('of 100,000 nodes is refused', () => {
    const nodes = Array.from({ length: 100_000 }, (_, i) => plusOne(i));
    expect(() => readGraph(writeGraph(graphOf(nodes)))).toThrow('100 000 nodes, more than the 50 000');
  });
});

describe('names that mean something to the language', () => {
  const NAMES = ['constructor', 'toString', 'hasOwnProperty', '__proto__', 'prototype'];

  it('are names like others for nodes', () => {
    for (const id of NAMES) {
      const session = open(
        [
          { id, type: 'quantities/length' },
          { id: 'p', type: 'setting-out/point' },
        ],
        [`${id}.value > p.up`],
      );
      expect(texts(session)).toEqual([]);
      expect(session.value('p', 'point')).toEqual({ x: 0, y: 3 });
    }
  });

  it('are no inputs, outputs, settings, options or nodes of a pack', () => {
    for (const name of NAMES) {
      const session = open(
        [
          { id: 'a', type: 'quantities/length' },
          { id: 'p', type: 'setting-out/point' },
          { id: 'q', type: 'setting-out/point' },
          { id: 'r', type: 'quantities/reading', values: { value: '3 m' }, settings: { rule: name } },
          { id: 's', type: name },
          { id: 't', type: `arch/${name}` },
        ],
        [`a.${name} > p.up`, `a.value > q.${name}`],
      );
      expect(session.queries.map(({ code }) => code).toSorted()).toEqual(
        ['no-input', 'no-output', 'setting', 'unknown-node', 'unknown-node'].toSorted(),
      );
    }
  });
});

describe('a small file that asks for much', () => {
  it('by lists that double from node to node is stopped where it becomes too much', () => {
    const nodes: NodeRecord[] = [{ id: 'p', type: 'setting-out/point' }];
    const links: string[] = [];
    for (let i = 0; i < 40; i++) {
      nodes.push({ id: `t${i}`, type: 'setting-out/turn' });
      const source = i === 0 ? 'p.point' : `t${i - 1}.others`;
      links.push(`p.point > t${i}.point`, `p.point > t${i}.centre`);
      links.push(`${source} > t${i}.others`, `${source} > t${i}.others`);
    }
    const session = open(nodes, links);
    expect(texts(session)[0]).toMatch(
      /^t1\d: With this node the graph comes to more than 2 million operations: link fewer points and loads, or take nodes out$/,
    );
    expect(session.state('t5')).toBe('ready');
    expect(session.state('t39')).toBe('waits');
    expect(session.value('p', 'point')).toEqual({ x: 0, y: 0 });
  });

  it('by many loads on an arch of many knees is stopped too', () => {
    const count = 120;
    const nodes: NodeRecord[] = [
      { id: 'left', type: 'setting-out/point' },
      { id: 'right', type: 'setting-out/point', values: { across: '30 m' } },
      { id: 'top', type: 'setting-out/point', values: { across: '15 m', up: '9 m' } },
      { id: 'first', type: 'arch/springing' },
      { id: 'crown', type: 'arch/crown' },
      { id: 'last', type: 'arch/springing' },
      { id: 'axis', type: 'arch/axis' },
      { id: 'line', type: 'arch/moment-line' },
      { id: 'after', type: 'quantities/formula', values: { a: '1 m', b: '2 m' } },
    ];
    const links = [
      'left.point > first.point',
      'right.point > last.point',
      'top.point > crown.point',
      'first.keyPoint > axis.keyPoints',
    ];
    for (let i = 1; i < count; i++) {
      const [across, up] = [(15 * i) / count, 9 * Math.sqrt(i / count)];
      nodes.push(
        { id: `p${i}`, type: 'setting-out/point', values: { across: `${across} m`, up: `${up} m` } },
        { id: `k${i}`, type: 'arch/knee' },
        { id: `l${i}`, type: 'loads/point-load' },
      );
      links.push(`p${i}.point > k${i}.point`, `k${i}.keyPoint > axis.keyPoints`, `p${i}.point > l${i}.at`);
      links.push(`l${i}.load > line.loads`);
    }
    links.push('crown.keyPoint > axis.keyPoints', 'last.keyPoint > axis.keyPoints', 'axis.arch > line.arch');
    const session = open(nodes, links);
    expect(session.state('axis')).toBe('ready');
    expect(session.state('line')).toBe('query');
    expect(texts(session)[0]).toContain('line: With this node the graph comes to more than 2 million');
    // What had its turn before is there, and can still be changed.
    session.edit({ edit: 'set-value', id: 'top', input: 'up', text: '10 m' });
    expect(session.value('axis', 'rise')).toBeCloseTo(10, 12);
  });
});

describe('an unlucky link', () => {
  it.each(['constructor', 'toString', '__proto__', 'hasOwnProperty'])(
    'from an output called %s into a reading leaves the rail and the drawing as they are',
    (port) => {
      const session = open(
        [
          { id: 'a', type: 'quantities/length' },
          { id: 'r', type: 'quantities/reading', settings: { rule: 'at most' } },
        ],
        [`a.${port} > r.value`],
        ['a', 'r', port],
      );
      expect(readings(session)).toMatchObject([{ id: 'r', value: undefined, meets: undefined }]);
      expect(sliders(session).map(({ id }) => id)).toEqual(['a']);
      expect(sceneOf(session)).toEqual([]);
      expect(session.live.pull('r', 'value', [0])).toBeUndefined();
      expect(session.live.pull('a', port, [0])).toBeUndefined();
    },
  );
});

describe('a file with one member of another type', () => {
  const wrong: readonly unknown[] = [null, true, 0, -1.5, '', 'x', [], {}, [[]], { a: null }];

  /** Every member of a value, by the way to it. */
  function waysIn(value: unknown, way: readonly string[] = []): (readonly string[])[] {
    if (typeof value !== 'object' || value === null) return [way];
    return [way, ...Object.entries(value).flatMap(([key, part]) => waysIn(part, [...way, key]))];
  }

  function replaced(value: unknown, [key, ...way]: readonly string[], by: unknown): unknown {
    if (key === undefined) return by;
    const part = replaced((value as Record<string, unknown>)[key], way, by);
    return Array.isArray(value) ? value.with(Number(key), part) : { ...(value as object), [key]: part };
  }

  it('is refused at that member, or opens: for every member and every type', () => {
    const content = {
      ...graphOf(
        [
          { id: 'rise', type: 'quantities/length', name: 'Rise', remark: 'Up', place: [3, 4] },
          { id: 'double', type: 'quantities/formula', settings: { formula: 'a * 2' }, values: { a: '3 m' } },
          { id: 'p', type: 'setting-out/point', values: { across: '3 m', up: '1 m' } },
          { id: 't', type: 'setting-out/turn', values: { angle: '30°' } },
          { id: 'c', type: 'setting-out/circle', values: { radius: '2 m' } },
          { id: 'm', type: 'setting-out/circles-meet', settings: { branch: 'left' } },
          { id: 'r', type: 'quantities/reading', settings: { rule: 'at most' }, values: { limit: '9 m' } },
          { id: 'kept', type: 'towers/spire', unknown: [1] },
        ],
        [
          'rise.value > p.up',
          'p.point > t.point',
          'p.point > t.centre',
          'p.point > t.others',
          'p.point > c.centre',
          'c.circle > m.first',
          'c.circle > m.second',
          'double.result > r.value',
        ],
        ['rise', 'r'],
      ),
      remark: 'A test',
      packs: { quantities: '1.0.0' },
    };
    const ways = waysIn(content);
    expect(ways.length).toBeGreaterThan(100);
    let opened = 0;
    for (const way of ways) {
      for (const by of wrong) {
        const text = JSON.stringify(replaced(content, way, by));
        let document: GraphDocument;
        try {
          document = readGraph(text);
        } catch (error) {
          expect(error).toBeInstanceOf(FileError);
          const { message } = error as Error;
          // Whoever mends the file by hand finds the place.
          const place = way.length === 0 ? 'graph' : way.slice(0, 2).join('.');
          expect(message, `${place} as ${JSON.stringify(by)}`).toContain(place);
          continue;
        }
        opened += 1;
        const session = new Session(document, builtIn);
        expect(everyFigure(session).every(Number.isFinite)).toBe(true);
      }
    }
    expect(opened).toBeGreaterThan(100);
  });
});
