import { describe, expect, it } from 'vitest';
import { builtIn } from '../../nodes/index.ts';
import {
  apply,
  type Edit,
  EditError,
  type GraphDocument,
  readGraph,
  removalOf,
  Session,
  sliders,
  writeGraph,
} from '../../src/graph/index.ts';
import { everyFigure, graphOf, linkOf, open, openReady, READY, readyText, texts } from '../support/graphs.ts';
import { randomFrom } from '../support/random.ts';

const set = (id: string, text: string, input = 'value'): Edit => ({ edit: 'set-value', id, input, text });

describe('a live graph', () => {
  it('is only run when a figure changes, and traced again when its structure does', () => {
    const session = openReady('ferry-hall');
    const { live } = session;
    const before = session.value('moment', 'limit');
    session.edit(set('knee-up', '7 m'));
    expect(session.live === live).toBe(true);
    expect(session.value('moment', 'limit')).not.toBe(before);
    session.edit({ edit: 'set-setting', id: 'knee-moment', setting: 'rule', value: 'at most' });
    expect(session.live === live).toBe(false);
  });

  it.each<[string, Edit]>([
    ['a link less', { edit: 'remove-link', link: linkOf('span.value > half.span') }],
    ['a node more', { edit: 'add-node', node: { id: 'new', type: 'quantities/length' } }],
    ['another name', { edit: 'change-node', node: { id: 'span', type: 'quantities/length', name: 'Width' } }],
    ['a figure gone back to its default', { edit: 'set-value', id: 'span', input: 'value', text: undefined }],
    ['another dimension', set('span', '20 kN')],
    ['no figure', set('span', 'wide')],
    ['a figure beyond all figures', set('span', '1e999 m')],
    ['a figure for an input that is linked', set('c', '3 m', 'up')],
  ])('is traced again for %s, and again when that is taken back', (_, edit) => {
    const session = openReady('riding-barn');
    const before = everyFigure(session);
    const traced = session.live;
    session.edit(edit);
    const changed = session.live;
    expect(changed === traced).toBe(false);
    expect(everyFigure(session).every(Number.isFinite)).toBe(true);
    session.undo();
    expect(session.live === changed).toBe(false);
    expect(session.queries).toEqual([]);
    expect(everyFigure(session)).toEqual(before);
  });

  it('is only run for several figures at once, for undo and for redo', () => {
    const session = openReady('riding-barn');
    const { live } = session;
    session.edit({ edit: 'several', edits: [set('span', '22 m'), set('eaves', '12 ft')] });
    session.undo();
    session.redo();
    expect(session.live === live).toBe(true);
    expect(session.value('eaves', 'value')).toBeCloseTo(3.6576, 12);
  });

  it('gives the same figures run again as it does traced anew', () => {
    for (const name of READY) {
      const session = openReady(name);
      const random = randomFrom(name.length);
      for (const { id, lower = 0, upper = 1, measure } of sliders(session)) {
        session.edit(set(id, `${random(lower, upper) / measure.units.SI.factor}${measure.units.SI.symbol}`));
      }
      const fresh = new Session(session.document, builtIn);
      for (const { id } of session.document.nodes) {
        expect(session.state(id)).toBe(fresh.state(id));
        for (const output of Object.keys(fresh.live.traced.nodes.get(id)?.type?.outputs ?? {})) {
          expect(session.value(id, output)).toEqual(fresh.value(id, output));
        }
      }
      expect(texts(session)).toEqual(texts(fresh));
    }
  });

  it('shows a query for a figure that can not be read, keeps what was typed, and recovers', () => {
    const session = openReady('riding-barn');
    const before = session.value('m-left', 'limit');
    session.edit(set('span', '20 kN'));
    expect(texts(session)).toEqual(['span: Input "Length": "20 kN" is a force where a length is wanted']);
    expect(session.state('m-left')).toBe('waits');
    expect(session.document.nodes.find(({ id }) => id === 'span')?.values?.value).toBe('20 kN');
    session.edit(set('span', '20 m'));
    expect(texts(session)).toEqual([]);
    expect(session.value('m-left', 'limit')).toBe(before);
  });

  it('takes a quantity of another dimension where any will do', () => {
    const session = open([{ id: 'r', type: 'quantities/reading', values: { value: '3 m' } }]);
    session.edit(set('r', '5 kN'));
    expect(session.value('r', 'value')).toBe(5000);
    expect(session.queries).toEqual([]);
  });

  it('tells whoever listens, until they stop', () => {
    const session = openReady('riding-barn');
    let heard = 0;
    const stop = session.subscribe(() => {
      heard += 1;
    });
    session.edit(set('span', '21 m'));
    session.undo();
    stop();
    session.redo();
    expect(heard).toBe(2);
  });
});

