import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { builtIn } from '../../nodes/index.ts';
import {
  type Edit,
  EditError,
  FileError,
  type GraphDocument,
  type Link,
  type NodeRecord,
  readGraph,
  readings,
  removalOf,
  Session,
  sceneOf,
  sliders,
  writeGraph,
} from '../../src/graph/index.ts';
import { queryText } from '../../src/tape/index.ts';
import { everyFigure, graphOf, READY, readyText } from '../support/graphs.ts';

const contents = new Map(READY.map((name) => [name, JSON.parse(readyText(name)) as unknown]));
const ready = fc.constantFrom(...READY);

/** Names and texts that a file may hold anywhere. */
const odd = fc.constantFrom(
  ...[
    '',
    ' ',
    'constructor',
    'toString',
    'prototype',
    'a\nb',
    '\u202e',
    'value',
    '∞',
    'NaN',
    '-0 m',
    '1e999 m',
  ],
  ...['3 kN', '12.5°', '1e-320 m', '1e200 m', '0', '−5 m', '2', '10000', 'a + b', '1/0', 'sqrt(0 - 1)'],
);
const wrong = fc.oneof(
  { arbitrary: odd, weight: 4 },
  { arbitrary: fc.jsonValue({ maxDepth: 2 }), weight: 2 },
  fc.constantFrom(null, true, false, 0, -1, 1e300, 0.5, [], {}, [[]]),
);

/** One change somewhere in a file: which way to go at each level, and what to do there. */
const damage = fc.record({
  way: fc.array(fc.nat(), { minLength: 1, maxLength: 7 }),
  act: fc.constantFrom('replace', 'take', 'double', 'swap'),
  by: wrong,
});

function damaged(value: unknown, [turn, ...way]: readonly number[], act: string, by: unknown): unknown {
  if (turn === undefined || typeof value !== 'object' || value === null) return by;
  const entries = Object.entries(value);
  if (entries.length === 0) return by;
  const at = turn % entries.length;
  const [key, part] = entries[at] as [string, unknown];
  if (way.length > 0 && typeof part === 'object' && part !== null) {
    entries[at] = [key, damaged(part, way, act, by)];
  } else if (act === 'take') {
    entries.splice(at, 1);
  } else if (act === 'double') {
    entries.push([typeof by === 'string' ? by : `${key}'`, part]);
  } else if (act === 'swap') {
    entries[at] = [key, entries[(at + 1) % entries.length]?.[1]];
  } else {
    entries[at] = [key, by];
  }
  return Array.isArray(value) ? entries.map(([, one]) => one) : Object.fromEntries(entries);
}

