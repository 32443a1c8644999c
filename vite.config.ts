import { reactRouter } from '@react-router/dev/vite'
import tailwindcss from '@tailwindcss/vite'
import { defineConfig } from 'vitest/config'

// Under Vitest the router's plugin hangs on close ("can't detect preamble"), so it is left out there.
const underTest = Boolean(process.env.VITEST)

export default defineConfig({
  plugins: underTest ? [] : [tailwindcss(), reactRouter()],
  resolve: { tsconfigPaths: true },
  // Each server of this clone (DOAB_VAR) keeps its own ready-made packages; two on one folder would spoil each other's.
  cacheDir: process.env.DOAB_VAR ? `${process.env.DOAB_VAR}/vite` : undefined,
  // The database writes there all the time.
  server: { watch: { ignored: ['**/var/**', '**/build/**'] } },
  optimizeDeps: { include: ['konva', 'react-konva', 'yjs', 'y-websocket', 'y-indexeddb', 'mathjs'] },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          environment: 'node',
          include: ['app/**/*.test.ts', 'realtime/**/*.test.ts', 'drizzle/**/*.test.ts', 'tests/architecture.test.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'dom',
          environment: 'jsdom',
          include: ['app/**/*.test.tsx'],
          setupFiles: ['tests/setup/dom.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'integration',
          environment: 'node',
          include: ['tests/{access,db,routes,realtime,run}/**/*.test.ts'],
          globalSetup: ['tests/setup/database.ts'],
          fileParallelism: false,
          testTimeout: 60_000,
          hookTimeout: 120_000,
        },
      },
    ],
  },
})
