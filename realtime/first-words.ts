import type { RawData, WebSocket } from 'ws'
import { bytesOf } from './connection'
import { readFrame, wholeState } from './protocol'

/** Frames kept while the room is being loaded; the rest waits in the kernel. */
const MOST = 4

/**
 * What an admitted page says while its room is still being loaded. A page that has nothing yet (sync step 1 with an empty state
 * vector) is answered with the stored parts as they are, before the sidecar has built its own document from them.
 */
export class FirstWords {
  private readonly kept: { data: RawData; isBinary: boolean }[] = []
  constructor(private readonly socket: WebSocket) {
    socket.on('message', this.keep)
    socket.resume()
  }

  private readonly keep = (data: RawData, isBinary: boolean) => {
    this.kept.push({ data, isBinary })
    if (this.kept.length >= MOST) this.socket.pause()
  }

  /** Resolves when the parts have left this process. */
  async answer(parts: Uint8Array[]): Promise<void> {
    const at = this.kept.findIndex(({ data, isBinary }) => isBinary && asksForAll(bytesOf(data)))
    const [base, ...tail] = parts
    if (at < 0 || !base || tail.length > 200) return
    let frames: Uint8Array[]
    try {
      frames = wholeState(base, tail)
    } catch {
      // A row that cannot be read: the room finds out which and answers.
      return
    }
    this.kept.splice(at, 1)
    await Promise.all(
      frames.map((frame) => new Promise<void>((resolve) => this.socket.send(frame, { binary: true }, () => resolve()))),
    )
  }

  /** Hands over what was not answered here. */
  rest() {
    this.socket.off('message', this.keep)
    return this.kept
  }
}

function asksForAll(frame: Uint8Array): boolean {
  try {
    const message = readFrame(frame)
    return (
      message.is === 'step1' &&
      (message.stateVector.length === 0 || (message.stateVector.length === 1 && message.stateVector[0] === 0))
    )
  } catch {
    return false
  }
}
