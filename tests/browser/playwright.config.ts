import path from 'node:path'
import { defineConfig } from '@playwright/test'
import { freePort } from '../../app/run/parts/ports.mjs'
import { temporaryFolder } from '../setup/temporary'

// Starts the real thing (npm start's program) on free ports with a data folder of its own, demo loaded. Workers read this file
// again, so what was chosen the first time is handed to them in the environment.
// DOAB_E2E_URL=http://localhost:3000 runs the tests against a server that is up already.
const env = process.env
const given = env.DOAB_E2E_URL
if (!given) {
  env.DOAB_E2E_PORT ??= String(await freePort())
  env.DOAB_E2E_REALTIME_PORT ??= String(await freePort())
  env.DOAB_E2E_VAR ??= temporaryFolder('e2e')
}

const CHROMIUM_ARGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
]

export default defineConfig({
  testDir: '.',
  testMatch: '*.spec.ts',
  outputDir: '../../var/test-results',
  fullyParallel: false,
  workers: 1,
  retries: 0,
  forbidOnly: true,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  reporter: 'list',
  globalTeardown: './teardown.ts',
  use: {
    baseURL: given ?? `http://localhost:${env.DOAB_E2E_PORT}`,
    viewport: { width: 1440, height: 900 },
    locale: 'en-GB',
    timezoneId: 'UTC',
    screenshot: 'only-on-failure',
    launchOptions: { executablePath: '/usr/bin/chromium', args: CHROMIUM_ARGS },
  },
  webServer: given
    ? undefined
    : {
        command: 'exec node app/run/start.mjs',
        cwd: path.resolve(import.meta.dirname, '../..'),
        url: `http://localhost:${env.DOAB_E2E_PORT}/health`,
        timeout: 300_000,
        stdout: 'pipe',
        stderr: 'pipe',
        gracefulShutdown: { signal: 'SIGTERM', timeout: 30_000 },
        env: {
          PORT: env.DOAB_E2E_PORT ?? '',
          REALTIME_PORT: env.DOAB_E2E_REALTIME_PORT ?? '',
          DOAB_VAR: env.DOAB_E2E_VAR ?? '',
          APP_URL: `http://localhost:${env.DOAB_E2E_PORT}`,
          NODE_ENV: 'development',
        },
      },
})
