import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig, type TestProjectInlineConfiguration } from 'vitest/config';

const port = Number(process.env['PORT'] ?? 5180);
const api = process.env['OVENBIRD_API'] ?? 'http://127.0.0.1:5181';

// Tests that need no database and no document; they start at once and run in parallel.
const pureTests = ['tests/{planner,chemistry,sheets,borders,contracts,csv,storage}/**/*.test.ts', 'src/**/*.test.ts'];
const browserTests = ['tests/browser/**/*.test.{ts,tsx}'];
// Against hanging, not against slowness: a busy machine fails no test.
const patience = { testTimeout: 60_000, hookTimeout: 120_000 };
const withPostgres: TestProjectInlineConfiguration['test'] = {
  environment: 'node',
  pool: 'forks',
  globalSetup: ['tests/helpers/global-setup.ts'],
};

export default defineConfig({
  plugins: [react(), tailwindcss()],
  server: { host: '127.0.0.1', port, strictPort: true, proxy: { '/api': { target: api } } },
  build: {
    outDir: 'dist/web',
    emptyOutDir: true,
    // An inlined font is a data: address, which the content security policy refuses.
    assetsInlineLimit: 0,
    rolldownOptions: {
      output: {
        codeSplitting: {
          groups: [
            // First, or the calendar's chunk swallows React and every page has to load the calendar.
            {
              name: 'react',
              test: /node_modules[\\/](react|react-dom|scheduler|react-router|react-router-dom)[\\/]/,
              priority: 2,
            },
            { name: 'calendar', test: /node_modules[\\/](@fullcalendar|preact|luxon)[\\/]/, priority: 1 },
          ],
        },
      },
    },
  },
  test: {
    projects: [
      { test: { name: 'pure', environment: 'node', include: pureTests, ...patience } },
      {
        test: {
          name: 'server',
          ...withPostgres,
          include: ['tests/**/*.test.{ts,tsx}'],
          exclude: [...pureTests, ...browserTests],
          ...patience,
        },
      },
      {
        extends: true,
        test: {
          name: 'web',
          environment: 'jsdom',
          include: ['src/**/*.test.tsx'],
          ...patience,
          setupFiles: ['src/testing/setup.ts'],
        },
      },
      {
        test: {
          name: 'browser',
          ...withPostgres,
          include: browserTests,
          fileParallelism: false,
          testTimeout: 120_000,
          hookTimeout: 180_000,
        },
      },
    ],
  },
});
