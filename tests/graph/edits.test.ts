import { describe, expect, it } from 'vitest';
import { builtIn } from '../../nodes/index.ts';
import {
  apply,
  changesOnlyValues,
  type Edit,
  EditError,
  type GraphDocument,
  removalOf,
  Session,
} from '../../src/graph/index.ts';
import { graphOf, linkOf } from '../support/graphs.ts';

/** Everything of a document, the order of its members too. */
const written = (document: GraphDocument): string => JSON.stringify(document);

/** A document of every sort of member, known and unknown, which throws where anything is changed in place. */
function everything(): GraphDocument {
  const document = {
    drawn: 'by hand',
    ...graphOf(
      [
        {
          id: 'a',
          kept: [1, { deep: true }],
          values: { other: '1 m', value: '3 m', third: '2 m' },
          type: 'quantities/length',
          settings: { lower: '1 m', upper: '9 m' },
        },
        { id: 'b', values: {}, type: 'quantities/length', settings: {} },
        { id: 'p', type: 'setting-out/point' },
        { id: 't', type: 'setting-out/turn', place: [3, 4] },
      ],
      ['a.value > p.up', 'b.value > p.across', 'p.point > t.point', 'gone.point > t.centre'],
      ['b', 'gone', 'a'],
    ),
    // A file may hold one link twice, with members of their own.
    remark: 'kept',
  };
  const twice = [1, 2].map((since) => ({ ...linkOf('p.point > t.others'), since }));
  return deepFreeze({ ...document, links: [...twice, ...document.links] }) as GraphDocument;
}

function deepFreeze(value: unknown): unknown {
  if (typeof value !== 'object' || value === null) return value;
  Object.values(value).forEach(deepFreeze);
  return Object.freeze(value);
}

const edits: readonly (readonly [what: string, edit: Edit])[] = [
  ['a node more', { edit: 'add-node', node: { id: 'n', type: 'x/y' } }],
  ['a node more, among others', { edit: 'add-node', node: { id: 'n', type: 'x/y' }, at: 1 }],
  ['a node that links and the rail name already', { edit: 'add-node', node: { id: 'gone', type: 'x/y' } }],
  ['another name', { edit: 'change-node', node: { id: 'a', type: 'quantities/length', name: 'Rise' } }],
  ['another figure', { edit: 'set-value', id: 'a', input: 'value', text: '4 m' }],
  ['a figure more', { edit: 'set-value', id: 'a', input: 'new', text: '4 m' }],
  ['a first figure', { edit: 'set-value', id: 'p', input: 'up', text: '4 m' }],
  ['a first figure among none', { edit: 'set-value', id: 'b', input: 'value', text: '4 m' }],
  ['a figure less', { edit: 'set-value', id: 'a', input: 'value', text: undefined }],
  ['no figure where there is none', { edit: 'set-value', id: 'b', input: 'value', text: undefined }],
  ['another setting', { edit: 'set-setting', id: 'a', setting: 'lower', value: '2 m' }],
  ['a first setting among none', { edit: 'set-setting', id: 'b', setting: 'lower', value: '2 m' }],
  ['a setting less', { edit: 'set-setting', id: 'a', setting: 'lower', value: undefined }],
  ['a link more', { edit: 'add-link', link: linkOf('a.value > t.angle') }],
  ['a link more, among others', { edit: 'add-link', link: linkOf('a.value > t.angle'), at: 1 }],
  ['a link less', { edit: 'remove-link', link: linkOf('a.value > p.up') }],
  ['one of two equal links less', { edit: 'remove-link', link: linkOf('p.point > t.others') }],
  ['the other one less', { edit: 'remove-link', link: linkOf('p.point > t.others'), at: 1 }],
  ['another rail', { edit: 'set-rail', rail: ['a'] }],
  ['another title', { edit: 'set-member', member: 'title', value: 'New' }],
  ['a member more', { edit: 'set-member', member: 'kept by', value: ['us'] }],
  ['a member less', { edit: 'set-member', member: 'remark', value: undefined }],
  ['an unknown member less', { edit: 'set-member', member: 'drawn', value: undefined }],
  ['nodes less', removalOf(everything(), new Set(['p', 'a']))],
  [
    'several at once',
    {
      edit: 'several',
      edits: [
        { edit: 'set-value', id: 'a', input: 'value', text: undefined },
        { edit: 'set-value', id: 'a', input: 'value', text: '7 m' },
        { edit: 'set-value', id: 'a', input: 'value', text: '8 m' },
      ],
    },
  ],
];

