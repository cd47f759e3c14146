import { describe, expect, it } from 'vitest';
import { builtInPacks } from '../../nodes/index.ts';
import {
  type AnyNodeDeclaration,
  choice,
  defineKind,
  defineNode,
  definePack,
  flag,
  input,
  type Kind,
  kinds,
  Library,
  many,
  type NodeRecord,
  optional,
  optionalQuantity,
  output,
  outputs,
  Session,
  text,
} from '../../src/graph/index.ts';
import { LENGTH, measures } from '../../src/quantity/index.ts';
import { type Scalar, Trace } from '../../src/tape/index.ts';
import { graphOf, texts } from '../support/graphs.ts';

const timber: Kind<{ readonly depth: Scalar }> = defineKind({
  name: 'timber',
  called: 'a timber',
  line: 'structure',
});

const beam = defineNode({
  name: 'beam',
  title: 'Beam',
  band: 'members',
  help: 'A beam.',
  inputs: { depth: input(kinds.length, 'Depth', '0.4 m'), rafter: optional(timber, 'Rafter') },
  settings: {
    grade: choice('Grade', { low: 'low', high: 'high' }, 'low'),
    planed: flag('Planed', false),
    note: text('Note', '', 10),
    least: optionalQuantity('Least depth', measures.length),
  },
  outputs: { timber: output(timber, 'Timber'), depth: output(kinds.length, 'Depth') },
  trace: ({ depth, rafter }, { grade, planed }) => {
    const rough = grade === 'high' ? depth.times(2) : depth;
    const total = rafter === undefined ? rough : rough.plus(rafter.depth);
    return { timber: { depth: planed ? total.times(0.5) : total }, depth: total };
  },
  example: { gives: { depth: '0.4 m' } },
});

const stack = defineNode({
  name: 'stack',
  title: 'Stack',
  band: 'members',
  help: 'A stack.',
  inputs: { timbers: many(timber, 'Timbers') },
  outputs: { depths: outputs(kinds.length, 'Depths') },
  trace: ({ timbers }) => ({ depths: timbers.map(({ depth }) => depth) }),
  example: { gives: {} },
});

const carpentry = definePack({ name: 'carpentry', version: '0.1.0', kinds: [timber], nodes: [beam, stack] });

function open(packs: Parameters<typeof definePack>[0][], nodes: NodeRecord[], links: string[] = []) {
  return new Session(graphOf(nodes, links), new Library([...builtInPacks, ...packs.map(definePack)]));
}

const withCarpentry = (nodes: NodeRecord[], links: string[] = []) =>
  new Session(graphOf(nodes, links), new Library([...builtInPacks, carpentry]));

describe('a pack of one’s own', () => {
  it('adds nodes and kinds that work like the built-in ones', () => {
    const session = withCarpentry(
      [
        { id: 'rise', type: 'quantities/length', values: { value: '0.3 m' } },
        { id: 'a', type: 'carpentry/beam', settings: { grade: 'high' } },
        { id: 'b', type: 'carpentry/beam', settings: { planed: true, least: '0.2 m', note: 'reused' } },
        { id: 's', type: 'carpentry/stack' },
      ],
      ['rise.value > a.depth', 'a.timber > b.rafter', 'b.timber > s.timbers', 'a.timber > s.timbers'],
    );
    expect(texts(session)).toEqual([]);
    expect(session.value('b', 'depth')).toBe(1);
    expect(session.value('s', 'depths')).toEqual([0.5, 0.6]);
  });

  it('says what its settings may be', () => {
    const session = withCarpentry([
      { id: 'a', type: 'carpentry/beam', settings: { grade: 'constructor' } },
      { id: 'b', type: 'carpentry/beam', settings: { planed: 'yes' } },
      { id: 'c', type: 'carpentry/beam', settings: { note: 'far too long a note' } },
      { id: 'd', type: 'carpentry/beam', settings: { least: '3 kN' } },
      { id: 'e', type: 'carpentry/beam', settings: { least: true, note: false } },
    ]);
    expect(texts(session)).toEqual([
      'a: Setting "Grade" is "constructor", but must be one of low, high',
      'b: Setting "Planed" is "yes", but must be true or false',
      'c: Setting "Note" has 19 signs, more than the 10 that are read: shorten it',
      'd: Setting "Least depth": "3 kN" is a force where a length is wanted',
      'e: Setting "Note" is false, but must be a text',
    ]);
  });

  it('keeps its kinds apart from others', () => {
    const session = withCarpentry(
      [
        { id: 'p', type: 'setting-out/point' },
        { id: 'a', type: 'carpentry/beam' },
        { id: 's', type: 'carpentry/stack' },
      ],
      ['p.point > a.rafter', 'p.point > s.timbers'],
    );
    expect(texts(session)).toEqual([
      'a: A point is linked to input "Rafter", which takes a timber: link another output',
      's: A point is linked to input "Timbers", which takes a timber: link another output',
    ]);
  });

  it('is not loaded twice, nor under the name of another', () => {
    expect(() => new Library([carpentry, carpentry])).toThrow('two nodes are called carpentry/beam');
  });
});

