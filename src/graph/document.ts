/** One step of a graph, as the document holds it. Data that is not known here is kept as it is. */
export interface NodeRecord {
  readonly id: string;
  /** "PACK/NAME". */
  readonly type: string;
  /** What a person calls it; without one its type's title stands. */
  readonly name?: string | undefined;
  /** Where it lies on the board. */
  readonly place?: readonly [x: number, y: number] | undefined;
  /** What is typed into inputs, with units: "3 m". */
  readonly values?: Readonly<Record<string, string>> | undefined;
  readonly settings?: Readonly<Record<string, string | boolean>> | undefined;
  readonly remark?: string | undefined;
  readonly [unknown: string]: unknown;
}

/** One end of a link: a node and one of its outputs or inputs. */
export type LinkEnd = readonly [node: string, port: string];

/** Carries an output to an input. The order of links into one input is their order in the document. */
export interface Link {
  readonly from: LinkEnd;
  readonly to: LinkEnd;
  readonly [unknown: string]: unknown;
}

/** A graph: immutable, changed only by edits. */
export interface GraphDocument {
  readonly format: 'skewback-graph';
  readonly version: number;
  readonly title: string;
  /** What the graph is for. */
  readonly remark?: string | undefined;
  /** Name and version of the packs whose nodes it uses. */
  readonly packs?: Readonly<Record<string, string>> | undefined;
  readonly nodes: readonly NodeRecord[];
  readonly links: readonly Link[];
  /** Nodes on the rail, in order: sliders and readings. */
  readonly rail: readonly string[];
  readonly [unknown: string]: unknown;
}

/** The number of the format that is written. */
export const FORMAT_VERSION = 2;

export function emptyDocument(title: string): GraphDocument {
  return { format: 'skewback-graph', version: FORMAT_VERSION, title, nodes: [], links: [], rail: [] };
}

const indexes = new WeakMap<GraphDocument, ReadonlyMap<string, NodeRecord>>();

/** The nodes of a document by id; made once for each document. */
export function nodesById(document: GraphDocument): ReadonlyMap<string, NodeRecord> {
  let index = indexes.get(document);
  if (index === undefined) {
    index = new Map(document.nodes.map((node) => [node.id, node]));
    indexes.set(document, index);
  }
  return index;
}

export function sameEnd(a: LinkEnd, b: LinkEnd): boolean {
  return a[0] === b[0] && a[1] === b[1];
}
