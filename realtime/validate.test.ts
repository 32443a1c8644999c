import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { LIMITS } from './limits'
import { readFrame, updateFrame } from './protocol'
import { countObjects, Measure } from './validate'

const random = (() => {
  let s = 12345
  return (n: number) => {
    s = (Math.imul(s, 1103515245) + 12345) & 0x7fffffff
    return s % n
  }
})()

function drawing(n = 20) {
  const doc = new Y.Doc()
  const map = doc.getMap<unknown>('m')
  for (let i = 0; i < n; i++) map.set(`o${i}`, new Y.Map([['x', i]]))
  map.delete('o3')
  map.set('plain', { a: 1 })
  return doc
}

describe('what is checked before an update touches a room', () => {
  it('counts shared types and plain objects that are not deleted', () => {
    expect(countObjects(drawing(20))).toBe(20)
  })

  it('refuses a document over its objects or bytes, and lets deletions through', () => {
    const doc = drawing(20)
    const measure = new Measure(doc, { objects: 25, document: 4_000 }, Y.encodeStateAsUpdate(doc).length)
    expect(measure.check(Y.encodeStateAsUpdate(drawing(3)))).toMatchObject({ ok: true })
    expect(measure.check(Y.encodeStateAsUpdate(drawing(9)))).toMatchObject({ ok: false, because: 'too-big' })
    const text = new Y.Doc()
    text.getMap('m').set('t', 'x'.repeat(4_000))
    expect(measure.check(Y.encodeStateAsUpdate(text))).toMatchObject({ ok: false, because: 'too-big' })
    const before = Y.encodeStateVector(doc)
    doc.getMap('m').clear()
    expect(measure.check(Y.encodeStateAsUpdate(doc, before))).toMatchObject({ ok: true, objects: 0 })
  })

  it('reads 20,000 spoilt frames to a verdict or an error; what passes never breaks a document half way', () => {
    const update = Y.encodeStateAsUpdate(drawing())
    const sound = updateFrame(update)
    const room = drawing()
    let [taken, hostile, malformed, thrown] = [0, 0, 0, 0]
    for (let i = 0; i < 20_000; i++) {
      const frame = sound.slice(0, random(4) ? sound.length : 1 + random(sound.length))
      for (let n = 1 + random(3); n > 0; n--) frame[random(frame.length)] = random(256)
      let message: ReturnType<typeof readFrame>
      try {
        message = readFrame(frame)
      } catch {
        malformed++
        continue
      }
      if (message.is !== 'update' && message.is !== 'step2') continue
      if (!new Measure(room, LIMITS, 0).check(message.update).ok) {
        hostile++
        continue
      }
      taken++
      try {
        Y.applyUpdate(room, message.update)
      } catch {
        thrown++
      }
      room.store.pendingStructs = null
      room.store.pendingDs = null
    }
    expect(malformed).toBeGreaterThan(100)
    expect(hostile).toBeGreaterThan(1_000)
    expect(taken).toBeGreaterThan(1_000)
    if (process.env.LIVE_LOG) console.log({ malformed, hostile, taken, thrown })
    // Still a document: it encodes, and what it encodes reads back the same.
    const copy = new Y.Doc()
    Y.applyUpdate(copy, Y.encodeStateAsUpdate(room))
    expect(copy.getMap('m').toJSON()).toEqual(room.getMap('m').toJSON())
    // The room is loaded anew when this happens; it should stay rare.
    expect(thrown).toBeLessThan(taken / 100)
  })
})
