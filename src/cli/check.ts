import { type Output, openGraph, queryLine, readArguments, readSystem } from './call.ts';

/** `skewback check FILE`: lists a graph's queries. Exit status 3 where there are any. */
export function check(args: readonly string[], out: Output): number {
  const { values, positionals } = readArguments(args, { units: { type: 'string', default: 'SI' } });
  const system = readSystem(values.units);
  const session = openGraph(positionals);
  const { nodes, links } = session.document;
  const { queries } = session;
  for (const query of queries) out.print(`${queryLine(session, query, system)}\n`);
  const found =
    queries.length === 0 ? 'no query' : `${queries.length} ${queries.length === 1 ? 'query' : 'queries'}`;
  out.print(
    `${nodes.length} nodes, ${links.length} links, ${session.live.operations} operations: ${found}\n`,
  );
  return queries.length === 0 ? 0 : 3;
}
