import { conversion, type LinkEnd } from '../../src/graph/index.ts';
import type { Store } from '../store/store.ts';

/** Whether the kind of an output suits an input, and the link would make no loop. */
export function fits(store: Store, from: LinkEnd, to: LinkEnd): boolean {
  const { nodes } = store.session.live.traced;
  const output = nodes.get(from[0])?.type?.outputs[from[1]];
  const input = nodes.get(to[0])?.inputs[to[1]];
  if (output === undefined || input === undefined || from[0] === to[0]) return false;
  if (conversion(output.kind, input.kind) === undefined) return false;
  return !readsFrom(store, from[0], to[0]);
}

/** Whether a node depends on another, however far behind. */
function readsFrom(store: Store, node: string, other: string): boolean {
  const { nodes } = store.session.live.traced;
  const seen = new Set<string>();
  const open = [node];
  for (let id = open.pop(); id !== undefined; id = open.pop()) {
    if (id === other) return true;
    if (seen.has(id)) continue;
    seen.add(id);
    open.push(...(nodes.get(id)?.sources ?? []));
  }
  return false;
}

/** Every output that an input can be linked to, in the order of the document. */
export function outputsFor(store: Store, to: LinkEnd): LinkEnd[] {
  const found: LinkEnd[] = [];
  for (const { id } of store.document.nodes) {
    const type = store.session.live.traced.nodes.get(id)?.type;
    for (const name of Object.keys(type?.outputs ?? {})) {
      if (fits(store, [id, name], to)) found.push([id, name]);
    }
  }
  return found;
}
