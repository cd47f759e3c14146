import { nodesById, tidyPlaces } from '../../src/graph/index.ts';
import type { Store } from '../store/store.ts';
import { placeOf, rowsOf, SLIP, slipHeight } from './rows.ts';

const GAP = 24;

type Places = ReadonlyMap<string, readonly [number, number]>;

/** Moves nodes to places, as one step. */
export function moveTo(store: Store, places: Places, gesture?: string): void {
  const known = nodesById(store.document);
  const edits = [...places].flatMap(([id, [x, y]]) => {
    const node = known.get(id);
    return node === undefined
      ? []
      : [{ edit: 'change-node' as const, node: { ...node, place: [Math.round(x), Math.round(y)] as const } }];
  });
  if (edits.length > 0) store.edit({ edit: 'several', edits }, gesture);
}

/** Puts every node into its band. */
export function tidy(store: Store): void {
  const height = (id: string) => slipHeight(rowsOf(store, id).length);
  moveTo(store, tidyPlaces(store.document, store.session.library, { width: SLIP.width, gap: GAP, height }));
}

/** Puts the selection beneath each other, as its leftmost stands. */
export function align(store: Store): void {
  const ids = [...store.selection].toSorted((a, b) => placeOf(store, a)[1] - placeOf(store, b)[1]);
  const x = Math.min(...ids.map((id) => placeOf(store, id)[0]));
  let y = placeOf(store, ids[0] ?? '')[1];
  const places = new Map<string, readonly [number, number]>();
  for (const id of ids) {
    places.set(id, [x, y]);
    y += slipHeight(rowsOf(store, id).length) + GAP;
  }
  moveTo(store, places);
}

/** Moves the selection a little; several in a row are taken back in one step. */
export function nudge(store: Store, [dx, dy]: readonly [number, number]): void {
  const places = [...store.selection].map((id) => {
    const [x, y] = placeOf(store, id);
    return [id, [x + dx, y + dy] as const] as const;
  });
  moveTo(store, new Map(places), 'nudge');
}

/** Selects, with the selection, all that it reads from, or all that reads from it, however far. */
export function spread(store: Store, along: 'sources' | 'readers'): void {
  const [near, far] = along === 'sources' ? (['to', 'from'] as const) : (['from', 'to'] as const);
  const nexts = new Map<string, string[]>();
  for (const link of store.document.links) {
    const list = nexts.get(link[near][0]);
    if (list === undefined) nexts.set(link[near][0], [link[far][0]]);
    else list.push(link[far][0]);
  }
  const found = new Set(store.selection);
  const open = [...found];
  for (let id = open.pop(); id !== undefined; id = open.pop()) {
    for (const next of nexts.get(id) ?? []) {
      if (found.has(next)) continue;
      found.add(next);
      open.push(next);
    }
  }
  store.select(found);
}
