import { LIMIT } from '~/live/codes'

/** What the sidecar puts up with. Tests make them small; everything in bytes, milliseconds or pieces. */
export const LIMITS = {
  frame: LIMIT.frame as number,
  document: LIMIT.document as number,
  objects: LIMIT.objects as number,
  presence: LIMIT.presence as number,
  /** Document messages a second in the long run, and at once. A pasted drawing is one message. */
  edits: { rate: 100, burst: 600 },
  /** Everything else (presence, questions) a second. */
  others: { rate: 120, burst: 400 },
  /** Bytes a second. */
  bytes: { rate: 1 << 20, burst: 16 << 20 },
  /** Whole-state answers (sync step 1) a second: each may cost the encoding of the document. */
  states: { rate: 1, burst: 12 },
  /** Whoever broke a document with a crafted update stays out this long. */
  banned: 60_000,
  sockets: 4_000,
  socketsPerAddress: 200,
  socketsPerPerson: 60,
  socketsPerLink: 400,
  /** From the upgrade to being let in. */
  admitWithin: 6_000,
  ping: 2_500,
  /** No sign of life for this long: gone. Together with `ping` below the 10 s within which gone people must vanish. */
  silence: 7_000,
  beat: 4_000,
  /** Bytes waiting for one reader before it is told to come back later. */
  backlog: 16 << 20,
  /** Presence is not sent to a reader with more than this waiting; it gets the next one. */
  presenceBacklog: 256 << 10,
  /** Unstored bytes held for one room while the database is away. */
  held: 16 << 20,
  /** After this long without a commit the sheet is told. */
  stalledAfter: 1_500,
  /** Standings are asked again this often, whether poked or not. */
  recheck: 1_000,
  /** Without an answer about standings for this long nobody stays. */
  unknownFor: 60_000,
  /** An empty room is kept this long. */
  idleRoom: 30_000,
  /** Rows past the snapshot that make a fold worth it while people draw, and when they have left. */
  foldRows: 500,
  foldEvery: 10_000,
  foldRowsIdle: 20,
  /** Presence of several people goes out together this often in rooms of more than `crowd`. */
  presenceTick: 20,
  crowd: 8,
}
export type Limits = typeof LIMITS

/** A bucket that refills; `take` says whether there was enough. */
export class Bucket {
  private level: number
  private at = performance.now()
  constructor(private readonly size: { rate: number; burst: number }) {
    this.level = size.burst
  }
  take(amount = 1): boolean {
    const now = performance.now()
    this.level = Math.min(this.size.burst, this.level + ((now - this.at) / 1000) * this.size.rate)
    this.at = now
    if (this.level < amount) return false
    this.level -= amount
    return true
  }
}
