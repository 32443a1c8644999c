import { createHash } from 'node:crypto'
import type { Database } from '../../../drizzle/client'
import type { Person } from '../context.server'
import { AppError } from '../errors.server'
import { findLink } from '../links/find-link.server'
import { exportSection, type FileKind, type SectionFile } from './export-section.server'

/**
 * Answers a request for a section's file: by link when the address carries one, else as the person signed in. Refusals are JSON
 * with the status the page would have had.
 */
export async function sendFile(
  db: Database,
  request: Request,
  person: Person | null,
  sectionId: string,
  kind: FileKind,
): Promise<Response> {
  try {
    const query = new URL(request.url).searchParams
    const token = query.get('link')
    const actor = token ? (await findLink(db, token)).actor : person
    if (!actor) throw new AppError('signed-out', 'Sign in, or open this by a link.')
    return reply(request, await exportSection(db, actor, sectionId, kind, query))
  } catch (error) {
    if (!(error instanceof AppError)) throw error
    return Response.json(error.data, { status: error.status, headers: { 'cache-control': 'no-store' } })
  }
}

function reply(request: Request, { name, type, body }: SectionFile): Response {
  const etag = `"${createHash('sha256').update(body).digest('base64url').slice(0, 32)}"`
  const headers = {
    'content-type': type,
    'content-disposition': disposition(name),
    etag,
    // Asked about every time: rights may have ended meanwhile.
    'cache-control': 'private, no-cache',
    vary: 'cookie',
    // A drawing is a document of its own when it is opened as one: it may run and fetch nothing.
    'content-security-policy': "default-src 'none'; style-src 'unsafe-inline'; font-src data:; sandbox",
  }
  const known = request.headers.get('if-none-match')?.split(',') ?? []
  if (known.some((one) => one.trim().replace(/^W\//, '') === etag)) return new Response(null, { status: 304, headers })
  return new Response(body, { headers })
}

/** A download's name, RFC 6266: plain letters for old readers, and the title as it is after RFC 5987. */
export function disposition(name: string): string {
  // Slashes and the signs that no file system takes; and control signs, which no header takes.
  const tidy = name.replace(/[\\/:*?"<>|\p{Cc}\p{Cs}]+/gu, '-').replace(/^\.+/, '')
  const plain = tidy.normalize('NFKD').replace(/[^\x20-\x7e]+/g, '') || 'section'
  const coded = encodeURIComponent(tidy).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  )
  return `attachment; filename="${plain.replace(/["\\%]/g, '-')}"; filename*=UTF-8''${coded}`
}
