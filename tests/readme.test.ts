import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { builtIn } from '../nodes/index.ts';
import { main } from '../src/cli/main.ts';

const ROOT = join(import.meta.dirname, '..');
const README = readFileSync(join(ROOT, 'README.md'), 'utf8');
const GUIDE = readFileSync(join(ROOT, 'DEVELOPERS.md'), 'utf8');
const blocks = [...README.matchAll(/```(\w+)\n([\s\S]*?)```/g)].map(([, language, text]) => ({
  language,
  text: text ?? '',
}));

function run(command: string, folder: string): string {
  const words = [...command.replace('npx skewback ', '').matchAll(/"([^"]*)"|(\S+?)="([^"]*)"|(\S+)/g)];
  const args = words.map(
    ([, quoted, name, value, plain]) => quoted ?? (name === undefined ? (plain ?? '') : `${name}=${value}`),
  );
  const files = args.map((arg) =>
    arg.endsWith('.json') ? join(arg.startsWith('graphs/') ? ROOT : folder, arg) : arg,
  );
  let printed = '';
  main(files, { print: (text) => (printed += text), error: (line) => (printed += `${line}\n`) });
  return printed;
}

describe('the README', () => {
  const folder = mkdtempSync(join(tmpdir(), 'skewback-'));
  writeFileSync(
    join(folder, 'first.skewback.json'),
    blocks.find(({ language }) => language === 'json')?.text ?? '',
  );
  // What a block of output shows was printed by the last command of the block of commands before it.
  const shown = blocks.flatMap((block, i) => {
    const before = blocks[i - 1];
    const command = before?.text.trim().split('\n').at(-1) ?? '';
    return block.language === 'text' && before?.language === 'sh' ? [{ command, output: block.text }] : [];
  });

  it('shows output of commands', () => {
    expect(shown.length).toBe(2);
  });

  it.each(shown)('shows what $command prints', ({ command, output }) => {
    expect(run(command, folder).replaceAll('\u00a0', ' ')).toBe(output);
  });

  it('quotes the query that its first graph gives without a rise', () => {
    const printed = run('npx skewback evaluate first.skewback.json --set rise="0 m"', folder);
    const quoted = blocks.at(-1)?.text.trim().replaceAll('\n', ' ');
    expect(quoted).toBeTruthy();
    expect(printed.replaceAll('\u00a0', ' ')).toContain(quoted);
  });

  it('carries the caution', () => {
    expect(README.replaceAll(/\n> ?/g, ' ')).toContain(
      'to be checked by a licensed engineer against the code in force where the building stands',
    );
  });

  it('names every ready graph, and every call of the command line', () => {
    for (const name of [
      'riding-barn',
      'market-hall',
      'ferry-hall',
      'ferry-hall-by-hand',
      'swimming-hall',
      'stand-roof',
    ]) {
      expect(README).toContain(`\`${name}\``);
    }
    for (const call of ['nodes', 'check', 'evaluate']) expect(README).toContain(`npx skewback ${call}`);
  });
});

describe('the developers’ guide', () => {
  it('shows a node that can be made', async () => {
    const code = /```ts\n([\s\S]*?)```/.exec(GUIDE)?.[1] ?? '';
    const { writeFile, rm } = await import('node:fs/promises');
    const file = join(ROOT, 'nodes/setting-out/guide-example.ts');
    await writeFile(file, code);
    try {
      const { midpoint } = await import('../nodes/setting-out/guide-example.ts' as string);
      expect(midpoint.name).toBe('midpoint');
      expect(builtIn.find('setting-out/midpoint')).toBeUndefined();
      const { traceExample } = await import('./support/laws.ts');
      const { point } = traceExample({ ...midpoint, settings: {} }).outputs as { point: { x: unknown } };
      expect(point.x).toBeDefined();
    } finally {
      await rm(file);
    }
  });
});
