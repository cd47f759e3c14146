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

const PACKAGE = 'package ';

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

const allImports: Import[] = files.flatMap((file) => {
  const text = readFileSync(join(ROOT, file), 'utf8');
  const found = text.matchAll(
    /(?:^|\n)(?:import|export)\s+(?:(type\s)?[^'"`;]*?from\s+)?'([^']+)'|import\('([^']+)'\)/g,
  );
  return [...found].map(([, type, named, dynamic]) => ({
    from: file,
    to: targetOf(file, (named ?? dynamic) as string),
    typeOnly: type !== undefined,
  }));
});

const imports = allImports.filter(({ to }) => !to.startsWith(PACKAGE));

/** The file that is imported, from the root; or the package, marked as one. */
function targetOf(file: string, specifier: string): string {
  if (!specifier.startsWith('.')) return PACKAGE + specifier;
  return relative(ROOT, normalize(join(ROOT, dirname(file), specifier)));
}

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

  it('below the command line and the editor takes nothing from Node, so that it runs in a browser', () => {
    const fromNode = allImports.filter(({ to }) => /^package (node:|fs|path|process)/.test(to));
    expect(fromNode.map(({ from }) => from)).toContain('src/cli/call.ts');
    expect(fromNode.filter(({ from }) => (floorOf(from)?.[1] ?? 7) < 7)).toEqual([]);
  });

  it('does not wait for itself: no values are imported in a circle', () => {
    expect(circleIn(imports.filter(({ typeOnly }) => !typeOnly))).toBeUndefined();
  });
});

describe('the search for circles', () => {
  const edge = (from: string, to: string): Import => ({ from, to, typeOnly: false });

  it('finds one, and says how it runs', () => {
    expect(circleIn([edge('a', 'b'), edge('b', 'c'), edge('c', 'b')])).toBe('b → c → b');
    expect(circleIn([edge('a', 'a')])).toBe('a → a');
    expect(circleIn([edge('a', 'b'), edge('a', 'c'), edge('b', 'c')])).toBeUndefined();
  });
});

/** The first circle of imports, depth first. */
function circleIn(edges: readonly Import[]): string | undefined {
  const done = new Set<string>();
  const visit = (file: string, way: readonly string[]): string | undefined => {
    if (way.includes(file)) return [...way.slice(way.indexOf(file)), file].join(' → ');
    if (done.has(file)) return undefined;
    for (const { from, to } of edges) {
      const circle = from === file ? visit(to, [...way, file]) : undefined;
      if (circle !== undefined) return circle;
    }
    done.add(file);
    return undefined;
  };
  for (const { from } of edges) {
    const circle = visit(from, []);
    if (circle !== undefined) return circle;
  }
  return undefined;
}
