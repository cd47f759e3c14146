import { describe, expect, it } from 'vitest';
import { builtIn } from '../../nodes/index.ts';
import { FileError, type NodeRecord, readGraph, Session, writeGraph } from '../../src/graph/index.ts';
import { everyFigure, graphOf, open, READY, readyText, texts } from '../support/graphs.ts';
import { randomFrom } from '../support/random.ts';

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

describe('a damaged file', () => {
  /** Changes one thing somewhere in the content. */
  function damage(value: unknown, random: ReturnType<typeof randomFrom>): unknown {
    const junk: readonly unknown[] = [
      null,
      3,
      -1.5e300,
      'NaN m',
      '',
      true,
      [],
      {},
      ['x'],
      '9'.repeat(300),
      { a: [1] },
    ];
    const texts = [
      'NaN m',
      '',
      '3 kN',
      '1e999 m',
      '∞',
      'constructor',
      '0 m',
      '-5°',
      'x y z',
      '9'.repeat(190),
    ];
    if (typeof value === 'string' && random(0, 1) < 0.8) return texts[random.whole(0, texts.length - 1)];
    if (typeof value !== 'object' || value === null || random(0, 1) < 0.03) {
      return junk[random.whole(0, junk.length - 1)];
    }
    if (Array.isArray(value)) {
      if (value.length === 0) return [junk[random.whole(0, junk.length - 1)]];
      const at = random.whole(0, value.length - 1);
      if (random(0, 1) < 0.15) return value.toSpliced(at, 1);
      return value.with(at, damage(value[at], random));
    }
    const keys = Object.keys(value);
    const key = keys[random.whole(0, keys.length - 1)] ?? 'new';
    if (random(0, 1) < 0.1)
      return Object.fromEntries(Object.entries(value).filter(([other]) => other !== key));
    return { ...value, [key]: damage((value as Record<string, unknown>)[key], random) };
  }

  it('is refused or opens with queries, and never gives a figure that is none', () => {
    const random = randomFrom(99);
    let opened = 0;
    for (let i = 0; i < 600; i++) {
      let content: unknown = JSON.parse(readyText(READY[i % READY.length] as string));
      for (let k = 0; k <= i % 3; k++) content = damage(content, random);
      let session: Session;
      try {
        session = new Session(readGraph(JSON.stringify(content)), builtIn);
      } catch (error) {
        expect(error, JSON.stringify(content).slice(0, 200)).toBeInstanceOf(FileError);
        continue;
      }
      opened += 1;
      expect(everyFigure(session).every(Number.isFinite)).toBe(true);
      for (const line of texts(session)) expect(line).not.toContain('fault of its pack');
      expect(JSON.parse(writeGraph(session.document))).toEqual(content);
    }
    expect(opened).toBeGreaterThan(100);
  });
});
