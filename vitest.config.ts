import { defineConfig } from 'vitest/config';

/**
 * Test rings. `unit` needs nothing but the sources, `reference` compares with published values,
 * `api` starts the real server with its stand-ins, `faults` and `security` attack it,
 * `browser` drives the built page in Chromium. Workspace packages are loaded from their sources.
 */
const resolve = { conditions: ['source', 'node', 'import', 'default'] };
// These conditions also reach plain Node for what is not bundled. 'import' among them would give ES modules to
// a require() in a CommonJS dependency (express's router then fails), so only our own condition is named here.
const ssr = { resolve: { conditions: ['source', 'node', 'default'], externalConditions: ['source', 'node'] } };

export default defineConfig({
  resolve,
  test: {
    projects: [
      {
        resolve,
        ssr,
        test: {
          name: 'unit',
          testTimeout: 30_000,
          include: ['{shared,drizzle,packages,apps,infra}/**/*.spec.{ts,tsx}'],
          exclude: ['**/node_modules/**', '**/dist/**'],
        },
      },
      { resolve, ssr, test: { name: 'reference', include: ['tests/reference/**/*.spec.ts'], testTimeout: 120_000 } },
      {
        resolve,
        ssr,
        test: {
          name: 'api',
          include: ['tests/{api,faults,security}/**/*.spec.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
          maxWorkers: 2,
        },
      },
      {
        resolve,
        ssr,
        test: {
          name: 'browser',
          include: ['tests/e2e/**/*.spec.ts'],
          testTimeout: 300_000,
          hookTimeout: 180_000,
          maxWorkers: 1,
        },
      },
    ],
  },
});
