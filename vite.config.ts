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
  // Found late, each of these would make the development server load the page again under one's hands.
  optimizeDeps: {
    include: [
      '@conform-to/react',
      '@conform-to/zod/v4',
      '@tanstack/react-query',
      'clsx',
      'd3-scale',
      'konva',
      'lib0/decoding',
      'lib0/encoding',
      'lib0/indexeddb',
      'mathjs',
      'nanoid',
      'perfect-freehand',
      'react-aria-components',
      'react-konva',
      'y-indexeddb',
      'y-protocols/awareness',
      'y-websocket',
      'yjs',
      'zod',
      'zustand',
      'zustand/vanilla',
    ],
  },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          setupFiles: ['tests/setup/seed.ts'],
          // Property tests take seconds, and longer where the machine is shared: a limit for what hangs, not for speed.
          testTimeout: 120_000,
          environment: 'node',
          include: ['app/**/*.test.ts', 'realtime/**/*.test.ts', 'drizzle/**/*.test.ts', 'tests/architecture.test.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'dom',
          testTimeout: 60_000,
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