describe('a pack at fault', () => {
  /** A node that gives a length and lengths, or should. */
  const broken = (trace: (depth: Scalar) => unknown): AnyNodeDeclaration => ({
    ...defineNode({
      name: 'broken',
      title: 'Broken',
      band: 'members',
      help: 'Broken.',
      inputs: { depth: input(kinds.length, 'Depth', '1 m') },
      outputs: { one: output(kinds.length, 'One'), list: outputs(kinds.length, 'List') },
      trace: ({ depth }) => ({ one: depth, list: [depth] }),
      example: { gives: {} },
    }),
    trace: ({ depth }) => trace(depth as Scalar) as Record<string, unknown>,
  });

  const circular = (depth: Scalar): unknown => {
    const one: Record<string, unknown> = { depth };
    one.one = one;
    return { one, list: [] };
  };

  it.each<[string, (depth: Scalar) => unknown, string]>([
    [
      'throws',
      () => {
        throw new Error('no table');
      },
      'no table',
    ],
    [
      'throws a text',
      () => {
        throw 'no table';
      },
      'no table',
    ],
    ['gives nothing', () => undefined, 'it gives no "one"'],
    ['gives too little', (depth) => ({ one: depth }), 'it gives no list "list"'],
    [
      'gives one where a list is declared',
      (depth) => ({ one: depth, list: depth }),
      'it gives no list "list"',
    ],
    ['gives a promise', async (depth) => ({ one: depth, list: [] }), 'it gives no "one"'],
    [
      'gives a scalar of another trace',
      () => ({ one: new Trace().input('depth', LENGTH), list: [] }),
      'scalars of two traces do not mix',
    ],
    [
      'gives no number',
      (depth) => ({ one: depth.trace.constant(Number.NaN, LENGTH), list: [] }),
      'a constant must be finite',
    ],
    ['gives a value that holds itself', circular, ''],
  ])('that %s has a query at its node, and the rest goes on', (_, trace, words) => {
    const session = open(
      [{ name: 'faulty', version: '1', nodes: [broken(trace)] }],
      [
        { id: 'x', type: 'faulty/broken' },
        { id: 'p', type: 'setting-out/point' },
        { id: 'q', type: 'setting-out/point', values: { up: '2 m' } },
      ],
      ['x.one > p.up'],
    );
    expect(texts(session)).toHaveLength(1);
    expect(texts(session)[0]).toContain(`x: The node failed (`);
    expect(texts(session)[0]).toContain(words);
    expect(texts(session)[0]).toContain('this is a fault of its pack');
    expect(['x', 'p', 'q'].map((id) => session.state(id))).toEqual(['query', 'waits', 'ready']);
    expect(session.value('q', 'point')).toEqual({ x: 0, y: 2 });
  });
});
