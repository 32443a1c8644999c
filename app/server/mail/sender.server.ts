import { db } from '../db.server'
import { log } from '../log.server'
import { sendDue } from './send-due.server'
import { openTransport, type Transport } from './transport.server'

/** How often the outbox is looked at when nothing waits. */
const PAUSE = 2_000

type Loop = { stopped: boolean; timer: NodeJS.Timeout | null; turn: Promise<void>; transport: Transport }
// Hot reload evaluates this file again; one loop a process.
const kept = globalThis as { doabSender?: Loop }

async function turn(loop: Loop): Promise<void> {
  try {
    while (!loop.stopped && (await sendDue(db, loop.transport)) > 0);
  } catch (error) {
    log.error({ err: error }, 'the outbox could not be worked off')
  }
  if (!loop.stopped) schedule(loop, PAUSE)
}

function schedule(loop: Loop, ms: number) {
  loop.timer = setTimeout(() => {
    loop.turn = turn(loop)
  }, ms)
  loop.timer.unref()
}

/** Starts the loop that sends waiting letters, once a process. */
export function startSender(): void {
  if (kept.doabSender) return
  const loop: Loop = { stopped: false, timer: null, turn: Promise.resolve(), transport: openTransport() }
  kept.doabSender = loop
  schedule(loop, 200)
}

/** Lets the letters on their way finish, then starts no more. */
export async function stopSender(): Promise<void> {
  const loop = kept.doabSender
  kept.doabSender = undefined
  if (!loop) return
  loop.stopped = true
  if (loop.timer) clearTimeout(loop.timer)
  await loop.turn
  loop.transport.close()
}
