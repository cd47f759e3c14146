import { CallError, type Output, oneLine } from './call.ts';
import { check } from './check.ts';
import { evaluate } from './evaluate.ts';
import { nodes } from './nodes.ts';

const HELP = `Skewback: a parametric geometry engine for three-hinged arches.

skewback nodes [--json]
    every node type: inputs and outputs with kinds and defaults, settings, help
skewback check FILE
    reads, migrates, traces and runs a graph; lists its queries
skewback evaluate FILE [--set NAME=QUANTITY]… [--pull READING] [--units SI|US] [--json]
    the graph's readings, with their limits; --set span="32 m" sets a slider of the rail by name;
    --pull adds how strongly each slider moves that reading

FILE may be - for standard input. Exit status: 0; 2 where the input can't be used; 3 where a query
stands in the way of a reading.

Results are for preliminary design. They are to be checked by a licensed engineer against the code in
force where the building stands.
`;

const commands: Readonly<Record<string, (args: readonly string[], out: Output) => number>> = {
  nodes,
  check,
  evaluate,
};

/**
 * Runs the command line.
 *
 * @param args what stands behind `skewback`.
 * @returns the exit status.
 */
export function main(args: readonly string[], out: Output = standardOutput): number {
  const [name = '', ...rest] = args;
  if (name === '' || name === 'help' || name === '--help' || name === '-h') {
    out.print(HELP);
    return name === '' ? 2 : 0;
  }
  const command = Object.hasOwn(commands, name) ? commands[name] : undefined;
  try {
    if (command === undefined) {
      throw new CallError(`there is no call "${name}": use nodes, check or evaluate (skewback help)`);
    }
    return command(rest, out);
  } catch (error) {
    if (!(error instanceof CallError)) throw error;
    out.error(oneLine(error.message));
    return 2;
  }
}

const standardOutput: Output = {
  print: (text) => process.stdout.write(text),
  error: (line) => process.stderr.write(`skewback: ${line}\n`),
};
