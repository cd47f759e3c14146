import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { toJsonSchema } from '@valibot/to-json-schema';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { builtIn } from '../../nodes/index.ts';
import {
  apply,
  documentSchema,
  type Edit,
  FileError,
  FORMAT_VERSION,
  type GraphDocument,
  LIMITS,
  type Link,
  type NodeRecord,
  readGraph,
  readings,
  Session,
  writeGraph,
} from '../../src/graph/index.ts';

const ROOT = join(import.meta.dirname, '../..');
const GRAPHS = readdirSync(join(ROOT, 'graphs')).filter((name) => name.endsWith('.skewback.json'));
const read = (name: string): string => readFileSync(join(ROOT, name), 'utf8');

const small = {
  format: 'skewback-graph',
  version: FORMAT_VERSION,
  title: 'A length',
  nodes: [{ id: 'a', type: 'quantities/length', values: { value: '3 m' } }],
  links: [],
  rail: ['a'],
};

const text = (changes: Record<string, unknown>): string => JSON.stringify({ ...small, ...changes });

describe('reading a file', () => {
  it.each([
    ['an empty text', '', 'the file is not JSON'],
    ['half a file', '{"format":', 'the file is not JSON'],
    ['a list', '[]', 'must be a JSON object'],
    ['another format', '{"format":"drawing"}', '"format" must be "skewback-graph"'],
    [
      'a newer version',
      text({ version: 99 }),
      'has version 99 of the format, and versions up to 2 are read here',
    ],
    ['no version', text({ version: 'new' }), 'version must be a whole number'],
    ['version 0', text({ version: 0 }), 'version must be a whole number from 1 to 2'],
    ['half a version', text({ version: 1.5 }), 'version must be a whole number from 1 to 2'],
    ['bad JSON on several lines', '{"a":\n\n  bad\u001b[2J}', 'the file is not JSON: Unexpected token'],
    [
      'two nodes of an id of two lines',
      text({ nodes: [1, 2].map(() => ({ id: 'a\nb\u2028c\u001b', type: 'x/y' })) }),
      'two nodes have the id "a b c "',
    ],
    ['a whole text for the nodes', text({ nodes: 'x\n'.repeat(1e6) }), 'nodes: Invalid type'],
    ['a very long title', text({ title: 'x'.repeat(10_001) }), 'title'],
    ['a very long id', text({ nodes: [{ id: 'x'.repeat(201), type: 'x/y' }] }), 'nodes.0.id'],
    [
      'a very long figure',
      text({ nodes: [{ id: 'a', type: 'x/y', values: { value: '1'.repeat(201) } }] }),
      'nodes.0.values.value',
    ],
    [
      'a very long setting',
      text({ nodes: [{ id: 'a', type: 'x/y', settings: { formula: 'a'.repeat(10_001) } }] }),
      'nodes.0.settings.formula',
    ],
    [
      'a setting that is a figure',
      text({ nodes: [{ id: 'a', type: 'x', settings: { b: 3 } }] }),
      'settings.b',
    ],
    ['a rail of figures', text({ rail: ['a', 3] }), 'rail.1'],
    ['packs of lists', text({ packs: { arch: ['1'] } }), 'packs.arch'],
    [
      'an infinite figure where nothing is known',
      text({ extra: 0 }).replace('"extra":0', '"extra":[{"deep":-1e999}]'),
      'too large',
    ],
    ['no nodes', text({ nodes: undefined }), 'nodes'],
    ['a node without a type', text({ nodes: [{ id: 'a' }] }), 'nodes.0.type'],
    ['a node without an id', text({ nodes: [{ id: '', type: 'x/y' }] }), 'nodes.0.id'],
    [
      'a figure that is no text',
      text({ nodes: [{ id: 'a', type: 'x/y', values: { value: 3 } }] }),
      'nodes.0.values.value',
    ],
    ['a link of one end', text({ links: [{ from: ['a', 'value'] }] }), 'links.0.to'],
    ['a link from nothing', text({ links: [{ from: ['a'], to: ['a', 'b'] }] }), 'links.0.from.1'],
    ['a place of three', text({ nodes: [{ id: 'a', type: 'x/y', place: [1, 2, 3] }] }), 'nodes.0.place'],
    ['two nodes of one id', text({ nodes: [small.nodes[0], small.nodes[0]] }), 'two nodes have the id "a"'],
    [
      'an infinite place',
      text({ nodes: [] }).replace('[]', '[{"id":"a","type":"x/y","place":[1e999,0]}]'),
      'too large',
    ],
    [
      'a key that changes types',
      text({}).replace('"rail"', '"__proto__":{"x":1},"rail"'),
      'a member "__proto__"',
    ],
    [
      'a key like that deep inside',
      text({}).replace('"3 m"}', '"3 m","__proto__":"1"}'),
      'a member "__proto__"',
    ],
    [
      'brackets without end',
      text({ extra: 0 }).replace('0', '['.repeat(5000) + ']'.repeat(5000)),
      'more than 64 deep',
    ],
  ])('%s is refused in one line', (_, content, words) => {
    let message = '';
    try {
      readGraph(content);
    } catch (error) {
      expect(error).toBeInstanceOf(FileError);
      message = (error as Error).message;
    }
    expect(message).toContain(words);
    // One line that a terminal shows as it is.
    expect(message).toMatch(/^[^\p{Cc}\p{Zl}\p{Zp}]{10,400}$/u);
  });

  it('takes a byte order mark', () => {
    expect(readGraph(`\uFEFF${text({})}`).title).toBe('A length');
  });

  it('refuses what is larger than the limits, at once', () => {
    const node = (i: number) => ({ id: `n${i}`, type: 'quantities/length' });
    const nodes = Array.from({ length: 100_000 }, (_, i) => node(i));
    expect(() => readGraph(text({ nodes }))).toThrow(
      'the graph has 100 000 nodes, more than the 50 000 that are read',
    );
    const links = Array.from({ length: LIMITS.links + 1 }, () => ({
      from: ['a', 'value'],
      to: ['a', 'value'],
    }));
    expect(() => readGraph(text({ links }))).toThrow('the graph has 200 001 links');
    expect(() => readGraph(' '.repeat(LIMITS.signs + 1))).toThrow('30 000 001 signs');
  });
});

