import { readFileSync } from 'node:fs';
import { type ParseArgsConfig, parseArgs } from 'node:util';
import { builtIn } from '../../nodes/index.ts';
import { FileError, nodeName, nodesById, readGraph, Session } from '../graph/index.ts';
import type { System } from '../quantity/index.ts';
import { type Query, queryText } from '../tape/index.ts';

/** Where a call prints to. */
export interface Output {
  print(text: string): void;
  error(line: string): void;
}

/** Thrown where a call can't be used; the message is the one line that is printed. Exit status 2. */
export class CallError extends Error {
  override name = 'CallError';
}

/** The options and other arguments of a call. @throws CallError on what is not known. */
export function readArguments<const O extends NonNullable<ParseArgsConfig['options']>>(
  args: readonly string[],
  options: O,
) {
  try {
    return parseArgs({ args: [...args], options, allowPositionals: true, strict: true });
  } catch (error) {
    throw new CallError((error as Error).message.split('\n')[0] ?? '');
  }
}

/** Opens the graph in a file, or in standard input for "-". @throws CallError where that can't be done. */
export function openGraph(files: readonly string[]): Session {
  const [file, ...others] = files;
  if (file === undefined) throw new CallError('name a graph file');
  if (others.length > 0) throw new CallError(`one file at a time: "${others[0]}" is one too many`);
  let text: string;
  try {
    text = readFileSync(file === '-' ? 0 : file, 'utf8');
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    const why = code === 'ENOENT' ? 'there is no such file' : (code ?? (error as Error).message);
    throw new CallError(`${file}: ${why}`);
  }
  try {
    return new Session(readGraph(text), builtIn);
  } catch (error) {
    if (error instanceof FileError) throw new CallError(`${file}: ${error.message}`);
    throw error;
  }
}

/** The system of units that was asked for. */
export function readSystem(text: string): System {
  if (text === 'SI' || text === 'US') return text;
  throw new CallError(`--units is SI or US, not "${text}"`);
}

/** Words of a file on one line, without the signs that would move a terminal's cursor or colour it. */
export function oneLine(text: string): string {
  return text.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ');
}

/** A query as it is printed: the node's name, then the text. */
export function queryLine(session: Session, query: Query, system: System): string {
  const record = query.owner === undefined ? undefined : nodesById(session.document).get(query.owner);
  const where = record === undefined ? 'graph' : `${nodeName(record, session.library)} (${record.id})`;
  return oneLine(`${where}: ${queryText(query, system)}`);
}
