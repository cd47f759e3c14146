import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { toJsonSchema } from '@valibot/to-json-schema';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { builtIn } from '../../nodes/index.ts';
import {
  apply,
  documentSchema,
  FileError,
  FORMAT_VERSION,
  type GraphDocument,
  LIMITS,
  readGraph,
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
    expect(message).not.toContain('\n');
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

  it('is not of the present version by itself', () => {
    expect(() => readGraph(old.replace('"version": 1', '"version": 2'))).toThrow('links.0');
  });
});

it('an empty list and an empty object are written as such', () => {
  const document = { ...small, nodes: [], rail: [], extra: {} } as unknown as GraphDocument;
  expect(readGraph(writeGraph(document))).toEqual(document);
});
