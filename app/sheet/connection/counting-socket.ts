import * as encoding from 'lib0/encoding'
import { LIMIT, MESSAGE, SYNC } from '../../live/codes'

type Watch = { document(whole: boolean): void }

/**
 * The WebSocket class handed to y-websocket's provider: tells the ledger of every document message, and cuts a message that is
 * too big for one frame (a drawing pasted while offline) into parts.
 */
export function countingSocket(Base: typeof WebSocket, watch: Watch): typeof WebSocket {
  return class extends Base {
    override send(data: string | ArrayBufferLike | Blob | ArrayBufferView<ArrayBufferLike>) {
      if (!(data instanceof Uint8Array)) return super.send(data as ArrayBuffer)
      const whole = data[0] === MESSAGE.sync && data[1] === SYNC.step2
      if (whole || (data[0] === MESSAGE.sync && data[1] === SYNC.update)) watch.document(whole)
      if (data.length <= LIMIT.part) return super.send(data as Uint8Array<ArrayBuffer>)
      const parts = Math.ceil(data.length / LIMIT.part)
      for (let index = 0; index < parts; index++) {
        const piece = data.subarray(index * LIMIT.part, (index + 1) * LIMIT.part)
        super.send(
          encoding.encode((e) => {
            encoding.writeVarUint(e, MESSAGE.part)
            encoding.writeVarUint(e, parts)
            encoding.writeVarUint(e, index)
            encoding.writeVarUint8Array(e, piece)
          }) as Uint8Array<ArrayBuffer>,
        )
      }
    }
  }
}