describe('what a file holds that is not known here', () => {
  it('stays through reading, an edit and writing, at every level', () => {
    const content = text({
      drawn: { by: 'hand', on: [1, 2] },
      nodes: [{ ...small.nodes[0], colourless: true, deep: { er: [{}, null, 'text'] } }],
      links: [{ from: ['a', 'value'], to: ['b', 'x'], since: 3 }],
    });
    const { document } = apply(readGraph(content), {
      edit: 'set-value',
      id: 'a',
      input: 'value',
      text: '4 m',
    });
    const again = JSON.parse(writeGraph(document));
    expect(again).toEqual(JSON.parse(content.replace('3 m', '4 m')));
  });

  it('stays through every edit that does not take it out', () => {
    const content = text({
      drawn: { by: 'hand' },
      nodes: [
        { ...small.nodes[0], settings: { lower: '1 m' }, colourless: true },
        { id: 'p', type: 'setting-out/point', kept: [null] },
      ],
      links: [{ from: ['a', 'value'], to: ['p', 'up'], since: 3 }],
      trailing: null,
    });
    const session = new Session(readGraph(content), builtIn);
    const [first] = session.document.nodes;
    const link: Link = { from: ['a', 'value'], to: ['p', 'across'] };
    const edits: Edit[] = [
      { edit: 'set-value', id: 'a', input: 'value', text: '5 m' },
      { edit: 'set-setting', id: 'a', setting: 'upper', value: '9 m' },
      { edit: 'change-node', node: { ...(first as NodeRecord), name: 'Rise' } },
      { edit: 'add-link', link },
      { edit: 'remove-link', link },
      { edit: 'add-node', node: { id: 'n', type: 'x/y' } },
      { edit: 'set-rail', rail: [] },
      { edit: 'set-member', member: 'title', value: 'Another' },
    ];
    for (const edit of edits) session.edit(edit);
    const saved = JSON.parse(writeGraph(readGraph(writeGraph(session.document))));
    expect(saved).toMatchObject({ drawn: { by: 'hand' }, trailing: null });
    expect(saved.nodes[0]).toMatchObject({ colourless: true, name: 'Rise' });
    expect(saved.nodes[1].kept).toEqual([null]);
    expect(saved.links).toEqual([{ from: ['a', 'value'], to: ['p', 'up'], since: 3 }]);
    while (session.canUndo) session.undo();
    expect(writeGraph(session.document)).toBe(writeGraph(readGraph(content)));
  });

  it('stays where no pack has a node', () => {
    const node = { id: 'z', type: 'towers/spire', values: { tip: '90 m' }, settings: { style: 'tall' } };
    const session = new Session(readGraph(text({ nodes: [node] })), builtIn);
    expect(JSON.parse(writeGraph(session.document)).nodes[0]).toEqual(node);
  });
});

