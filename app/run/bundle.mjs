import path from 'node:path'
import { pathToFileURL } from 'node:url'
import { ROOT } from './parts/places.mjs'

/** What runs on bare Node beside the React Router build: source → file under build/. */
export const BUNDLES = {
  prepare: 'app/run/prepare.ts',
  web: 'app/server/http/main.server.ts',
  realtime: 'realtime/main.ts',
}

/**
 * esbuild's settings for one of them. Packages stay in node_modules, so that there is one copy of yjs and mysql2.
 * @param {keyof typeof BUNDLES} name @param {string} [out]
 * @returns {import('esbuild').BuildOptions}
 */
export function bundleOptions(name, out = path.join(ROOT, 'build')) {
  return {
    absWorkingDir: ROOT,
    entryPoints: [BUNDLES[name]],
    outfile: path.join(out, name, 'main.js'),
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    sourcemap: true,
    tsconfig: path.join(ROOT, 'tsconfig.json'),
    logLevel: 'warning',
  }
}

/** @param {(keyof typeof BUNDLES)[]} names @param {string} [out] */
export async function bundle(names, out) {
  const { build } = await import('esbuild')
  await Promise.all(names.map((name) => build(bundleOptions(name, out))))
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href)
  await bundle(/** @type {(keyof typeof BUNDLES)[]} */ (Object.keys(BUNDLES)))