describe('undo', () => {
  it('takes everything back, and redo does it all again', () => {
    const session = openReady('market-hall');
    const start = writeGraph(session.document);
    const edits: Edit[] = [
      set('span', '30 m'),
      { edit: 'add-node', node: { id: 'new', type: 'quantities/length' } },
      { edit: 'add-link', link: linkOf('new.value > a.up') },
      { edit: 'change-node', node: { id: 'new', type: 'quantities/length', name: 'Plinth' } },
      { edit: 'set-rail', rail: ['new', ...session.document.rail] },
      { edit: 'set-member', member: 'title', value: 'Market hall on a plinth' },
      { edit: 'set-setting', id: 'thrust', setting: 'rule', value: 'at most' },
    ];
    for (const edit of edits) session.edit(edit);
    session.edit(removalOf(session.document, new Set(['k1', 'new'])));
    const end = writeGraph(session.document);
    expect(session.queries.length).toBeGreaterThan(0);
    while (session.canUndo) session.undo();
    expect(writeGraph(session.document)).toBe(start);
    expect(session.queries).toEqual([]);
    while (session.canRedo) session.redo();
    expect(writeGraph(session.document)).toBe(end);
  });

  it('takes a gesture back in one step', () => {
    const session = openReady('riding-barn');
    for (const text of ['21 m', '22 m', '23 m']) session.edit(set('span', text), 'drag 1');
    session.edit(set('span', '25 m'), 'drag 2');
    session.undo();
    expect(session.document.nodes.find(({ id }) => id === 'span')?.values?.value).toBe('23 m');
    session.undo();
    expect(session.document.nodes.find(({ id }) => id === 'span')?.values?.value).toBe('20 m');
    expect(session.canUndo).toBe(false);
    session.redo();
    expect(session.document.nodes.find(({ id }) => id === 'span')?.values?.value).toBe('23 m');
  });
});

describe('a long drag', () => {
  const at = (i: number): string => `${20 + i / 5000} m`;

  it('of 20,000 moves is one step, that runs the tape once when it is taken back', () => {
    const session = openReady('riding-barn');
    const before = session.document;
    for (let i = 1; i <= 20_000; i++) session.edit(set('span', at(i)), 'drag');
    const { live } = session;
    let heard = 0;
    session.subscribe(() => {
      heard += 1;
    });
    session.undo();
    expect(session.document).toEqual(before);
    expect(session.canUndo).toBe(false);
    session.redo();
    expect(session.value('span', 'value')).toBe(24);
    expect(session.live === live).toBe(true);
    expect(heard).toBe(2);
  });

  it('of a key point moves two figures, one of which was not typed before', () => {
    const session = open([{ id: 'p', type: 'setting-out/point', values: { up: '1 m' } }]);
    const before = JSON.stringify(session.document);
    for (let i = 1; i <= 3000; i++) {
      const edits = [set('p', at(i), 'across'), set('p', at(-i), 'up')];
      session.edit({ edit: 'several', edits }, 'drag');
    }
    expect(session.value('p', 'point')).toEqual({ x: 20.6, y: 19.4 });
    session.undo();
    expect(JSON.stringify(session.document)).toBe(before);
    session.redo();
    expect(session.value('p', 'point')).toEqual({ x: 20.6, y: 19.4 });
  });

  it('that goes through other edits is taken back with them', () => {
    const session = openReady('riding-barn');
    const before = JSON.stringify(session.document);
    const span = session.document.nodes.find(({ id }) => id === 'span');
    for (let i = 1; i < 6; i++) {
      session.edit(set('span', at(i)), 'drag');
      session.edit({ edit: 'change-node', node: { ...span, id: 'span', type: 'x/y', name: `${i}` } }, 'drag');
      session.edit(set('eaves', at(i)), 'drag');
      session.edit({ edit: 'set-rail', rail: [`${i}`] }, 'drag');
    }
    session.undo();
    expect(JSON.stringify(session.document)).toBe(before);
    expect(session.canUndo).toBe(false);
  });
});

describe('a link that a file holds twice', () => {
  const twice = graphOf(
    [
      { id: 'a', type: 'quantities/length' },
      { id: 'p', type: 'setting-out/point' },
    ],
    ['a.value > p.up', 'a.value > p.up'],
  );

  it('can be taken off once, as its query asks, and put back', () => {
    const session = new Session(twice, builtIn);
    expect(texts(session)).toEqual(['p: Input "Up" takes one link and has 2: remove all but one']);
    session.edit({ edit: 'remove-link', link: linkOf('a.value > p.up') });
    expect(texts(session)).toEqual([]);
    session.undo();
    expect(session.document).toEqual(twice);
    session.redo();
    expect(texts(session)).toEqual([]);
  });

  it('goes with its node, and comes back with it', () => {
    const session = new Session(twice, builtIn);
    session.edit(removalOf(session.document, new Set(['a'])));
    session.undo();
    expect(session.document).toEqual(twice);
  });
});

