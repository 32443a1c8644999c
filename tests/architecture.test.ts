import { readdirSync, readFileSync, statSync } from 'node:fs'
import { dirname, join, normalize, relative } from 'node:path'
import ts from 'typescript'
import { describe, expect, it } from 'vitest'

/**
 * Who may import whom, as in DEVELOPERS.md. A room is a folder; a file belongs to the longest room that starts its path.
 * `pure` rooms know nothing of React, Konva, Yjs, Node or the DOM.
 */
type Room = { may: string[]; pure?: boolean; only?: RegExp }
const ROOMS: Record<string, Room> = {
  'app/section': { may: [], pure: true },
  'app/solver': { may: ['app/section'], pure: true },
  'app/drawing': { may: ['app/section', 'app/solver', 'app/live'], pure: true },
  'app/export': { may: ['app/drawing', 'app/section', 'app/solver', 'app/live'], pure: true },
  'app/access': { may: ['drizzle'] },
  'app/live': { may: ['app/section'] },
  'app/compute': { may: ['app/section', 'app/solver'] },
  drizzle: { may: [] },
  'drizzle/seed': { may: ['drizzle', 'app/section', 'app/solver', 'app/live', 'app/export'] },
  'app/server': {
    may: ['drizzle', 'app/access', 'app/section', 'app/solver', 'app/compute', 'app/drawing', 'app/export', 'app/live'],
  },
  realtime: { may: ['drizzle', 'app/access', 'app/live', 'app/section'] },
  'app/queries': { may: ['app/section', 'app/server/replies'] },
  'app/ui': { may: [] },
  'app/sheet': {
    may: [
      'app/ui',
      'app/drawing',
      'app/live',
      'app/compute',
      'app/section',
      'app/solver',
      'app/queries',
      'app/access',
      'app/export',
    ],
  },
  'app/pages': {
    may: ['app/ui', 'app/queries', 'app/section', 'app/drawing', 'app/access', 'app/sheet', 'app/live', 'app/solver'],
  },
  'app/routes': {
    may: [
      'app/pages',
      'app/sheet',
      'app/server',
      'app/access',
      'app/ui',
      'app/section',
      'app/live',
      'app/drawing',
      'app/export',
      'app/solver',
      'drizzle',
    ],
  },
}

const root = join(import.meta.dirname, '..')
function walk(folder: string): string[] {
  return readdirSync(join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    const path = join(folder, entry.name)
    if (entry.isDirectory()) return walk(path)
    return /\.tsx?$/.test(entry.name) && !/\.d\.ts$/.test(entry.name) ? [path] : []
  })
}
const files = ['app', 'realtime', 'drizzle'].flatMap(walk)
const product = files.filter((file) => !/\.test\.tsx?$/.test(file) && !/\/testing(\.ts|\/)/.test(file))
const source = new Map(files.map((file) => [file, readFileSync(join(root, file), 'utf8')]))

const roomOf = (file: string) =>
  Object.keys(ROOMS)
    .filter((room) => file.startsWith(`${room}/`))
    .sort((a, b) => b.length - a.length)[0]

const exists = (path: string) => {
  try {
    return statSync(join(root, path)).isFile()
  } catch {
    return false
  }
}
/** The file an import leads to, or null for a package. */
function target(file: string, specifier: string): string | null {
  const clean = specifier.replace(/\?.*$/, '')
  const base = clean.startsWith('~/')
    ? join('app', clean.slice(2))
    : clean.startsWith('.')
      ? normalize(join(dirname(file), clean))
      : null
  if (base === null) return null
  return [base, `${base}.ts`, `${base}.tsx`, join(base, 'index.ts'), join(base, 'index.tsx')].find(exists) ?? base
}
const imports = new Map(
  files.map((file) => [
    file,
    ts
      .preProcessFile(source.get(file) ?? '', true, true)
      .importedFiles.map(({ fileName }) => ({ specifier: fileName, to: target(file, fileName) })),
  ]),
)

