import { createHash } from 'node:crypto'
import type { Database } from '../../../drizzle/client'
import type { Person } from '../context.server'
import { AppError, notFound } from '../errors.server'
import { askSection } from './ask-section.server'
import { freshViews } from './refresh-view.server'

/** The small drawing of a section, for who may see it. The address of a list's drawing changes when the section does. */
export async function sendThumbnail(
  db: Database,
  request: Request,
  person: Person | null,
  sectionId: string,
): Promise<Response> {
  try {
    if (!person) throw new AppError('signed-out', 'Sign in to see this drawing.')
    await askSection(db, person, sectionId, 'section.see')
    const drawing = (await freshViews(db, [sectionId])).get(sectionId)?.thumbnail
    if (!drawing) throw notFound()
    const etag = `"${createHash('sha256').update(drawing).digest('base64url').slice(0, 24)}"`
    const headers = {
      'content-type': 'image/svg+xml; charset=utf-8',
      etag,
      'cache-control': 'private, no-cache',
      vary: 'cookie',
      'content-security-policy': "default-src 'none'; style-src 'unsafe-inline'; sandbox",
    }
    if (request.headers.get('if-none-match') === etag) return new Response(null, { status: 304, headers })
    return new Response(drawing, { headers })
  } catch (error) {
    if (!(error instanceof AppError)) throw error
    return Response.json(error.data, { status: error.status, headers: { 'cache-control': 'no-store' } })
  }
}
