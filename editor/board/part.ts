import { type Edit, type Link, type NodeRecord, nodesById } from '../../src/graph/index.ts';
import type { Store } from '../store/store.ts';

/** Nodes and the links among them, as text on the clipboard: the same between windows, and readable anywhere. */
interface Part {
  readonly format: 'skewback-part';
  readonly nodes: readonly NodeRecord[];
  readonly links: readonly Link[];
}

/** The selected nodes with the links among them, and those that reach in from the others. */
export function copySelection(store: Store): string | undefined {
  const { document, selection } = store;
  if (selection.size === 0) return undefined;
  const part: Part = {
    format: 'skewback-part',
    nodes: document.nodes.filter(({ id }) => selection.has(id)),
    links: document.links.filter(({ to }) => selection.has(to[0])),
  };
  return JSON.stringify(part, null, 2);
}

/**
 * Puts the nodes of a text on the board under free ids, a little aside, and selects them. Links that reach in from
 * outside are kept where their nodes are in this graph.
 *
 * @returns false where the text is no part of a graph.
 */
export function paste(store: Store, text: string, aside = 40): boolean {
  const part = readPart(text);
  if (part === undefined) return false;
  const known = nodesById(store.document);
  const ids = new Map<string, string>();
  const taken = new Set(known.keys());
  for (const { id } of part.nodes) {
    let free = id;
    for (let i = 2; taken.has(free); i++) free = `${id.replace(/-\d+$/, '')}-${i}`;
    taken.add(free);
    ids.set(id, free);
  }
  const nodes = part.nodes.map((node): Edit => {
    const [x = 0, y = 0] = node.place ?? [];
    return {
      edit: 'add-node',
      node: { ...node, id: ids.get(node.id) ?? node.id, place: [x + aside, y + aside] },
    };
  });
  const links = part.links.flatMap((link): Edit[] => {
    const source = ids.get(link.from[0]) ?? (known.has(link.from[0]) ? link.from[0] : undefined);
    const target = ids.get(link.to[0]);
    if (source === undefined || target === undefined) return [];
    return [{ edit: 'add-link', link: { ...link, from: [source, link.from[1]], to: [target, link.to[1]] } }];
  });
  store.edit({ edit: 'several', edits: [...nodes, ...links] });
  store.select(ids.values());
  return true;
}

function readPart(text: string): Part | undefined {
  try {
    const part = JSON.parse(text) as Partial<Part> | null;
    if (part?.format !== 'skewback-part' || !Array.isArray(part.nodes) || !Array.isArray(part.links))
      return undefined;
    const end = (value: unknown): boolean =>
      Array.isArray(value) && value.length === 2 && value.every((name) => typeof name === 'string');
    const sound =
      part.nodes.every(({ id, type }) => typeof id === 'string' && typeof type === 'string') &&
      part.links.every(({ from, to }) => end(from) && end(to));
    return sound ? (part as Part) : undefined;
  } catch {
    return undefined;
  }
}
