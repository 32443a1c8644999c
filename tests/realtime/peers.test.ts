import { type ChildProcess, spawn, spawnSync } from 'node:child_process'
import { once } from 'node:events'
import { Redis } from 'ioredis'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { aptInstall } from '../../app/run/parts/apt.mjs'
import { freePort } from '../../app/run/parts/ports.mjs'
import { loadDoc } from '../../drizzle/log'
import { testConnection } from '../setup/clean'
import { joined, makePractice, map, openPage, type Page, type Practice, sidecarProcess, until } from './support'

/** Debian's redis-server; fetched when it is missing and we may. Doab itself needs Redis for several sidecars only. */
async function hasRedis(): Promise<boolean> {
  const there = () => spawnSync('redis-server', ['--version']).status === 0
  if (!there()) await aptInstall(['redis-server'], 'Redis (for one test)').catch(() => {})
  return there()
}
const redisThere = await hasRedis()
if (!redisThere) console.info('redis-server is missing and cannot be installed: the tests of two sidecars are left out')

describe.skipIf(!redisThere)('two sidecars over Redis', () => {
  const connection = testConnection(6)
  const { db } = connection
  let practice: Practice
  let redis: ChildProcess
  let redisUrl: string
  let redisPort: number
  const open: Page[] = []
  type Sidecar = Awaited<ReturnType<typeof sidecarProcess>>
  let one: Sidecar
  let two: Sidecar

  const startRedis = async () => {
    redis = spawn(
      'redis-server',
      ['--port', String(redisPort), '--bind', '127.0.0.1', '--save', '', '--appendonly', 'no'],
      {
        stdio: 'ignore',
      },
    )
    const probe = new Redis(redisUrl, { maxRetriesPerRequest: null })
    probe.on('error', () => {})
    await probe.ping()
    probe.disconnect()
  }
  beforeAll(async () => {
    practice = await makePractice(db)
    redisPort = await freePort()
    redisUrl = `redis://127.0.0.1:${redisPort}`
    await startRedis()
    const url = process.env.DATABASE_URL ?? ''
    one = await sidecarProcess(url, { redisUrl })
    two = await sidecarProcess(url, { redisUrl })
  })
  afterEach(() => {
    for (const page of open.splice(0)) page.close()
  })
  afterAll(async () => {
    await Promise.all([one.end(), two.end()])
    redis.kill()
    await once(redis, 'exit')
    await connection.close()
  })
  const page = async (sectionId: string, url: string | (() => string)) => {
    const made = openPage(db, { person: practice.principal }, sectionId, url)
    open.push(made)
    await joined(made)
    return made
  }
  const same = (...pages: Page[]) =>
    new Set(pages.map((p) => JSON.stringify(Object.entries(map(p).toJSON()).sort()))).size === 1

  it('edits and presence pass between them, both ways', async () => {
    const sectionId = await practice.section()
    const [a, b] = [await page(sectionId, one.url), await page(sectionId, two.url)]
    map(a).set('from a', 1)
    map(b).set('from b', 1)
    await until('both', () => map(a).get('from b') === 1 && map(b).get('from a') === 1)
    a.present({ picked: ['ground'] })
    await until('presence', () => b.peers.some((peer) => peer.picked?.[0] === 'ground'))
    const late = await page(sectionId, two.url)
    await until('somebody who joins later sees those on the other', () =>
      late.peers.some((peer) => peer.picked?.[0] === 'ground'),
    )
    a.close()
    await until('and sees them go', () => !late.peers.some((peer) => peer.picked?.[0] === 'ground'))
  })

  it('a storm from both sides converges', async () => {
    const sectionId = await practice.section()
    const pages = [await page(sectionId, one.url), await page(sectionId, two.url), await page(sectionId, one.url)]
    for (let i = 0; i < 60; i++) {
      for (const [n, p] of pages.entries()) map(p).set(`k${(i * 7 + n) % 20}`, `${n}.${i}`)
      if (i % 5 === 0) await until('some is stored', () => pages.some((p) => p.waiting === 0))
    }
    await until('all stored', () => pages.every((p) => p.state.kind === 'stored'))
    await until('all the same', () => same(...pages))
    const [first] = pages as [Page]
    expect((await loadDoc(db, sectionId))?.doc.getMap('m').toJSON()).toEqual(map(first).toJSON())
  })

  it('without Redis edits still pass, through the log', async () => {
    const sectionId = await practice.section()
    const [a, b] = [await page(sectionId, one.url), await page(sectionId, two.url)]
    redis.kill('SIGKILL')
    await once(redis, 'exit')
    map(a).set('without', 1)
    await until('it passes all the same', () => map(b).get('without') === 1)
    expect([...a.codes, ...b.codes]).toEqual([])
    await startRedis()
    map(b).set('with', 1)
    await until('and again with it', () => map(a).get('with') === 1)
  })

  it('one killed: its people vanish for the others, join the other sidecar, and nothing is lost', async () => {
    const sectionId = await practice.section()
    const b = await page(sectionId, two.url)
    let alive = true
    const moved = await page(sectionId, () => (alive ? one.url : two.url))
    const leaver = await page(sectionId, one.url)
    leaver.present({ picked: ['leaver'] })
    await until('seen', () => b.peers.some((peer) => peer.picked?.[0] === 'leaver'))
    for (let i = 0; i < 40; i++) map(moved).set(`m${i}`, i)
    await until('some has passed', () => map(b).size > 10)
    process.kill(one.pid, 'SIGKILL')
    leaver.close()
    alive = false
    for (let i = 40; i < 60; i++) map(moved).set(`m${i}`, i)
    await until('joined the other', () => moved.state.kind === 'stored', 15_000)
    await until('all is there', () => map(b).size === 60 && same(b, moved))
    expect((await loadDoc(db, sectionId))?.doc.getMap('m').size).toBe(60)
    await until('the dead one’s people are gone', () => !b.peers.some((peer) => peer.picked?.[0] === 'leaver'), 10_000)
  })
})