describe.each(edits)('an edit to %s', (_, edit) => {
  const before = everything();

  it('leaves the document that it is applied to as it was', () => {
    const { document } = apply(before, edit);
    expect(written(before)).toBe(written(everything()));
    expect(document).not.toBe(before);
  });

  it('is taken back by its inverse, to the order of the members', () => {
    const { document, inverse } = apply(before, edit);
    expect(written(apply(document, inverse).document)).toBe(written(before));
  });

  it('is done again by the inverse of its inverse', () => {
    const { document, inverse } = apply(before, edit);
    const back = apply(document, inverse);
    const again = apply(back.document, back.inverse);
    expect(written(again.document)).toBe(written(document));
    expect(written(apply(again.document, again.inverse).document)).toBe(written(before));
  });

  it('is undone and done again in a session', () => {
    const session = new Session(before, builtIn);
    session.edit(edit);
    const after = written(session.document);
    session.undo();
    expect(written(session.document)).toBe(written(before));
    session.redo();
    expect(written(session.document)).toBe(after);
  });
});

describe('removing nodes', () => {
  it('takes their links and their places on the rail with them, and nothing else', () => {
    const before = everything();
    const { document } = apply(before, removalOf(before, new Set(['a', 'p'])));
    expect(document.nodes).toEqual(before.nodes.filter(({ id }) => id === 'b' || id === 't'));
    expect(document.links).toEqual([linkOf('gone.point > t.centre')]);
    expect(document.rail).toEqual(['b', 'gone']);
  });

  it('that are not there is refused', () => {
    expect(() => apply(everything(), removalOf(everything(), new Set(['missing'])))).toThrow(EditError);
  });
});

describe('an edit that does not fit', () => {
  it.each<[string, Edit, string]>([
    [
      'a node that stands on the rail, taken away alone',
      { edit: 'remove-node', id: 'b' },
      'take those off first',
    ],
    [
      'a change of no node',
      { edit: 'change-node', node: { id: 'missing', type: 'x/y' } },
      'there is no node "missing"',
    ],
    [
      'a setting of no node',
      { edit: 'set-setting', id: 'toString', setting: 'x', value: 'y' },
      'there is no node "toString"',
    ],
    ...['format', 'version', 'nodes', 'links', 'rail'].map((member): [string, Edit, string] => [
      `the member ${member} as a whole`,
      { edit: 'set-member', member, value: undefined },
      'is not set as a whole',
    ]),
  ])('%s is refused, and the session is as it was', (_, edit, words) => {
    const session = new Session(everything(), builtIn);
    session.edit({ edit: 'set-value', id: 'a', input: 'value', text: '5 m' });
    session.undo();
    const { document, live } = session;
    expect(() => session.edit(edit)).toThrow(words);
    expect(() => session.edit(edit)).toThrow(EditError);
    expect(session.document).toBe(document);
    expect(session.live === live).toBe(true);
    expect(session.canUndo).toBe(false);
    // What could be done again still can.
    expect(session.canRedo).toBe(true);
  });
});

it('only changed figures, at any depth, can be run without tracing', () => {
  const figure: Edit = { edit: 'set-value', id: 'a', input: 'value', text: '1 m' };
  const several = (...parts: Edit[]): Edit => ({ edit: 'several', edits: parts });
  expect(changesOnlyValues(several(figure, several(figure)))).toBe(true);
  expect(changesOnlyValues(several(figure, several({ edit: 'set-rail', rail: [] })))).toBe(false);
});
