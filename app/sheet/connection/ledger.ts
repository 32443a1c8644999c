/**
 * Bookkeeping of what the server has said is stored. Deletions do not advance a Yjs state vector, so acknowledgements count
 * this connection's document messages instead: a step 2 says everything known up to then, an update says one edit more.
 */
export class Ledger {
  private made: number
  private stored = 0
  /** Document messages of this connection still to be dealt with: edits known when each was sent; whether it said everything. */
  private sent: { made: number; whole: boolean }[] = []
  private dealt = 0
  private refused = 0
  /** A step 2 was taken on this connection, so each further message covers everything before it. */
  private full = false

  /** @param inherited edits of earlier sessions, found in the local store */
  constructor(inherited = 0) {
    this.made = inherited
  }
  get waiting() {
    return this.made - this.stored
  }
  edit() {
    this.made++
  }
  inherit(edits: number) {
    this.made += edits
  }
  /** A new connection: what was sent on the old one and not acknowledged will be in the next step 2. */
  connected() {
    this.sent = []
    this.dealt = 0
    this.refused = 0
    this.full = false
  }
  message(whole: boolean) {
    this.sent.push({ made: this.made, whole })
  }
  /** The first `dealt` messages are committed, but for `refused` of them. */
  acknowledged(dealt: number, refused: number) {
    const count = Math.max(0, Math.min(dealt - this.dealt, this.sent.length))
    const messages = this.sent.splice(0, count)
    this.dealt += count
    if (refused > this.refused) {
      // Which one it was is not said; the server asks for everything again, and only that answer covers.
      this.refused = refused
      this.full = false
      return
    }
    for (const { made, whole } of messages) {
      if (whole) this.full = true
      if (this.full) this.stored = Math.max(this.stored, made)
    }
  }
}
