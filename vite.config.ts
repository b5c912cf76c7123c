import { defineConfig } from 'vite';

export default defineConfig({
  root: 'web',
  oxc: { jsx: { runtime: 'automatic', importSource: 'preact' } },
  build: { outDir: '../dist/web', emptyOutDir: true, sourcemap: true, assetsInlineLimit: 0 },
  server: { proxy: { '/api': 'http://127.0.0.1:4600' } },
});
