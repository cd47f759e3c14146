import { describe, expect, it } from 'vitest';
import { type NodeRecord, sliders } from '../../src/graph/index.ts';
import { queryText } from '../../src/tape/index.ts';
import { everyFigure, open, texts } from '../support/graphs.ts';

const length = (id: string, value = '3 m'): NodeRecord => ({
  id,
  type: 'quantities/length',
  values: { value },
});
const point = (id: string): NodeRecord => ({ id, type: 'setting-out/point' });
const formula = (id: string, text: string): NodeRecord => ({
  id,
  type: 'quantities/formula',
  settings: { formula: text },
});

describe('what is wrong with a graph', () => {
  it.each<[string, NodeRecord[], string[], string[]]>([
    [
      'a link from a node that is not there',
      [point('p')],
      ['gone.value > p.up'],
      [
        'p: Input "Up" is linked to a node "gone" that the graph does not have: link another output, or remove the link',
      ],
    ],
    [
      'a link to a node that is not there',
      [length('a')],
      ['a.value > gone.up'],
      ['graph: A link leads to a node "gone" that the graph does not have: remove the link'],
    ],
    [
      'a link from an output that is not there',
      [length('a'), point('p')],
      ['a.height > p.up'],
      [
        'p: Input "Up" is linked to an output "height" that "Length" does not have: link another output, or remove the link',
      ],
    ],
    [
      'a link to an input that is not there',
      [length('a'), point('p')],
      ['a.value > p.sideways'],
      ['p: A link ends at an input "sideways" that the node does not have: remove the link'],
    ],
    [
      'a kind that does not fit',
      [{ id: 'f', type: 'quantities/force' }, point('p')],
      ['f.value > p.up'],
      ['p: A force is linked to input "Up", which takes a length: link another output'],
    ],
    [
      'a quantity of the wrong dimension',
      [length('a'), formula('f', 'a * a'), point('p')],
      ['a.value > f.a', 'f.result > p.up'],
      ['p: Input "Up": an area is linked where a length is wanted: link another output'],
    ],
    [
      'two links where one is taken',
      [length('a'), length('b'), point('p')],
      ['a.value > p.up', 'b.value > p.up'],
      ['p: Input "Up" takes one link and has 2: remove all but one'],
    ],
    [
      'an input without a link',
      [{ id: 'c', type: 'setting-out/chord' }],
      [],
      [
        'c: Input "From" has nothing linked to it: link a point',
        'c: Input "To" has nothing linked to it: link a point',
      ],
    ],
    [
      'a node that no pack has',
      [{ id: 's', type: 'towers/spire' }],
      [],
      [
        's: No pack is loaded that has the node "towers/spire": load the pack "towers". The node\'s data is kept',
      ],
    ],
    [
      'a node that its pack does not have',
      [{ id: 's', type: 'arch/spire' }],
      [],
      ['s: The pack "arch" has no node "arch/spire": replace the node. Its data is kept'],
    ],
    [
      'a force where a length is typed',
      [length('a', '12 kN')],
      [],
      ['a: Input "Length": "12 kN" is a force where a length is wanted'],
    ],
    [
      'a figure without a unit',
      [length('a', '12')],
      [],
      ['a: Input "Length": "12" has no unit where a length is wanted: write for example "12 m"'],
    ],
    [
      'no figure at all',
      [length('a', 'NaN m')],
      [],
      ['a: Input "Length": "NaN m" does not begin with a figure'],
    ],
    [
      'a figure beyond all figures',
      [length('a', '1e999 m')],
      [],
      ['a: Input "Length": "1e999 m" is too large a figure'],
    ],
    [
      'a count that is none',
      [{ id: 'n', type: 'quantities/count', values: { value: '2.5' } }],
      [],
      ['n: Input "Count": "2.5" is no count: write a whole number from 0 to 10000'],
    ],
    [
      'a setting that is none of its options',
      [{ id: 'r', type: 'quantities/reading', values: { value: '3 m' }, settings: { rule: 'sometimes' } }],
      [],
      ['r: Setting "Kind of limit" is "sometimes", but must be one of none, at most, at least, target'],
    ],
    [
      'a setting of another name',
      [{ id: 'r', type: 'quantities/reading', values: { value: '3 m' }, settings: { rul: 'at most' } }],
      [],
      ['r: A setting "rul" is written that the node does not have: it has rule'],
    ],
    [
      'a figure for an input of another name',
      [{ id: 'p', type: 'setting-out/point', values: { upp: '3 m' } }],
      [],
      ['p: A figure is written for an input "upp" that the node does not have: it has across, up'],
    ],
    [
      'a limit of another dimension',
      [
        {
          id: 'r',
          type: 'quantities/reading',
          values: { value: '3 m', limit: '3 kN' },
          settings: { rule: 'at most' },
        },
      ],
      [],
      ['r: The limit is a force where the value is a length: write the limit with its unit'],
    ],
    [
      'a node that reads itself',
      [formula('f', 'a + 1')],
      ['f.result > f.a'],
      ['f: The links run in a loop ("Formula" → "Formula"): remove one of them'],
    ],
    [
      'lists where one is taken',
      [
        { id: 'a', type: 'setting-out/point' },
        { id: 't', type: 'setting-out/turn' },
        { id: 'o', type: 'setting-out/offset-point' },
      ],
      [
        'a.point > t.point',
        'a.point > t.centre',
        'a.point > t.others',
        'a.point > t.others',
        't.others > o.from',
      ],
      ['o: A list of 2 is linked to input "From", which takes one point: link a single output'],
    ],
    [
      'no reference where the nearest point is wanted',
      [
        { id: 'c', type: 'setting-out/point' },
        { id: 'k', type: 'setting-out/circle' },
        { id: 'm', type: 'setting-out/circles-meet' },
      ],
      ['c.point > k.centre', 'k.circle > m.first', 'k.circle > m.second'],
      [
        'm: The point nearest to a reference is wanted, and no reference is linked: link one, or set which point is meant',
      ],
    ],
  ])('%s is a query that says so', (_, nodes, links, expected) => {
    const session = open(nodes, links);
    expect(texts(session)).toEqual(expected);
    expect(session.document.nodes).toHaveLength(nodes.length);
  });

  it('on the rail is said of the graph, and the rest of the rail stands', () => {
    const session = open([length('a')], [], ['gone', 'a']);
    expect(texts(session)).toEqual([
      'graph: The rail names a node "gone" that the graph does not have: take it off the rail',
    ]);
    expect(sliders(session).map(({ id }) => id)).toEqual(['a']);
  });

  it('calls nodes by the names that people gave them', () => {
    const session = open(
      [
        { ...length('a'), name: 'Rise' },
        point('p'),
        { ...formula('f', 'x + 1'), name: 'First' },
        { ...formula('g', 'x + 1'), name: 'Second' },
      ],
      ['a.height > p.up', 'f.result > g.x', 'g.result > f.x'],
    );
    expect(texts(session)[0]).toContain('that "Rise" does not have');
    expect(texts(session)[1]).toMatch(/\("(First" → "Second" → "First|Second" → "First" → "Second)"\)/);
  });

  it('is all told at once where a node has several faults', () => {
    const session = open(
      [length('a'), { id: 'f', type: 'quantities/force' }, { id: 'c', type: 'setting-out/circle' }],
      ['f.value > c.centre', 'a.value > c.radius', 'a.value > c.radius', 'a.value > c.colour'],
    );
    expect(session.queries.map(({ owner, code }) => `${owner} ${code}`).toSorted()).toEqual([
      'c no-input',
      'c too-many-links',
      'c wrong-kind',
    ]);
  });

  it('is none where one kind stands for another', () => {
    const session = open(
      [
        { id: 'n', type: 'quantities/count', values: { value: '3' } },
        { id: 't', type: 'virtual-work/perturbation' },
        length('a'),
        formula('f', 'a * n'),
        point('p'),
        point('q'),
        { id: 'r', type: 'setting-out/turn' },
        { id: 'm', type: 'setting-out/point-at-ratio' },
        { id: 'c', type: 'setting-out/chord' },
      ],
      [
        ...['a.value > f.a', 'n.value > f.n', 'f.result > q.across', 'f.result > p.up'],
        ...['p.point > r.point', 'q.point > r.centre', 't.turn > r.angle'],
        ...['p.point > c.from', 'q.point > c.to', 'c.chord > m.chord', 'n.value > m.ratio'],
      ],
    );
    expect(texts(session)).toEqual([]);
    expect(session.value('m', 'point')).toEqual({ x: 27, y: -18 });
  });

  it('has its amount in the units that are asked for, follows the figures, and goes when they fit', () => {
    const session = open(
      [
        point('p'),
        { id: 'q', type: 'setting-out/point', values: { across: '7 m' } },
        { id: 'c', type: 'setting-out/circle', values: { radius: '3 m' } },
        { id: 'd', type: 'setting-out/circle', values: { radius: '3 m' } },
        { id: 'm', type: 'setting-out/circles-meet', settings: { branch: 'left' } },
        point('after'),
        { id: 'e', type: 'setting-out/chord' },
      ],
      [
        ...['p.point > c.centre', 'q.point > d.centre', 'c.circle > m.first', 'd.circle > m.second'],
        ...['m.point > e.from', 'after.point > e.to'],
      ],
    );
    const say = (system: 'SI' | 'US') => session.queries.map((query) => queryText(query, system));
    expect(session.queries.map(({ owner, code }) => [owner, code])).toEqual([['m', 'circles-apart']]);
    expect(say('SI')[0]).toMatch(/miss each other by 1\.000\u00a0m: /);
    expect(say('US')[0]).toMatch(/miss each other by 3\.281\u00a0ft: /);
    expect(session.state('e')).toBe('waits');
    session.edit({ edit: 'set-value', id: 'q', input: 'across', text: '6.25 m' });
    expect(say('SI')[0]).toMatch(/by 0\.2500\u00a0m: /);
    session.edit({ edit: 'set-value', id: 'q', input: 'across', text: '4 m' });
    expect(say('SI')).toEqual([]);
    expect(['m', 'e'].map((id) => session.state(id))).toEqual(['ready', 'ready']);
  });

  it('on a loop of three names them, and what reads from it waits', () => {
    const session = open(
      [
        formula('a', 'x + 1'),
        formula('b', 'x + 1'),
        formula('c', 'x + 1'),
        formula('d', 'x * 2'),
        length('e'),
      ],
      ['a.result > b.x', 'b.result > c.x', 'c.result > a.x', 'c.result > d.x'],
    );
    expect(texts(session)).toHaveLength(3);
    for (const line of texts(session)) expect(line).toContain('The links run in a loop');
    expect(['a', 'b', 'c', 'd', 'e'].map((id) => session.state(id))).toEqual([
      'query',
      'query',
      'query',
      'waits',
      'ready',
    ]);
  });

  it('shows once, where it is, and what depends on it waits without a figure', () => {
    const session = open(
      [
        length('a'),
        formula('f', '1 / (a - a)'),
        formula('g', 'x + x'),
        { id: 'r', type: 'quantities/reading' },
      ],
      ['a.value > f.a', 'f.result > g.x', 'g.result > r.value'],
    );
    expect(texts(session)).toEqual(['f: The formula divides by 0\u00a0m: change what it divides by']);
    expect(['a', 'f', 'g', 'r'].map((id) => session.state(id))).toEqual(['ready', 'query', 'waits', 'waits']);
    expect(session.value('g', 'result')).toBeUndefined();
    expect(everyFigure(session).every(Number.isFinite)).toBe(true);
  });

  it('with a figure that grows beyond all bounds is a query, and no figure', () => {
    const session = open(
      [length('a', '1e300 m'), formula('f', 'a * a'), formula('g', 'x + x')],
      ['a.value > f.a', 'f.result > g.x'],
    );
    expect(texts(session)).toEqual([
      'f: A figure here grows beyond all bounds: look for a division by nothing or a very large figure among the inputs',
    ]);
    expect(session.state('g')).toBe('waits');
    expect(everyFigure(session).every(Number.isFinite)).toBe(true);
  });
});
