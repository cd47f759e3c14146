import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { builtIn } from '../../nodes/index.ts';
import {
  emptyDocument,
  type GraphDocument,
  type Link,
  type NodeRecord,
  readGraph,
  Session,
} from '../../src/graph/index.ts';
import { queryText } from '../../src/tape/index.ts';

const FOLDER = join(import.meta.dirname, '../../graphs');

/** The names of the ready graphs, without what their file names share. */
export const READY: readonly string[] = readdirSync(FOLDER)
  .filter((name) => name.endsWith('.skewback.json'))
  .map((name) => name.replace('.skewback.json', ''));

export function readyText(name: string): string {
  return readFileSync(join(FOLDER, `${name}.skewback.json`), 'utf8');
}

export function openReady(name: string): Session {
  return new Session(readGraph(readyText(name)), builtIn);
}

/** A document of nodes and links, each link as "node.output > node.input". */
export function graphOf(
  nodes: readonly NodeRecord[],
  links: readonly string[] = [],
  rail: readonly string[] = [],
): GraphDocument {
  return { ...emptyDocument('A test'), nodes, links: links.map(linkOf), rail };
}

export function linkOf(text: string): Link {
  const [from = '', to = ''] = text.split(' > ');
  const end = (port: string): [string, string] => {
    const [node = '', name = ''] = port.split('.');
    return [node, name];
  };
  return { from: end(from), to: end(to) };
}

export function open(...graph: Parameters<typeof graphOf>): Session {
  return new Session(graphOf(...graph), builtIn);
}

/** The queries of a session as "owner: text". */
export function texts(session: Session): string[] {
  return session.queries.map((query) => `${query.owner ?? 'graph'}: ${queryText(query)}`);
}

/** Every figure that a session gives anywhere. */
export function everyFigure(session: Session): number[] {
  const figures: number[] = [];
  const collect = (value: unknown): void => {
    if (typeof value === 'number') figures.push(value);
    else if (typeof value === 'object' && value !== null) Object.values(value).forEach(collect);
  };
  for (const [id, { type }] of session.live.traced.nodes) {
    for (const output of Object.keys(type?.outputs ?? {})) collect(session.value(id, output));
  }
  return figures;
}