describe('the house', () => {
  it('lets rooms import only what they may', () => {
    const wrong = product.flatMap((file) => {
      const room = roomOf(file)
      if (!room) return []
      return (imports.get(file) ?? []).flatMap(({ specifier, to }) => {
        if (to === null || to.includes('+types')) return []
        const other = roomOf(to)
        if (!other || other === room) return []
        const may = ROOMS[room]?.may ?? []
        return may.some((allowed) => to.startsWith(`${allowed}/`))
          ? []
          : [`${file} imports ${specifier} (${room} → ${other})`]
      })
    })
    expect(wrong).toEqual([])
  })

  it('keeps the pure rooms pure', () => {
    const impure = /^(react|react-dom|react-konva|konva|yjs|y-.*|ws|node:.*|express|mysql2.*|drizzle-orm.*)$/
    const wrong = product
      .filter((file) => ROOMS[roomOf(file) ?? '']?.pure)
      .flatMap((file) =>
        (imports.get(file) ?? [])
          .filter(({ specifier }) => impure.test(specifier))
          .map(({ specifier }) => `${file}: ${specifier}`),
      )
      // The command that prints the table of published values is a script, not part of the library.
      .filter((line) => !line.startsWith('app/solver/published/print.ts'))
    expect(wrong).toEqual([])
  })

  it('enters pure rooms through their index only', () => {
    const wrong = product.flatMap((file) =>
      (imports.get(file) ?? []).flatMap(({ specifier, to }) => {
        if (!to) return []
        const other = roomOf(to)
        if (
          !other ||
          other === roomOf(file) ||
          !['app/section', 'app/solver', 'app/drawing', 'app/export', 'app/live'].includes(other)
        )
          return []
        // codes.ts is the wire protocol, shared with the sidecar, which must not load the section model for it.
        return to === `${other}/index.ts` || to === 'app/live/codes.ts' || /loadUnits|worker/.test(to)
          ? []
          : [`${file} → ${specifier}`]
      }),
    )
    expect(wrong).toEqual([])
  })

  it('keeps server files out of the page by their name', () => {
    const wrong = product.filter(
      (file) =>
        file.startsWith('app/server/') &&
        !/\.server\.tsx?$/.test(file) &&
        !file.startsWith('app/server/http/') &&
        !file.includes('/replies'),
    )
    expect(wrong).toEqual([])
  })

  it('keeps SQL in the rooms that own the database', () => {
    const wrong = product
      .filter((file) => !/^(app\/server|drizzle|realtime\/log\.ts|app\/access\/facts\.server\.ts)/.test(file))
      .filter((file) =>
        (imports.get(file) ?? []).some(
          ({ specifier }) => specifier.startsWith('drizzle-orm') || specifier.startsWith('mysql2'),
        ),
      )
    expect(wrong).toEqual([])
  })

  it('has no circles', () => {
    const done = new Set<string>()
    const circles: string[] = []
    const visit = (file: string, path: string[]) => {
      if (path.includes(file)) {
        circles.push([...path.slice(path.indexOf(file)), file].map((f) => relative('app', f)).join(' → '))
        return
      }
      if (done.has(file)) return
      for (const { to } of imports.get(file) ?? []) if (to && source.has(to)) visit(to, [...path, file])
      done.add(file)
    }
    for (const file of product) visit(file, [])
    expect(circles).toEqual([])
  })

  it('says which files want splitting', () => {
    const large = product
      .map((file) => ({ file, lines: (source.get(file) ?? '').split('\n').length }))
      .filter(({ lines }) => lines > 300)
      .sort((a, b) => b.lines - a.lines)
    if (large.length)
      console.info(`files over 300 lines:\n${large.map(({ file, lines }) => `  ${lines} ${file}`).join('\n')}`)
    // Information up to here; beyond this nobody reads a file to its end.
    expect(large.filter(({ lines }) => lines > 600)).toEqual([])
  })
})
