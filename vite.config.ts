import { defineConfig } from 'vite';
import { offline } from './editor/offline/plugin.ts';

export default defineConfig({
  root: 'editor',
  base: './',
  plugins: [offline()],
  // The hall's library is one large piece by itself, and loaded only once the hall is shown.
  build: { outDir: '../dist', emptyOutDir: true, target: 'es2023', chunkSizeWarningLimit: 700 },
  preview: { port: 5173 },
});