describe('an edit', () => {
  const document = (): GraphDocument => readGraph(readyText('riding-barn'));

  it.each<[string, Edit, string]>([
    [
      'a second node of an id',
      { edit: 'add-node', node: { id: 'span', type: 'x/y' } },
      'there is a node "span" already',
    ],
    ['of a node that is not there', set('gone', '3 m'), 'there is no node "gone"'],
    ['removing a linked node', { edit: 'remove-node', id: 'span' }, 'has links or stands on the rail'],
    ['removing a link twice', { edit: 'remove-link', link: linkOf('a.b > c.d') }, 'there is no such link'],
    [
      'adding a link twice',
      { edit: 'add-link', link: linkOf('a.point > left-column.from') },
      'is there already',
    ],
    [
      'setting the nodes as a whole',
      { edit: 'set-member', member: 'nodes', value: [] },
      'not set as a whole',
    ],
  ])('%s is refused, and changes nothing', (_, edit, words) => {
    const before = document();
    const content = writeGraph(before);
    expect(() => apply(before, edit)).toThrow(EditError);
    expect(() => apply(before, edit)).toThrow(words);
    expect(writeGraph(before)).toBe(content);
  });

  it('in several parts leaves all as it was if one does not fit', () => {
    const session = new Session(document(), builtIn);
    const content = writeGraph(session.document);
    expect(() => session.edit({ edit: 'several', edits: [set('span', '22 m'), set('gone', '1 m')] })).toThrow(
      EditError,
    );
    expect(writeGraph(session.document)).toBe(content);
    expect(session.canUndo).toBe(false);
  });

  it('and its inverse restore the very document, for random edits', () => {
    const random = randomFrom(11);
    for (let i = 0; i < 300; i++) {
      let current = document();
      const start = writeGraph(current);
      const inverses: Edit[] = [];
      for (let k = 0; k < 8; k++) {
        const edit = randomEdit(current, random, k);
        const applied = apply(current, edit);
        inverses.unshift(applied.inverse);
        current = applied.document;
      }
      for (const inverse of inverses) current = apply(current, inverse).document;
      expect(writeGraph(current)).toBe(start);
    }
  });
});

function randomEdit(document: GraphDocument, random: ReturnType<typeof randomFrom>, k: number): Edit {
  const node = document.nodes[random.whole(0, document.nodes.length - 1)] as GraphDocument['nodes'][number];
  const link = document.links[random.whole(0, document.links.length - 1)] as GraphDocument['links'][number];
  const edits: readonly Edit[] = [
    set(node.id, `${random.whole(1, 99)} m`, random(0, 1) < 0.5 ? 'value' : 'other'),
    {
      edit: 'set-value',
      id: node.id,
      input: Object.keys(node.values ?? { value: '' })[0] ?? 'value',
      text: undefined,
    },
    { edit: 'set-setting', id: node.id, setting: 'rule', value: random(0, 1) < 0.5 ? 'at most' : undefined },
    { edit: 'change-node', node: { ...node, name: `Name ${k}`, place: [random.whole(0, 9), 4] } },
    { edit: 'add-node', node: { id: `new ${k} ${random.whole(0, 1e9)}`, type: 'quantities/length' }, at: 3 },
    { edit: 'remove-link', link },
    { edit: 'set-rail', rail: document.rail.slice(1) },
    {
      edit: 'set-member',
      member: random(0, 1) < 0.5 ? 'remark' : 'kept by',
      value: random(0, 1) < 0.5 ? undefined : 'x',
    },
    removalOf(document, new Set([node.id])),
  ];
  return edits[random.whole(0, edits.length - 1)] as Edit;
}

describe('a pull', () => {
  it.each(READY)('in %s is the slope that moving each slider shows', (name) => {
    const session = openReady(name);
    const typed = sliders(session);
    const places = typed.map(({ id }) => session.live.placeOf(id, 'value') as number);
    for (const { id, type } of session.document.nodes) {
      if (type !== 'quantities/reading') continue;
      const pulls = session.live.pull(id, 'value', places);
      const base = session.live.traced.figures;
      const scale = Math.max(
        ...(pulls ?? []).map((pull, i) => Math.abs((pull ?? 0) * (base[places[i] as number]?.value ?? 0))),
      );
      for (const [i, place] of places.entries()) {
        const at = base[place]?.value ?? Number.NaN;
        const step = 1e-5 * Math.max(Math.abs(at), 1e-3);
        const values = [at + step, at - step].map((value) => {
          session.live.set(new Map([[place, value]]));
          return session.value(id, 'value') as number;
        });
        session.live.set(new Map([[place, at]]));
        const slope = ((values[0] as number) - (values[1] as number)) / (2 * step);
        // Central differences with a step of 1e-5: second order in the step, and rounding over the step.
        expect(
          Math.abs((pulls?.[i] ?? Number.NaN) - slope) * Math.max(Math.abs(at), 1e-3),
        ).toBeLessThanOrEqual(1e-6 * scale + 1e-9);
      }
    }
  });
});
