import * as v from 'valibot';
import { FORMAT_VERSION, type GraphDocument } from './document.ts';
import { LIMITS } from './limits.ts';
import { migrations, type RawDocument } from './migrations.ts';
import { documentSchema } from './schema.ts';

/** Thrown where a file is no graph that can be read; the message says where and why. */
export class FileError extends Error {
  override name = 'FileError';

  /** @param message may quote the file: it is brought to one line of readable length. */
  constructor(message: string) {
    const line = message.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ');
    super(line.length <= LONGEST ? line : `${line.slice(0, LONGEST - 1)}…`);
  }
}

const LONGEST = 400;

/**
 * Reads a graph file: checks its size, migrates it from earlier versions, checks its shape. What is in the
 * file and not known here is kept.
 *
 * @throws FileError with one line that says what is wrong. Nothing of the graph's own troubles (a missing
 *   link, a figure without a unit) is an error here: those are queries.
 */
export function readGraph(text: string): GraphDocument {
  if (text.length > LIMITS.signs) {
    throw new FileError(
      `the file has ${grouped(text.length)} signs, more than the ${grouped(LIMITS.signs)} that are read`,
    );
  }
  let parsed: unknown;
  try {
    parsed = JSON.parse(text.replace(/^\uFEFF/, ''));
  } catch (error) {
    throw new FileError(`the file is not JSON: ${(error as Error).message}`);
  }
  checkTree(parsed);
  if (typeof parsed !== 'object' || parsed === null || Array.isArray(parsed)) {
    throw new FileError('the file is no graph: it must be a JSON object with the member "format"');
  }
  return checked(migrated(parsed as RawDocument));
}

function migrated(raw: RawDocument): RawDocument {
  if (raw.format !== 'skewback-graph') {
    throw new FileError('the file is no graph: its member "format" must be "skewback-graph"');
  }
  const { version } = raw;
  if (typeof version !== 'number' || !Number.isInteger(version) || version < 1) {
    throw new FileError(`the format's version must be a whole number from 1 to ${FORMAT_VERSION}`);
  }
  if (version > FORMAT_VERSION) {
    throw new FileError(
      `the file has version ${version} of the format, and versions up to ${FORMAT_VERSION} are read here: open it with a newer release`,
    );
  }
  const newer = migrations.slice(version - 1).reduce((document, migrate) => migrate(document), raw);
  return { ...newer, version: FORMAT_VERSION };
}

function checked(raw: RawDocument): GraphDocument {
  for (const [member, most] of [
    ['nodes', LIMITS.nodes],
    ['links', LIMITS.links],
  ] as const) {
    const list = raw[member];
    if (Array.isArray(list) && list.length > most) {
      throw new FileError(
        `the graph has ${grouped(list.length)} ${member}, more than the ${grouped(most)} that are read`,
      );
    }
  }
  const result = v.safeParse(documentSchema, raw, { abortEarly: true });
  if (!result.success) {
    const issue = result.issues[0];
    throw new FileError(`${v.getDotPath(issue) ?? 'the file'}: ${issue.message}`);
  }
  // The file's own content, not the checker's copy: members keep their order.
  const document = raw as unknown as GraphDocument;
  const seen = new Set<string>();
  for (const { id } of document.nodes) {
    if (seen.has(id)) throw new FileError(`two nodes have the id "${id}": give one of them another`);
    seen.add(id);
  }
  return document;
}

/** Walks the whole content without recursion: how deep it is, and whether a key could change an object's type. */
function checkTree(root: unknown): void {
  let level: unknown[] = [root];
  for (let depth = 0; level.length > 0; depth++) {
    if (depth > LIMITS.depth) {
      throw new FileError(`the file nests brackets more than ${LIMITS.depth} deep`);
    }
    const next: unknown[] = [];
    for (const value of level) {
      if (typeof value === 'number' && !Number.isFinite(value)) {
        throw new FileError('the file holds a figure that is too large to be one');
      }
      if (typeof value !== 'object' || value === null) continue;
      if (Object.hasOwn(value, '__proto__'))
        throw new FileError('the file has a member "__proto__", which is not read');
      for (const part of Object.values(value)) next.push(part);
    }
    level = next;
  }
}

const LINE = 100;

/** Writes a graph file: what fits on a line stands on one, so that a change shows as a change of few lines. */
export function writeGraph(document: GraphDocument): string {
  return `${write(document, '')}\n`;
}

function write(value: unknown, indent: string): string {
  const flat = writeFlat(value);
  if (typeof value !== 'object' || value === null || (indent !== '' && flat.length + indent.length <= LINE)) {
    return flat;
  }
  const inner = `${indent}  `;
  const parts = Array.isArray(value)
    ? value.map((part) => inner + write(part ?? null, inner))
    : Object.entries(value)
        .filter(([, part]) => part !== undefined)
        .map(([key, part]) => `${inner}${JSON.stringify(key)}: ${write(part, inner)}`);
  const [open, close] = Array.isArray(value) ? '[]' : '{}';
  return parts.length === 0 ? `${open}${close}` : `${open}\n${parts.join(',\n')}\n${indent}${close}`;
}

function writeFlat(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map((part) => writeFlat(part ?? null)).join(', ')}]`;
  if (typeof value === 'object' && value !== null) {
    const parts = Object.entries(value)
      .filter(([, part]) => part !== undefined)
      .map(([key, part]) => `${JSON.stringify(key)}: ${writeFlat(part)}`);
    return parts.length === 0 ? '{}' : `{ ${parts.join(', ')} }`;
  }
  return JSON.stringify(value);
}

function grouped(n: number): string {
  return String(n).replace(/\B(?=(\d{3})+$)/g, ' ');
}