/** All that is ever asked of a session, none of which may fail or give a figure that is none. */
function lookAtAll(session: Session): void {
  expect(everyFigure(session).every(Number.isFinite)).toBe(true);
  const shown = session.queries.flatMap((query) => [queryText(query), queryText(query, 'US')]);
  for (const text of shown) {
    // What is quoted is the file's own word.
    expect(text.replace(/"[^"]*"/g, '')).not.toMatch(/NaN|Infinity|undefined|\[object/);
    expect(text).not.toContain('fault of its pack');
  }
  const found = readings(session);
  const places = sliders(session).flatMap(({ id }) => session.live.placeOf(id, 'value') ?? []);
  for (const { id, value, limit } of found) {
    for (const figure of [value, limit?.value, ...(session.live.pull(id, 'value', places) ?? [])]) {
      expect(figure === undefined || Number.isFinite(figure)).toBe(true);
    }
    if (value === undefined) expect(session.state(id)).not.toBe('ready');
  }
  const states = session.document.nodes.map(({ id }) => session.state(id));
  if (states.some((state) => state !== 'ready')) expect(session.queries.length).toBeGreaterThan(0);
  expect(JSON.stringify(sceneOf(session))).not.toContain('null');
}

describe('a damaged file', () => {
  it('is refused in one line, or opens with queries and keeps all that it holds', () => {
    const seen = { opened: 0, refused: 0 };
    fc.assert(
      fc.property(ready, fc.array(damage, { minLength: 1, maxLength: 4 }), (name, damages) => {
        const content = damages.reduce(
          (whole, { way, act, by }) => damaged(whole, way, act, by),
          contents.get(name),
        );
        let document: GraphDocument;
        try {
          document = readGraph(JSON.stringify(content));
        } catch (error) {
          expect(error).toBeInstanceOf(FileError);
          expect((error as Error).message).toMatch(/^\P{Cc}{10,400}$/u);
          seen.refused += 1;
          return;
        }
        seen.opened += 1;
        const session = new Session(document, builtIn);
        lookAtAll(session);
        expect(JSON.parse(writeGraph(session.document))).toEqual(content);
      }),
      { numRuns: 400 },
    );
    expect(seen.opened).toBeGreaterThan(40);
    expect(seen.refused).toBeGreaterThan(40);
  });
});

const ids = ['span', 'p', 'f', 'constructor', 'r', '__proto__'] as const;
const id = fc.constantFrom(...ids);
const types = [
  'quantities/length',
  'quantities/formula',
  'quantities/reading',
  'quantities/count',
  'setting-out/point',
  'setting-out/turn',
  'setting-out/circles-meet',
  'arch/springing',
  'arch/axis',
  'towers/spire',
] as const;
const port = fc.constantFrom('value', 'a', 'b', 'up', 'point', 'result', 'centre', 'others', 'toString');
const figure = fc.constantFrom('3 m', '0 m', '-2 m', '1e300 m', '4', '3 kN', '12°', 'wide', '');
const node: fc.Arbitrary<NodeRecord> = fc.record({
  id,
  type: fc.constantFrom(...types),
  values: fc.dictionary(port, figure, { maxKeys: 2, noNullPrototype: true }),
});
const link: fc.Arbitrary<Link> = fc.record({ from: fc.tuple(id, port), to: fc.tuple(id, port) });

/** Any edit, of a document that it may or may not fit. */
const { edit } = fc.letrec<{ edit: Edit }>((tie) => ({
  edit: fc.oneof(
    { depthSize: 'small' },
    fc.record({ edit: fc.constant('add-node' as const), node, at: fc.nat({ max: 6 }) }),
    fc.record({ edit: fc.constant('change-node' as const), node }),
    fc.record({ edit: fc.constant('remove-node' as const), id }),
    fc.record({
      edit: fc.constant('set-value' as const),
      id,
      input: port,
      text: fc.option(figure, { nil: undefined }),
    }),
    fc.record({
      edit: fc.constant('set-setting' as const),
      id,
      setting: fc.constantFrom('formula', 'rule', 'branch', 'lower'),
      value: fc.option(
        fc.constantFrom<string | boolean>('a + b', 'a / (b - b)', 'at most', 'left', '1 m', true),
        { nil: undefined },
      ),
    }),
    fc.record({ edit: fc.constant('add-link' as const), link }),
    fc.record({ edit: fc.constant('remove-link' as const), link }),
    fc.record({ edit: fc.constant('set-rail' as const), rail: fc.array(id, { maxLength: 3 }) }),
    fc.record({
      edit: fc.constant('set-member' as const),
      member: fc.constantFrom('title', 'remark', 'kept', '3'),
      value: fc.constantFrom('x', undefined),
    }),
    fc.record({ edit: fc.constant('several' as const), edits: fc.array(tie('edit'), { maxLength: 3 }) }),
  ),
}));

const start = graphOf(
  [
    { id: 'span', type: 'quantities/length', values: { value: '6 m' } },
    { id: 'p', type: 'setting-out/point' },
    { id: 'f', type: 'quantities/formula' },
    { id: 'r', type: 'quantities/reading' },
  ],
  ['span.value > p.up', 'span.value > f.a', 'span.value > f.b', 'f.result > r.value'],
  ['span', 'r'],
);

describe('a session under any edits', () => {
  it('stands as if opened anew, and goes all the way back and forth', () => {
    const seen = { fitting: 0, refused: 0 };
    const step = fc.oneof(
      { arbitrary: fc.tuple(edit, fc.constantFrom(undefined, 'drag')), weight: 6 },
      fc.constant('undo' as const),
      fc.constant('redo' as const),
      fc.constant('remove' as const),
    );
    fc.assert(
      fc.property(fc.array(step, { maxLength: 25 }), (steps) => {
        const session = new Session(start, builtIn);
        for (const one of steps) {
          const before = session.document;
          try {
            if (one === 'undo') session.undo();
            else if (one === 'redo') session.redo();
            else if (one === 'remove') session.edit(removalOf(session.document, new Set(['p'])));
            else session.edit(one[0], one[1]);
            seen.fitting += 1;
          } catch (error) {
            expect(error).toBeInstanceOf(EditError);
            expect(session.document).toBe(before);
            seen.refused += 1;
          }
        }
        lookAtAll(session);
        const fresh = new Session(session.document, builtIn);
        expect(everyFigure(session)).toEqual(everyFigure(fresh));
        expect(session.queries).toEqual(fresh.queries);
        const end = JSON.stringify(session.document);
        let back = 0;
        for (; session.canUndo; back++) session.undo();
        expect(JSON.stringify(session.document)).toBe(JSON.stringify(start));
        for (; back > 0; back--) session.redo();
        expect(JSON.stringify(session.document)).toBe(end);
      }),
      { numRuns: 600 },
    );
    expect(seen.fitting).toBeGreaterThan(1000);
    expect(seen.refused).toBeGreaterThan(200);
  });
});