describe('a ready graph', () => {
  const schema = JSON.parse(read('src/graph/graph.schema.json'));
  const valid = new Ajv2020({ strict: false }).compile(schema);

  it.each(GRAPHS)('%s reads and writes to the same bytes, and fits the published schema', (name) => {
    const content = read(`graphs/${name}`);
    expect(writeGraph(readGraph(content))).toBe(content);
    expect(valid(JSON.parse(content)), JSON.stringify(valid.errors)).toBe(true);
  });

  it('does not fit the schema when a member is wrong', () => {
    expect(valid({ ...small, rail: [3] })).toBe(false);
    expect(valid({ ...small, nodes: [{ id: 'a' }] })).toBe(false);
    expect(valid({ ...small, more: 'is allowed' })).toBe(true);
  });
});

it('the published schema is the one that files are checked by', async () => {
  // After a change of the schema: npx vitest run tests/graph/file.test.ts -u
  const made = toJsonSchema(documentSchema, { target: 'draft-2020-12', errorMode: 'ignore' });
  await expect(`${JSON.stringify(made, null, 2)}\n`).toMatchFileSnapshot('../../src/graph/graph.schema.json');
});

describe('a file of an earlier version', () => {
  const old = read('tests/fixtures/version-1.skewback.json');

  it('opens as the present one, with everything in it', () => {
    const document = readGraph(old);
    expect(document.version).toBe(FORMAT_VERSION);
    expect(document.links[0]).toEqual({ from: ['rise', 'value'], to: ['top', 'up'], remark: 'kept' });
    expect(document.remark).toBe('Written by version 1 of the format.');
    const session = new Session(document, builtIn);
    expect(session.queries).toEqual([]);
    expect(session.value('top', 'point')).toEqual({ x: 0, y: 7.5 });
  });

  it('gives the moment that it gave, and saves as the present version with all that it held', () => {
    const document = readGraph(read('tests/fixtures/version-1-barn.skewback.json'));
    const session = new Session(document, builtIn);
    expect(session.queries).toEqual([]);
    // Statics by hand: the thrust is 10 · 3 / (2 · 7) kN, and four metres of column make a moment of it.
    const [reading] = readings(session);
    expect(reading?.value).toBeCloseTo((-4 * 10_000 * 3) / (2 * 7), 8);
    const saved = JSON.parse(writeGraph(document));
    expect(saved.version).toBe(FORMAT_VERSION);
    expect(saved.kept).toEqual({ of: 'version 1' });
    expect(saved.links[3]).toEqual({ from: ['c', 'point'], to: ['crown', 'point'], drawn: 'by hand' });
    expect(readGraph(JSON.stringify(saved))).toEqual(document);
  });

  it('is not of the present version by itself', () => {
    expect(() => readGraph(old.replace('"version": 1', '"version": 2'))).toThrow('links.0');
  });
});

it('what is written reads back the same, whatever signs are in it', () => {
  const signs = 'quotes " \\ \u0000 \u001b \u2028 \ud800 é 𝑎';
  const document = { ...small, title: signs, [signs]: { [signs]: [signs, -0.1, 1e21, 5e-324, true, null] } };
  const written = writeGraph(document as unknown as GraphDocument);
  expect(readGraph(written)).toEqual(document);
  expect(writeGraph(readGraph(written))).toBe(written);
});

it('an empty list and an empty object are written as such', () => {
  const document = { ...small, nodes: [], rail: [], extra: {} } as unknown as GraphDocument;
  expect(readGraph(writeGraph(document))).toEqual(document);
});
