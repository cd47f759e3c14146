import { type Output, openGraph, queryLine, readArguments, readSystem } from './call.ts';

/** `skewback check FILE`: lists a graph's queries. Exit status 3 where there are any. */
export function check(args: readonly string[], out: Output): number {
  const { values, positionals } = readArguments(args, { units: { type: 'string', default: 'SI' } });
  const system = readSystem(values.units);
  const session = openGraph(positionals);
  const { nodes, links } = session.document;
  const { queries } = session;
  for (const query of queries) out.print(`${queryLine(session, query, system)}\n`);
  const found = queries.length === 0 ? 'no query' : counted(queries.length, 'query', 'queries');
  const size = [
    counted(nodes.length, 'node'),
    counted(links.length, 'link'),
    counted(session.live.operations, 'operation'),
  ];
  out.print(`${size.join(', ')}: ${found}\n`);
  return queries.length === 0 ? 0 : 3;
}

function counted(count: number, one: string, more = `${one}s`): string {
  return `${count} ${count === 1 ? one : more}`;
}
