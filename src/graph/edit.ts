import { type GraphDocument, type Link, type NodeRecord, nodesById, sameEnd } from './document.ts';

/** One change of a document. Every edit can be turned round: see `apply`. */
export type Edit =
  | { readonly edit: 'add-node'; readonly node: NodeRecord; readonly at?: number }
  /** `hanging`: leaves links and rail that name it, as a file may that lacks a node. */
  | { readonly edit: 'remove-node'; readonly id: string; readonly hanging?: true }
  /** Puts another record in the place of the node with its id: a new name, place, remark … */
  | { readonly edit: 'change-node'; readonly node: NodeRecord }
  | {
      readonly edit: 'set-value';
      readonly id: string;
      readonly input: string;
      readonly text: string | undefined;
    }
  | {
      readonly edit: 'set-setting';
      readonly id: string;
      readonly setting: string;
      readonly value: string | boolean | undefined;
    }
  /** `again`: puts back one of several equal links, which a file may hold. */
  | { readonly edit: 'add-link'; readonly link: Link; readonly at?: number; readonly again?: true }
  /** `at`: which one is meant where several are equal. */
  | { readonly edit: 'remove-link'; readonly link: Link; readonly at?: number }
  | { readonly edit: 'set-rail'; readonly rail: readonly string[] }
  /** A member of the document other than its nodes, links and rail. */
  | { readonly edit: 'set-member'; readonly member: string; readonly value: unknown; readonly at?: number }
  | { readonly edit: 'several'; readonly edits: readonly Edit[] };

/** Thrown where an edit does not fit the document. */
export class EditError extends Error {
  override name = 'EditError';
}

/** A changed document, and the edit that takes it back. */
export interface Applied {
  readonly document: GraphDocument;
  readonly inverse: Edit;
}

/**
 * Applies an edit.
 *
 * @throws EditError where it names what is not there, or adds what is; the document is then as it was.
 */
export function apply(document: GraphDocument, edit: Edit): Applied {
  switch (edit.edit) {
    case 'add-node':
      return addNode(document, edit.node, edit.at ?? document.nodes.length);
    case 'remove-node':
      return removeNode(document, edit.id, edit.hanging === true);
    case 'change-node':
      return changeNode(document, edit.node);
    case 'set-value': {
      const node = find(document, edit.id);
      const before = own(node.values, edit.input);
      return {
        document: replaced(document, withMember(node, 'values', edit.input, edit.text)),
        inverse: stays(edit.text, before) ? { ...edit, text: before } : { edit: 'change-node', node },
      };
    }
    case 'set-setting': {
      const node = find(document, edit.id);
      const before = own(node.settings, edit.setting);
      return {
        document: replaced(document, withMember(node, 'settings', edit.setting, edit.value)),
        inverse: stays(edit.value, before) ? { ...edit, value: before } : { edit: 'change-node', node },
      };
    }
    case 'add-link': {
      const at = edit.at ?? document.links.length;
      if (edit.again !== true && findLink(document, edit.link) !== -1) {
        throw new EditError('the link is there already');
      }
      return {
        document: { ...document, links: document.links.toSpliced(at, 0, edit.link) },
        inverse: { edit: 'remove-link', link: edit.link, at },
      };
    }
    case 'remove-link': {
      const at = findLink(document, edit.link, edit.at);
      const link = document.links[at];
      if (link === undefined) throw new EditError('there is no such link');
      return {
        document: { ...document, links: document.links.toSpliced(at, 1) },
        inverse: { edit: 'add-link', link, at, again: true },
      };
    }
    case 'set-rail':
      return { document: { ...document, rail: edit.rail }, inverse: { ...edit, rail: document.rail } };
    case 'set-member': {
      if (['format', 'version', 'nodes', 'links', 'rail'].includes(edit.member)) {
        throw new EditError(`the member "${edit.member}" is not set as a whole`);
      }
      return setMember(document, edit.member, edit.value, edit.at);
    }
    case 'several': {
      const inverses: Edit[] = [];
      let changed = document;
      for (const one of edit.edits) {
        const applied = apply(changed, one);
        changed = applied.document;
        inverses.unshift(applied.inverse);
      }
      return { document: changed, inverse: { edit: 'several', edits: inverses } };
    }
  }
}

