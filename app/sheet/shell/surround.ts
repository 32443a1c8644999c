import type { Act } from '~/access/acts'
import type { LiveSection } from '~/live'

/** What stands around the drawing and does not change while the sheet is open. The loader owns it. */
export type Surround = {
  site: { id: string; name: string } | null
  /** Token of the read-only link this page was opened by; null for people with an account. */
  token: string | null
}

/** Everything the first view needs, as the server sends it: plain data, so that the page shows the answer before any script. */
export type First = Surround & {
  sectionId: string
  live: LiveSection
  /**
   * State of the live document, base64, when the loader sends it along: the sheet then opens before the connection stands. Shared
   * history with the server's, so that nothing is doubled when the two meet.
   */
  state?: string
  /** The drawing as SVG text, made on the server; the canvas takes its place. */
  svg: string
  epoch: number
  acts: Act[]
  may: 'write' | 'read'
  /** Id of the signed-in person, under which unstored edits are kept on this machine; null for link holders. */
  userId: string | null
  /** Case the page was asked for (`?case=`), when the section has it. */
  caseId: string | null
}
