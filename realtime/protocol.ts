import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import * as Y from 'yjs'
import { MESSAGE, type Notice, SYNC } from '~/live/codes'

const written = (write: (encoder: encoding.Encoder) => void): Uint8Array => encoding.encode(write)

export const stepOne = (stateVector: Uint8Array) =>
  written((e) => {
    encoding.writeVarUint(e, MESSAGE.sync)
    encoding.writeVarUint(e, SYNC.step1)
    encoding.writeVarUint8Array(e, stateVector)
  })
export const stepTwo = (update: Uint8Array) =>
  written((e) => {
    encoding.writeVarUint(e, MESSAGE.sync)
    encoding.writeVarUint(e, SYNC.step2)
    encoding.writeVarUint8Array(e, update)
  })
export const updateFrame = (update: Uint8Array) =>
  written((e) => {
    encoding.writeVarUint(e, MESSAGE.sync)
    encoding.writeVarUint(e, SYNC.update)
    encoding.writeVarUint8Array(e, update)
  })
/**
 * The whole state as frames; the last one is the step 2, because a page calls itself synced on it. A small state goes as one
 * update; of a large one the tail goes first (the page keeps it until the base is there), as merging would cost more than sending.
 */
export function wholeState(base: Uint8Array, tail: Uint8Array[]): Uint8Array[] {
  if (tail.length === 0) return [stepTwo(base)]
  if (base.length < 128 << 10) return [stepTwo(Y.mergeUpdates([base, ...tail]))]
  return [updateFrame(Y.mergeUpdates(tail)), stepTwo(base)]
}
export const acknowledgement = (dealtWith: number, refused: number) =>
  written((e) => {
    encoding.writeVarUint(e, MESSAGE.acknowledge)
    encoding.writeVarUint(e, dealtWith)
    encoding.writeVarUint(e, refused)
  })
export const noticeFrame = (notice: Notice) =>
  written((e) => {
    encoding.writeVarUint(e, MESSAGE.notice)
    encoding.writeVarString(e, JSON.stringify(notice))
  })

/** One client's presence as it travels: state is JSON, null for "gone". */
export type PresenceEntry = { clientId: number; clock: number; state: string }
export const presenceFrame = (entries: PresenceEntry[]) =>
  written((e) => {
    encoding.writeVarUint(e, MESSAGE.awareness)
    encoding.writeVarUint8Array(e, presenceBytes(entries))
  })
export const presenceBytes = (entries: PresenceEntry[]) =>
  written((e) => {
    encoding.writeVarUint(e, entries.length)
    for (const { clientId, clock, state } of entries) {
      encoding.writeVarUint(e, clientId)
      encoding.writeVarUint(e, clock)
      encoding.writeVarString(e, state)
    }
  })
/** @throws on anything malformed. */
export function readPresence(bytes: Uint8Array, most: number): PresenceEntry[] {
  const decoder = decoding.createDecoder(bytes)
  const count = decoding.readVarUint(decoder)
  if (count > most) throw new Error(`presence of ${count} clients in one message`)
  return Array.from({ length: count }, () => ({
    clientId: decoding.readVarUint(decoder),
    clock: decoding.readVarUint(decoder),
    state: decoding.readVarString(decoder),
  }))
}

export type Incoming =
  | { is: 'step1'; stateVector: Uint8Array }
  | { is: 'step2' | 'update'; update: Uint8Array }
  | { is: 'presence'; entries: PresenceEntry[] }
  | { is: 'ask-presence' }
  | { is: 'part'; parts: number; index: number; piece: Uint8Array }

/** Reads one frame of a client. @throws on anything malformed or unknown. */
export function readFrame(frame: Uint8Array): Incoming {
  const decoder = decoding.createDecoder(frame)
  const type = decoding.readVarUint(decoder)
  switch (type) {
    case MESSAGE.sync: {
      const step = decoding.readVarUint(decoder)
      const bytes = decoding.readVarUint8Array(decoder)
      if (step === SYNC.step1) return { is: 'step1', stateVector: bytes }
      if (step === SYNC.step2) return { is: 'step2', update: bytes }
      if (step === SYNC.update) return { is: 'update', update: bytes }
      throw new Error(`unknown sync message ${step}`)
    }
    case MESSAGE.awareness:
      return { is: 'presence', entries: readPresence(decoding.readVarUint8Array(decoder), 256) }
    case MESSAGE.queryAwareness:
      return { is: 'ask-presence' }
    case MESSAGE.part: {
      const parts = decoding.readVarUint(decoder)
      const index = decoding.readVarUint(decoder)
      return { is: 'part', parts, index, piece: decoding.readVarUint8Array(decoder) }
    }
    default:
      throw new Error(`unknown message type ${type}`)
  }
}