/** The edits that take nodes out with their links and their places on the rail. */
export function removalOf(document: GraphDocument, ids: ReadonlySet<string>): Edit {
  const edits: Edit[] = document.links
    .filter(({ from, to }) => ids.has(from[0]) || ids.has(to[0]))
    .map((link) => ({ edit: 'remove-link', link }));
  if (document.rail.some((id) => ids.has(id))) {
    edits.push({ edit: 'set-rail', rail: document.rail.filter((id) => !ids.has(id)) });
  }
  for (const id of ids) edits.push({ edit: 'remove-node', id });
  return { edit: 'several', edits };
}

/** Whether an edit changes only figures: the graph need not be traced again if it does. */
export function changesOnlyValues(edit: Edit): boolean {
  if (edit.edit === 'several') return edit.edits.every(changesOnlyValues);
  return edit.edit === 'set-value';
}

/**
 * Whether a member keeps its place, so that its old value takes the edit back. One that comes or goes may take its
 * group of members with it, and put back by itself it would stand behind the others: the whole record comes back.
 */
function stays(value: unknown, before: unknown): boolean {
  return value !== undefined && before !== undefined;
}

function addNode(document: GraphDocument, node: NodeRecord, at: number): Applied {
  if (nodesById(document).has(node.id)) throw new EditError(`there is a node "${node.id}" already`);
  return {
    document: { ...document, nodes: document.nodes.toSpliced(at, 0, node) },
    inverse: { edit: 'remove-node', id: node.id, hanging: true },
  };
}

function removeNode(document: GraphDocument, id: string, hanging: boolean): Applied {
  const node = find(document, id);
  const linked = document.links.some(({ from, to }) => from[0] === id || to[0] === id);
  if (!hanging && (linked || document.rail.includes(id))) {
    throw new EditError(`the node "${id}" has links or stands on the rail: take those off first`);
  }
  const at = document.nodes.indexOf(node);
  return {
    document: { ...document, nodes: document.nodes.toSpliced(at, 1) },
    inverse: { edit: 'add-node', node, at },
  };
}

function changeNode(document: GraphDocument, node: NodeRecord): Applied {
  const before = find(document, node.id);
  return { document: replaced(document, node), inverse: { edit: 'change-node', node: before } };
}

function setMember(document: GraphDocument, member: string, value: unknown, at?: number): Applied {
  const members = Object.entries(document);
  const known = members.findIndex(([name]) => name === member);
  const before = members[known]?.[1];
  if (known !== -1) members.splice(known, 1);
  const place = known === -1 ? (at ?? members.length) : known;
  if (value !== undefined) members.splice(place, 0, [member, value]);
  return {
    document: Object.fromEntries(members) as unknown as GraphDocument,
    inverse: { edit: 'set-member', member, value: before, at: place },
  };
}

function find(document: GraphDocument, id: string): NodeRecord {
  const node = nodesById(document).get(id);
  if (node === undefined) throw new EditError(`there is no node "${id}"`);
  return node;
}

function findLink({ links }: GraphDocument, link: Link, at = -1): number {
  const same = (other: Link | undefined): boolean =>
    other !== undefined && sameEnd(other.from, link.from) && sameEnd(other.to, link.to);
  return same(links[at]) ? at : links.findIndex(same);
}

function replaced(document: GraphDocument, node: NodeRecord): GraphDocument {
  return { ...document, nodes: document.nodes.map((other) => (other.id === node.id ? node : other)) };
}

function withMember(
  node: NodeRecord,
  group: 'values' | 'settings',
  key: string,
  value: string | boolean | undefined,
): NodeRecord {
  const members = Object.entries(node[group] ?? {}).filter(([other]) => other !== key);
  const before = Object.keys(node[group] ?? {}).indexOf(key);
  if (value !== undefined) members.splice(before === -1 ? members.length : before, 0, [key, value]);
  const { [group]: _, ...rest } = node;
  if (members.length === 0) return rest as NodeRecord;
  return { ...node, [group]: Object.fromEntries(members) } as NodeRecord;
}

function own<T>(record: Readonly<Record<string, T>> | undefined, key: string): T | undefined;
function own(record: object | undefined, key: string): unknown;
function own(record: object | undefined, key: string): unknown {
  if (record === undefined || !Object.hasOwn(record, key)) return undefined;
  return (record as Record<string, unknown>)[key];
}
