import react from '@vitejs/plugin-react';
import { defineConfig, type Plugin } from 'vite';

/** In development the page is served here and its API by the server of `apps/api`; a build is served by that server. */
const API_ORIGIN = process.env['SKYBERTH_API_ORIGIN'] ?? 'http://127.0.0.1:4600';

/** satellite.js brings a WASM propagator with threads that nothing here uses and that a page's bundle cannot hold. */
const withoutWasm: Plugin = {
  name: 'without-wasm',
  enforce: 'pre',
  resolveId: (id, importer) => (importer?.includes('satellite.js') && id.includes('wasm') ? '\0without-wasm' : null),
  load: (id) => (id === '\0without-wasm' ? 'export {};' : null),
};

export default defineConfig({
  plugins: [react(), withoutWasm],
  // Workspace packages are read from their sources, so that a change shows without building them first.
  resolve: { conditions: ['source', 'module', 'browser', 'development|production'] },
  server: {
    host: '127.0.0.1',
    proxy: { '/api': { target: API_ORIGIN, changeOrigin: false, ws: true } },
  },
  build: {
    outDir: 'dist',
    sourcemap: true,
    target: 'es2023',
  },
});
