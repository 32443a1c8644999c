import type { Answer, Ask } from '~/access/facts.server'
import type { Log } from './log'

export type AskAll = (asks: Ask[]) => Promise<Map<string, Answer>>

/** Gathers the questions of one turn of the loop into one batch: a thousand pages joining at once ask once. */
export function together(askAll: AskAll): (ask: Ask) => Promise<Answer | undefined> {
  let gathered: { asks: Ask[]; answer: Promise<Map<string, Answer>> } | null = null
  return async (ask) => {
    if (!gathered) {
      const batch: Ask[] = []
      const answer = new Promise<void>((resolve) => setImmediate(resolve)).then(() => {
        gathered = null
        return askAll(batch)
      })
      gathered = { asks: batch, answer }
    }
    gathered.asks.push(ask)
    return (await gathered.answer).get(ask.key)
  }
}

type Asked = { ask: Ask; hear(answer: Answer | undefined): void }
type Options = {
  askAll: AskAll
  /** Done on the same beat, after standings have been heard. */
  also(): Promise<void>
  open(): Asked[]
  every: number
  unknownFor: number
  onUnknown(): void
  log: Log
}

/**
 * Asks the facts of every open connection again and again, in one batch, and at once when poked. So a revoked link or a removed
 * member is out within about a second even when the poke was lost.
 */
export class Recheck {
  private timer: NodeJS.Timeout | null = null
  private running: Promise<void> | null = null
  private again = false
  private answered = Date.now()
  constructor(private readonly options: Options) {}

  start() {
    this.timer = setInterval(() => void this.now(), this.options.every)
  }
  async stop() {
    if (this.timer) clearInterval(this.timer)
    await this.running
  }

  /** Resolves when standings asked after this call have been heard. */
  async now(): Promise<void> {
    if (this.running) {
      // Facts being read now may be older than the poke.
      this.again = true
      return this.running
    }
    this.running = this.run()
    await this.running
  }

  private async run() {
    try {
      do {
        this.again = false
        const open = this.options.open()
        const answers = await this.options.askAll(open.map((o) => o.ask))
        this.answered = Date.now()
        for (const { ask, hear } of open) hear(answers.get(ask.key))
        await this.options.also()
      } while (this.again)
    } catch (error) {
      this.again = false
      this.options.log.warn(
        { why: error instanceof Error ? error.message : String(error) },
        'standings or the log cannot be read now',
      )
      if (Date.now() - this.answered > this.options.unknownFor) this.options.onUnknown()
    } finally {
      this.running = null
    }
  }
}
