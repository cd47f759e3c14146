import { builtIn } from '../../nodes/index.ts';
import {
  type Edit,
  type GraphDocument,
  type Link,
  type NodeRecord,
  nodesById,
  removalOf,
  Session,
} from '../../src/graph/index.ts';
import type { System } from '../../src/quantity/index.ts';

export type Look = 'light' | 'dark';

/**
 * What the window shows: one open graph, what is selected in it, and how figures are printed. Every view reads
 * it and is told of every change.
 */
export class Store {
  private open: Session;
  private listeners = new Set<() => void>();
  private stopSession: () => void;
  private chosen: ReadonlySet<string> = new Set();
  private units: System = 'SI';
  private ground: Look = 'light';
  /** Counts the documents that were opened: views start afresh when it changes. */
  opened = 0;

  constructor(document: GraphDocument) {
    this.open = new Session(document, builtIn);
    this.stopSession = this.open.subscribe(() => this.tell());
  }

  get session(): Session {
    return this.open;
  }

  get document(): GraphDocument {
    return this.open.document;
  }

  get selection(): ReadonlySet<string> {
    return this.chosen;
  }

  get system(): System {
    return this.units;
  }

  set system(system: System) {
    this.units = system;
    this.tell();
  }

  get look(): Look {
    return this.ground;
  }

  set look(look: Look) {
    this.ground = look;
    this.tell();
  }

  /** Shows another document in place of the present one; what can be undone starts anew. */
  show(document: GraphDocument): void {
    this.stopSession();
    this.open = new Session(document, builtIn);
    this.stopSession = this.open.subscribe(() => this.tell());
    this.chosen = new Set();
    this.opened += 1;
    this.tell();
  }

  edit(edit: Edit, gesture?: string): void {
    this.open.edit(edit, gesture);
  }

  select(ids: Iterable<string>): void {
    const known = nodesById(this.document);
    this.chosen = new Set([...ids].filter((id) => known.has(id)));
    this.tell();
  }

  /** Puts a new node of a type on the board. Returns its id. */
  addNode(type: string, place: readonly [number, number]): string {
    const id = this.freeId(type.split('/')[1] ?? 'node');
    const node: NodeRecord = { id, type, place: [Math.round(place[0]), Math.round(place[1])] };
    this.edit({ edit: 'add-node', node });
    this.select([id]);
    return id;
  }

  /** Links an output to an input; an input that takes one link gives up the one that it has. */
  addLink(link: Link): void {
    const [id, port] = link.to;
    const spec = this.open.live.traced.nodes.get(id)?.inputs[port];
    const before = this.linksInto(id, port);
    const edits: Edit[] =
      spec?.arity === 'many' ? [] : before.map((old) => ({ edit: 'remove-link', link: old }));
    this.edit({ edit: 'several', edits: [...edits, { edit: 'add-link', link }] });
  }

  removeLink(link: Link): void {
    this.edit({ edit: 'remove-link', link });
  }

  /** The links that end at an input, in their order. */
  linksInto(id: string, port: string): readonly Link[] {
    return this.document.links.filter(({ to }) => to[0] === id && to[1] === port);
  }

  removeSelected(): void {
    if (this.chosen.size === 0) return;
    this.edit(removalOf(this.document, this.chosen));
    this.select([]);
  }

  undo(): void {
    this.open.undo();
    this.select(this.chosen);
  }

  redo(): void {
    this.open.redo();
    this.select(this.chosen);
  }

  /** Puts a node on the rail, or takes it off. */
  toggleRail(id: string): void {
    const { rail } = this.document;
    const next = rail.includes(id) ? rail.filter((other) => other !== id) : [...rail, id];
    this.edit({ edit: 'set-rail', rail: next });
  }

  /** An id that no node has yet: a stem, or the stem with a number. */
  freeId(stem: string): string {
    const known = nodesById(this.document);
    if (!known.has(stem)) return stem;
    for (let i = 2; ; i++) if (!known.has(`${stem}-${i}`)) return `${stem}-${i}`;
  }

  subscribe(listener: () => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  private tell(): void {
    for (const listener of this.listeners) listener();
  }
}
