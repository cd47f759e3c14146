import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, normalize, relative } from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = join(import.meta.dirname, '..');

/** Folder → floor. A module imports from its own folder and from floors below, never up or across. */
const FLOORS: readonly (readonly [folder: string, floor: number])[] = [
  ['src/quantity', 0],
  ['src/tape', 1],
  ['src/geometry', 2],
  ['src/mechanics', 3],
  ['src/graph', 4],
  ['nodes', 5],
  ['src/study', 6],
  ['src/exchange', 6],
  ['src/cli', 7],
  ['editor', 7],
];

interface Import {
  readonly from: string;
  readonly to: string;
  readonly typeOnly: boolean;
}

function filesBelow(folder: string): string[] {
  return readdirSync(join(ROOT, folder), { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.(ts|js)$/.test(name))
    .map((name) => join(folder, name));
}

const files = FLOORS.map(([folder]) => folder)
  .filter((folder) => readdirSync(ROOT).includes(folder.split('/')[0] ?? ''))
  .flatMap((folder) => {
    try {
      return filesBelow(folder);
    } catch {
      return [];
    }
  });

const imports: Import[] = files.flatMap((file) => {
  const text = readFileSync(join(ROOT, file), 'utf8');
  const found = text.matchAll(
    /(?:^|\n)(?:import|export)\s+(type\s)?[^'"`;]*?from\s+'(\.[^']+)'|import\('(\.[^']+)'\)/g,
  );
  return [...found].map(([, type, named, dynamic]) => ({
    from: file,
    to: relative(ROOT, normalize(join(ROOT, dirname(file), (named ?? dynamic) as string))),
    typeOnly: type !== undefined,
  }));
});

function floorOf(file: string): readonly [string, number] | undefined {
  return FLOORS.find(([folder]) => file.startsWith(`${folder}/`));
}

describe('a module', () => {
  it('is seen by this test', () => {
    expect(files.length).toBeGreaterThan(80);
    expect(imports.length).toBeGreaterThan(200);
  });

  it('imports only from its own folder and from floors below', () => {
    const wrong = imports.filter(({ from, to }) => {
      const [mine, theirs] = [floorOf(from), floorOf(to)];
      if (mine === undefined || theirs === undefined) return !to.startsWith('graphs/');
      return mine[0] !== theirs[0] && theirs[1] >= mine[1];
    });
    expect(wrong).toEqual([]);
  });

  it('imports from another floor through its index alone', () => {
    const wrong = imports.filter(({ from, to }) => {
      const [mine, theirs] = [floorOf(from), floorOf(to)];
      return mine !== undefined && theirs !== undefined && mine[0] !== theirs[0] && !to.endsWith('/index.ts');
    });
    expect(wrong).toEqual([]);
  });

  it('takes of another pack its kinds alone', () => {
    const packOf = (file: string): string | undefined => /^nodes\/([^/]+)\//.exec(file)?.[1];
    const wrong = imports.filter(({ from, to }) => {
      const [mine, theirs] = [packOf(from), packOf(to)];
      return mine !== undefined && theirs !== undefined && mine !== theirs && !to.endsWith('/kinds.ts');
    });
    expect(wrong).toEqual([]);
  });
});
