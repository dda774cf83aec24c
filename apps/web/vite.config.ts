import react from '@vitejs/plugin-react';
import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vite';

/** Beside the server programs, wherever those are built to. */
const dist = process.env.EBBLINE_DIST || 'dist';
const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));

export default defineConfig({
  root: here('.'),
  plugins: [react()],
  resolve: { alias: { '@app/contracts': here('../../libs/contracts/src/index.ts') } },
  build: {
    outDir: resolve(here('../..'), dist, 'apps/web'),
    emptyOutDir: true,
    // Data URLs and the preload helper's inline code would need a looser content security policy.
    assetsInlineLimit: 0,
    modulePreload: { polyfill: false },
    chunkSizeWarningLimit: 900,
  },
  server: {
    host: '127.0.0.1',
    proxy: { '/api': process.env.EBBLINE_API ?? 'http://127.0.0.1:3000' },
  },
});
