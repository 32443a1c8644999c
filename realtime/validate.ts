import * as Y from 'yjs'
import type { Limits } from './limits'

/**
 * What the sidecar checks of an update before it touches the room's document: that it can be read to its end, and that the
 * document stays within its limits. Who may write at all is decided elsewhere; what a permitted person draws is their business.
 */
export type Verdict = { ok: true; objects: number } | { ok: false; because: 'hostile' | 'too-big'; why: string }

type Struct = ReturnType<typeof Y.decodeUpdate>['structs'][number]

/** Objects in one struct: each shared type (an object, a vertex, a list) and each plain object inside a value. */
function objectsIn(struct: Struct): number {
  if (!(struct instanceof Y.Item) || struct.deleted) return 0
  if (struct.content instanceof Y.ContentType) return 1
  if (struct.content instanceof Y.ContentAny)
    return struct.content.arr.filter((value: unknown) => typeof value === 'object' && value !== null).length
  return 0
}

/** Counted over the flat store rather than by walking the tree: a hostile nesting cannot exhaust the stack. */
export function countObjects(doc: Y.Doc): number {
  let count = 0
  for (const structs of doc.store.clients.values()) for (const struct of structs) count += objectsIn(struct)
  return count
}

/** Running measure of one document: cheap upper bounds, made exact only when they come near a limit. */
export class Measure {
  private bytes: number
  private objects: number
  constructor(
    private readonly doc: Y.Doc,
    private readonly limits: Pick<Limits, 'document' | 'objects'>,
    bytes: number,
  ) {
    this.bytes = bytes
    this.objects = countObjects(doc)
  }

  check(update: Uint8Array): Verdict {
    let decoded: ReturnType<typeof Y.decodeUpdate>
    try {
      decoded = Y.decodeUpdate(update)
    } catch (error) {
      return { ok: false, because: 'hostile', why: error instanceof Error ? error.message : String(error) }
    }
    // Deleting is always allowed: it is the way out of a full document.
    if (decoded.structs.length === 0) return { ok: true, objects: 0 }
    const objects = decoded.structs.reduce((n, struct) => n + objectsIn(struct), 0)
    if (objects > 0 && this.objects + objects > this.limits.objects) {
      this.objects = countObjects(this.doc)
      if (this.objects + objects > this.limits.objects)
        return { ok: false, because: 'too-big', why: `more than ${this.limits.objects} objects` }
    }
    if (this.bytes + update.length > this.limits.document) {
      this.bytes = Y.encodeStateAsUpdate(this.doc).length
      if (this.bytes + update.length > this.limits.document)
        return { ok: false, because: 'too-big', why: `more than ${Math.round(this.limits.document / 1024)} KiB` }
    }
    return { ok: true, objects }
  }

  /** After an update was applied and really changed the document. */
  grown(bytes: number, objects: number) {
    this.bytes += bytes
    this.objects += objects
  }
}
