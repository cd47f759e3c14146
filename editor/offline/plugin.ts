import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Plugin } from 'vite';

/** Writes the service worker of a build, with the names of all its files, so that the editor works offline. */
export function offline(): Plugin {
  const folder = import.meta.dirname;
  return {
    name: 'skewback-offline',
    apply: 'build',
    generateBundle: {
      order: 'post',
      handler(_, bundle) {
        const open = readdirSync(join(folder, '../public'));
        const files = ['index.html', ...Object.keys(bundle).filter((name) => name !== 'index.html'), ...open];
        const hash = createHash('sha256');
        for (const item of Object.values(bundle))
          hash.update(item.type === 'chunk' ? item.code : item.source);
        const source = readFileSync(join(folder, 'service-worker.js'), 'utf8')
          .replace('__FILES__', JSON.stringify(files.map((name) => `./${name}`)))
          .replace('__BUILD__', JSON.stringify(hash.digest('hex').slice(0, 12)));
        this.emitFile({ type: 'asset', fileName: 'service-worker.js', source });
      },
    },
  };
}
