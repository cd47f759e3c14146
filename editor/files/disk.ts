import { type GraphDocument, writeGraph } from '../../src/graph/index.ts';

/** A file that was opened or saved, where the browser lets it be written again. */
export type FileHandle = FileSystemFileHandle | undefined;

interface Pickers {
  showOpenFilePicker?: (options: unknown) => Promise<FileSystemFileHandle[]>;
  showSaveFilePicker?: (options: unknown) => Promise<FileSystemFileHandle>;
}

const pickers = globalThis as Pickers;
const TYPES = [{ description: 'Skewback graph', accept: { 'application/json': ['.json'] } }];

/** Lets the user choose a graph file. Undefined where none was chosen. */
export async function chooseFile(): Promise<{ file: File; handle: FileHandle } | undefined> {
  if (pickers.showOpenFilePicker !== undefined) {
    const [handle] = (await unlessAborted(pickers.showOpenFilePicker({ types: TYPES }))) ?? [];
    return handle === undefined ? undefined : { file: await handle.getFile(), handle };
  }
  const field = document.createElement('input');
  field.type = 'file';
  field.accept = '.json,application/json';
  const chosen = new Promise<File | undefined>((resolve) => {
    field.addEventListener('change', () => resolve(field.files?.[0]));
    field.addEventListener('cancel', () => resolve(undefined));
  });
  field.click();
  const file = await chosen;
  return file === undefined ? undefined : { file, handle: undefined };
}

/**
 * Saves a graph: into the file it came from where that can be, else where the user says, else as a download.
 *
 * @returns the file that it went to, or undefined where the user changed their mind.
 */
export async function saveFile(
  graph: GraphDocument,
  handle: FileHandle,
): Promise<{ readonly name: string; readonly handle: FileHandle } | undefined> {
  const text = writeGraph(graph);
  const name = `${
    graph.title
      .replace(/[^\p{L}\p{N}]+/gu, '-')
      .replace(/^-|-$/g, '')
      .toLowerCase() || 'graph'
  }.skewback.json`;
  if (pickers.showSaveFilePicker === undefined) {
    const link = document.createElement('a');
    link.href = URL.createObjectURL(new Blob([text], { type: 'application/json' }));
    link.download = name;
    link.click();
    setTimeout(() => URL.revokeObjectURL(link.href), 10_000);
    return { name, handle: undefined };
  }
  const target =
    handle ?? (await unlessAborted(pickers.showSaveFilePicker({ suggestedName: name, types: TYPES })));
  if (target === undefined) return undefined;
  const stream = await target.createWritable();
  await stream.write(text);
  await stream.close();
  return { name: target.name, handle: target };
}

async function unlessAborted<T>(picked: Promise<T>): Promise<T | undefined> {
  try {
    return await picked;
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') return undefined;
    throw error;
  }
}
