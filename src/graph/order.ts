import { type GraphDocument, nodesById } from './document.ts';

/** The nodes of a document in the order of their links, and those that lie on loops of links. */
export interface NodeOrder {
  /** Every node that does not depend on a loop, each behind all that it reads. */
  readonly order: readonly string[];
  /** Nodes that lie on a loop: for each, the ids around it. */
  readonly loops: ReadonlyMap<string, readonly string[]>;
  /** Nodes that are on no loop but read from one. */
  readonly behindLoops: ReadonlySet<string>;
}

/** Sorts the nodes so that each stands behind those it reads from (Kahn's algorithm: no recursion). */
export function orderNodes(document: GraphDocument): NodeOrder {
  const nodes = nodesById(document);
  const readers = new Map<string, string[]>();
  const unread = new Map<string, number>();
  for (const { from, to } of document.links) {
    if (!nodes.has(from[0]) || !nodes.has(to[0])) continue;
    const list = readers.get(from[0]);
    if (list === undefined) readers.set(from[0], [to[0]]);
    else list.push(to[0]);
    unread.set(to[0], (unread.get(to[0]) ?? 0) + 1);
  }
  const order = [...nodes.keys()].filter((id) => !unread.has(id));
  for (let i = 0; i < order.length; i++) {
    for (const reader of readers.get(order[i] as string) ?? []) {
      const left = (unread.get(reader) ?? 0) - 1;
      unread.set(reader, left);
      if (left === 0) order.push(reader);
    }
  }
  const placed = new Set(order);
  const rest = [...nodes.keys()].filter((id) => !placed.has(id));
  const within = (id: string): readonly string[] =>
    (readers.get(id) ?? []).filter((next) => !placed.has(next));
  const loops = new Map<string, readonly string[]>();
  const behindLoops = new Set<string>();
  // The components come with readers before sources; turned round, each stands behind what it reads.
  for (const component of stronglyConnected(rest, within).reverse()) {
    const [first] = component;
    if (first === undefined) continue;
    const members = new Set(component);
    const loop = loopThrough(first, (id) => within(id).filter((next) => members.has(next)));
    for (const id of component) {
      if (loop === undefined) behindLoops.add(id);
      else loops.set(id, loop);
    }
  }
  return { order, loops, behindLoops };
}

/** The shortest way along links from a node back to itself, breadth first. */
function loopThrough(start: string, next: (id: string) => readonly string[]): readonly string[] | undefined {
  const cameFrom = new Map<string, string>();
  const queue = [start];
  for (let i = 0; i < queue.length; i++) {
    const id = queue[i] as string;
    for (const reader of next(id)) {
      if (reader === start) {
        const loop = [id];
        for (let at = id; at !== start; ) {
          at = cameFrom.get(at) as string;
          loop.unshift(at);
        }
        return loop;
      }
      if (!cameFrom.has(reader)) {
        cameFrom.set(reader, id);
        queue.push(reader);
      }
    }
  }
  return undefined;
}

/**
 * The sets of nodes that reach each other: Tarjan's algorithm, with a stack of its own in place of recursion
 * so that a long chain does no harm.
 */
function stronglyConnected(ids: readonly string[], next: (id: string) => readonly string[]): string[][] {
  const number = new Map<string, number>();
  const lowest = new Map<string, number>();
  const open: string[] = [];
  const isOpen = new Set<string>();
  const components: string[][] = [];
  const low = (id: string): number => lowest.get(id) ?? Number.POSITIVE_INFINITY;
  for (const root of ids) {
    if (number.has(root)) continue;
    const visits = [{ id: root, readers: next(root), at: 0 }];
    while (visits.length > 0) {
      const visit = visits.at(-1) as (typeof visits)[number];
      const { id } = visit;
      if (visit.at === 0) {
        number.set(id, number.size);
        lowest.set(id, number.get(id) as number);
        open.push(id);
        isOpen.add(id);
      }
      const reader = visit.readers[visit.at++];
      if (reader !== undefined) {
        if (!number.has(reader)) visits.push({ id: reader, readers: next(reader), at: 0 });
        else if (isOpen.has(reader)) lowest.set(id, Math.min(low(id), number.get(reader) as number));
        continue;
      }
      visits.pop();
      const parent = visits.at(-1);
      if (parent !== undefined) lowest.set(parent.id, Math.min(low(parent.id), low(id)));
      if (low(id) !== number.get(id)) continue;
      const component = open.splice(open.lastIndexOf(id));
      for (const member of component) isOpen.delete(member);
      components.push(component);
    }
  }
  return components;
}
