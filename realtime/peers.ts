import { randomBytes } from 'node:crypto'
import { Redis } from 'ioredis'
import type { Log } from './log'
import { type PresenceEntry, presenceBytes, readPresence } from './protocol'

/**
 * Other sidecars, met through Redis. It only carries words ("there is something newer in the log", presence, pokes); every edit
 * is fetched from MariaDB. So a lost message or a dead Redis costs a second (rooms are compared with the log), never an edit.
 */
const KIND = { stored: 1, presence: 2, askPresence: 3, poke: 4, beat: 5, farewell: 6 } as const
const ALL = 'doab:all'
const channelOf = (sectionId: string) => `doab:room:${sectionId}`
/** A sidecar that was not heard for this long is gone, and its people with it. */
const SILENT = 5_000
const BEAT = 1_500

export type PeerEvents = {
  stored(sectionId: string, seq: number): void
  presence(sectionId: string, entries: PresenceEntry[]): void
  /** Another sidecar opened this room and wants to know who is here. */
  askPresence(sectionId: string): void
  poke(): void
}

export type Peers = {
  open(sectionId: string): void
  close(sectionId: string): void
  stored(sectionId: string, seq: number): void
  presence(sectionId: string, entries: PresenceEntry[]): void
  poke(): void
  /** Presence of people on other sidecars, for somebody who joins here. */
  others(sectionId: string): PresenceEntry[]
  stop(): Promise<void>
}

export const NO_PEERS: Peers = {
  open: () => {},
  close: () => {},
  stored: () => {},
  presence: () => {},
  poke: () => {},
  others: () => [],
  stop: async () => {},
}

export function meetPeers(url: string, on: PeerEvents, log: Log): Peers {
  const self = randomBytes(8)
  const options = {
    maxRetriesPerRequest: null,
    enableOfflineQueue: false,
    retryStrategy: (n: number) => Math.min(1_000, n * 50),
  }
  const out = new Redis(url, options)
  // The subscriber queues: channels asked for while Redis is away are subscribed to when it is back.
  const inn = new Redis(url, { ...options, enableOfflineQueue: true })
  let complained = false
  for (const client of [out, inn]) {
    client.on('error', (error: Error) => {
      if (!complained)
        log.warn({ why: error.message }, 'Redis does not answer; other sidecars are heard through the log only')
      complained = true
    })
    client.on('ready', () => {
      complained = false
    })
  }

  const heard = new Map<string, number>()
  /** section → client id → its last word and who said it. */
  const away = new Map<string, Map<number, { entry: PresenceEntry; from: string }>>()

  const say = (channel: string, kind: number, payload: Uint8Array = new Uint8Array()) => {
    if (out.status !== 'ready') return
    out.publish(channel, Buffer.concat([Buffer.from([kind]), self, payload])).catch(() => {})
  }

  const forget = (peer: string) => {
    heard.delete(peer)
    for (const [sectionId, people] of away) {
      const gone = [...people].filter(([, held]) => held.from === peer)
      for (const [clientId] of gone) people.delete(clientId)
      if (gone.length)
        on.presence(
          sectionId,
          gone.map(([, { entry }]) => ({ ...entry, state: 'null' })),
        )
    }
  }

  const hear = (channel: string, message: Buffer) => {
    const kind = message[0]
    const from = message.subarray(1, 9).toString('hex')
    if (from === self.toString('hex')) return
    heard.set(from, Date.now())
    const payload = message.subarray(9)
    if (kind === KIND.poke) return on.poke()
    if (kind === KIND.farewell) return forget(from)
    if (!channel.startsWith('doab:room:')) return
    const sectionId = channel.slice('doab:room:'.length)
    if (kind === KIND.stored) return on.stored(sectionId, Number(payload.readBigUInt64BE()))
    if (kind === KIND.askPresence) return on.askPresence(sectionId)
    if (kind === KIND.presence) {
      const entries = readPresence(payload, 10_000)
      const people = away.get(sectionId) ?? new Map()
      away.set(sectionId, people)
      for (const entry of entries)
        if (entry.state === 'null') people.delete(entry.clientId)
        else people.set(entry.clientId, { entry, from })
      on.presence(sectionId, entries)
    }
  }
  inn.on('messageBuffer', (channel: Buffer, message: Buffer) => {
    try {
      hear(channel.toString(), message)
    } catch (error) {
      log.warn({ why: error instanceof Error ? error.message : String(error) }, 'a message from Redis cannot be read')
    }
  })
  inn.subscribe(ALL).catch(() => {})

  const timer = setInterval(() => {
    say(ALL, KIND.beat)
    for (const [peer, at] of heard) if (Date.now() - at > SILENT) forget(peer)
  }, BEAT)

  return {
    open(sectionId) {
      inn.subscribe(channelOf(sectionId)).then(
        () => say(channelOf(sectionId), KIND.askPresence),
        () => {},
      )
    },
    close(sectionId) {
      away.delete(sectionId)
      inn.unsubscribe(channelOf(sectionId)).catch(() => {})
    },
    stored(sectionId, seq) {
      const payload = Buffer.alloc(8)
      payload.writeBigUInt64BE(BigInt(seq))
      say(channelOf(sectionId), KIND.stored, payload)
    },
    presence: (sectionId, entries) => say(channelOf(sectionId), KIND.presence, presenceBytes(entries)),
    poke: () => say(ALL, KIND.poke),
    others: (sectionId) => [...(away.get(sectionId)?.values() ?? [])].map((held) => held.entry),
    async stop() {
      clearInterval(timer)
      say(ALL, KIND.farewell)
      await Promise.race([out.quit().catch(() => {}), new Promise((r) => setTimeout(r, 300))])
      out.disconnect()
      inn.disconnect()
    },
  }
}
