import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vitest/config'

const ROOT = import.meta.dirname

export default defineConfig({
  root: `${ROOT}/web`,
  // Beside the packages, not in web/, which is source only.
  cacheDir: `${ROOT}/node_modules/.vite`,
  plugins: [react(), tailwindcss()],
  // a worker fetches what it seldom needs, such as the reader of workbooks, only then
  worker: { format: 'es' },
  build: { outDir: '../.build/web', emptyOutDir: true, chunkSizeWarningLimit: 1500 },
  test: {
    projects: [
      {
        root: ROOT,
        test: {
          name: 'shared',
          include: ['tests/shared/**/*.test.ts', 'tests/*.test.ts'],
          benchmark: { include: ['tests/bench/**/*.bench.ts'] },
          environment: 'node',
          testTimeout: 60_000,
        },
      },
      {
        root: ROOT,
        test: {
          name: 'api',
          include: ['tests/api/**/*.test.ts'],
          environment: 'node',
          globalSetup: ['tests/setup/database.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        root: ROOT,
        plugins: [react()],
        test: {
          name: 'web',
          include: ['tests/web/**/*.test.{ts,tsx}'],
          environment: 'jsdom',
          setupFiles: ['tests/setup/web.ts'],
          // typing as a person does is slow on a busy machine; nothing here is timed
          testTimeout: 60_000,
        },
      },
      {
        root: ROOT,
        test: {
          name: 'e2e',
          include: ['tests/e2e/**/*.test.ts'],
          environment: 'node',
          globalSetup: ['tests/setup/e2e.ts'],
          testTimeout: 120_000,
          hookTimeout: 180_000,
          fileParallelism: false,
        },
      },
    ],
  },
})
