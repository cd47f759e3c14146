import { defineConfig } from 'vite';

export default defineConfig({
  root: 'editor',
  base: './',
  // The hall's library is one large piece by itself, and loaded only once the hall is shown.
  build: { outDir: '../dist', emptyOutDir: true, target: 'es2023', chunkSizeWarningLimit: 700 },
  preview: { port: 5173 },
});
