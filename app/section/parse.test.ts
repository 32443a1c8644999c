import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  applyCase,
  casePaths,
  describePath,
  LIMITS,
  parseSection,
  type Section,
  STARTING_DRAWINGS,
  startingDrawing,
} from './index'

type Loose = Record<string, unknown>
/** A section spoilt in one place; typed loosely because that is the point. */
function spoilt(
  spoil: (section: Loose) => void,
  name: (typeof STARTING_DRAWINGS)[number]['name'] = 'lake-and-sea',
): unknown {
  const section: unknown = startingDrawing(name)
  spoil(section as Loose)
  return section
}
function errorsOf(input: unknown) {
  const result = parseSection(input)
  return result.ok ? [] : result.errors
}
const list = (section: Loose, name: string): Loose[] => section[name] as Loose[]
const first = (section: Loose, name: string): Loose => list(section, name)[0] as Loose
const setOn = (object: Loose, values: Record<string, unknown>) => void Object.assign(object, values)

describe('a section', () => {
  it.each(STARTING_DRAWINGS.map(({ name }) => name))('as a starting drawing passes: %s', (name) => {
    const section = startingDrawing(name)
    expect(parseSection(JSON.parse(JSON.stringify(section)))).toEqual({ ok: true, section })
  })

  it('as short as can be passes, with what is left out filled in', () => {
    const result = parseSection({
      format: 'doab.section',
      version: 1,
      ground: [
        [0, 5],
        [10, 5],
      ],
      base: [
        [0, 0],
        [10, 0],
      ],
      left: { kind: 'water', x: 0, stage: 3 },
      right: { kind: 'no-flow', x: 10 },
      materials: [{ id: 'sand', k: 1 }],
    })
    expect(result).toEqual({
      ok: true,
      section: {
        format: 'doab.section',
        version: 1,
        title: 'Untitled section',
        datum: 'm above site datum',
        ground: [
          [0, 5],
          [10, 5],
        ],
        base: [
          [0, 0],
          [10, 0],
        ],
        left: { kind: 'water', x: 0, stage: 3, conductance: null, bed: null },
        right: { kind: 'no-flow', x: 10 },
        materials: [{ id: 'sand', k: 1 }],
        host: 'sand',
        bodies: [],
        recharge: [],
        features: [],
        observations: [],
        limits: [],
        cases: [],
        sources: {},
        surfaceSeepage: true,
      },
    })
  })

  it('may name and annotate anything, close its outlines, and count from −0', () => {
    const result = parseSection(
      spoilt((s) => {
        setOn(s, { name: 'A', note: 'B' })
        for (const object of [
          s.left,
          s.right,
          first(s, 'materials'),
          first(s, 'bodies'),
          first(s, 'recharge'),
          first(s, 'features'),
          first(s, 'observations'),
          first(s, 'limits'),
          first(s, 'cases'),
        ])
          setOn(object as Loose, { name: 'A', note: 'B\nC' })
        const outline = first(s, 'bodies').outline as unknown[]
        outline.push([...(outline[0] as number[])])
        setOn(s.left as Loose, { x: -0 })
      }),
    )
    expect(result.ok && Object.is(result.section.left.x, 0)).toBe(true)
    expect(result.ok && result.section.bodies[0]?.outline).toEqual(startingDrawing('lake-and-sea').bodies[0]?.outline)
  })
})

describe('an error', () => {
  const cases: [what: string, spoil: (s: Loose) => void, path: string, message: RegExp, place?: object][] = [
    ['another format', (s) => setOn(s, { format: 'x' }), 'format', /doab\.section/],
    ['a newer version', (s) => setOn(s, { version: 2 }), 'version', /newer Doab/],
    ['an unknown field', (s) => setOn(s, { colour: 'red' }), 'colour', /no field/],
    [
      'an unknown field of an object',
      (s) => setOn(first(s, 'features'), { depth: 3 }),
      'features.seawall.depth',
      /“depth” is no field/,
      { x: 612 },
    ],
    ['a field of another kind of bank', (s) => setOn(s.right as Loose, { rate: 1 }), 'right.rate', /no field/],
    ['no ground', (s) => setOn(s, { ground: undefined }), 'ground', /list of vertices/],
    ['no bank', (s) => setOn(s, { left: undefined }), 'left', /left bank is missing/],
    [
      'a kind of bank that is none',
      (s) => setOn(s.left as Loose, { kind: 'sea' }),
      'left.kind',
      /water, no-flow, inflow/,
      { x: 0, z: 1.85 },
    ],
    [
      'a feature that is none',
      (s) => setOn(first(s, 'features'), { kind: 'well' }),
      'features.seawall.kind',
      /ditch, drain, trench, wall/,
      { x: 612 },
    ],
    ['NaN', (s) => setOn(s.left as Loose, { stage: Number.NaN }), 'left.stage', /must be a number in m/, { x: 0 }],
    [
      'Infinity',
      (s) => setOn(first(s, 'materials'), { k: Number.POSITIVE_INFINITY }),
      'materials.dune.k',
      /at most 100,000 m\/d; it is infinite/,
    ],
    [
      'a conductivity of nothing',
      (s) => setOn(first(s, 'materials'), { k: 0 }),
      'materials.dune.k',
      /at least 1e-12 m\/d/,
    ],
    [
      'a text for a number',
      (s) => setOn(first(s, 'materials'), { k: '5' }),
      'materials.dune.k',
      /must be a number in m\/d/,
    ],
    [
      'a missing number',
      (s) => setOn(first(s, 'recharge'), { rate: undefined }),
      'recharge.slack.rate',
      /missing/,
      { x: 0, to: 395 },
    ],
    ['recharge beyond sense', (s) => setOn(first(s, 'recharge'), { rate: 2 }), 'recharge.slack.rate', /at most 1 m\/d/],
    ['porosity of one', (s) => setOn(first(s, 'materials'), { porosity: 1 }), 'materials.dune.porosity', /less than 1/],
    [
      'a huge coordinate',
      (s) =>
        setOn(s, {
          ground: [
            [0, 2],
            [1e7, 3],
          ],
        }),
      'ground.1.0',
      /at most 1,000,000 m/,
      { x: 1e7, z: 3 },
    ],
    [
      'a vertex of three numbers',
      (s) =>
        setOn(s, {
          ground: [
            [0, 2, 1],
            [660, 3],
          ],
        }),
      'ground.0',
      /two numbers/,
      { x: 0, z: 2 },
    ],
    ['an id with a dot', (s) => setOn(first(s, 'materials'), { id: 'a.b' }), 'materials.a.b.id', /letters, digits/],
    [
      'an id twice',
      (s) => setOn(list(s, 'materials')[1] as Loose, { id: 'dune' }),
      'materials.dune',
      /Two of materials/,
    ],
    [
      'a date that is none',
      (s) => setOn(first(s, 'observations'), { date: '2026-02-30' }),
      'observations.w4.date',
      /2026-05-02/,
      { x: 500, z: 1.24 },
    ],
    ['an unprintable title', (s) => setOn(s, { title: 'a\u0000b' }), 'title', /cannot be printed/],
    ['a title without end', (s) => setOn(s, { title: 'x'.repeat(201) }), 'title', /at most 200 characters/],
    ['banks at one place', (s) => setOn(s.right as Loose, { x: 0 }), 'right.x', /right of the left/, { x: 0 }],
    [
      'a line that turns back',
      (s) =>
        setOn(s, {
          base: [
            [0, -14],
            [300, -15],
            [200, -16],
            [660, -18],
          ],
        }),
      'base.2',
      /from left to right/,
      { x: 200, z: -16 },
    ],
    [
      'a line that stops short',
      (s) =>
        setOn(s, {
          base: [
            [0, -14],
            [600, -18],
          ],
        }),
      'base.1',
      /must span the strip/,
      { x: 600, z: -18 },
    ],
    [
      'a base above the ground',
      (s) =>
        setOn(s, {
          base: [
            [0, -14],
            [300, 8],
            [660, -18],
          ],
        }),
      'base.1',
      /rises 5\.1 m above the ground/,
      { x: 300, z: 8 },
    ],
    [
      'a base along the ground',
      (s) =>
        setOn(s, {
          base: [
            [0, -14],
            [40, 3.1],
            [180, 3.4],
            [660, -18],
          ],
        }),
      'base.2',
      /run together|above/,
    ],
    [
      'an outline that crosses itself',
      (s) =>
        setOn(first(s, 'bodies'), {
          outline: [
            [0, 0],
            [9, 9],
            [9, 0],
            [0, 9],
          ],
        }),
      'bodies.bed.outline.0',
      /crosses or touches itself near x = 4\.5 m/,
      { x: 4.5, z: 4.5 },
    ],
    [
      'an outline of two',
      (s) =>
        setOn(first(s, 'bodies'), {
          outline: [
            [0, 0],
            [9, 9],
          ],
        }),
      'bodies.bed.outline',
      /three vertices/,
      { x: 0, z: 0 },
    ],
    [
      'an outline without area',
      (s) =>
        setOn(first(s, 'bodies'), {
          outline: [
            [0, 0],
            [9, 9],
            [18, 18],
          ],
        }),
      'bodies.bed.outline.2',
      /touches itself/,
    ],
    [
      'an unknown material',
      (s) => setOn(first(s, 'bodies'), { material: 'mud' }),
      'bodies.bed.material',
      /no material “mud”; known are dune, shelly, peat/,
    ],
    ['an unknown host', (s) => setOn(s, { host: 'mud' }), 'host', /no material “mud”/],
    [
      'a stage above the ground',
      (s) => setOn(s.left as Loose, { stage: 2.7 }),
      'left.stage',
      /above the ground at its bank \(2\.6 m\)/,
      { x: 0, z: 2.7 },
    ],
    [
      'a bed above the stage',
      (s) => setOn(s.left as Loose, { bed: 2.5 }),
      'left.bed',
      /above the stage/,
      { x: 0, z: 2.5 },
    ],
    [
      'a zone outside the strip',
      (s) => setOn(first(s, 'recharge'), { to: 700 }),
      'recharge.slack.to',
      /outside the strip/,
      { x: 0, to: 700 },
    ],
    [
      'a zone the wrong way round',
      (s) => setOn(first(s, 'recharge'), { from: 395, to: 0 }),
      'recharge.slack.to',
      /from left to right/,
    ],
    [
      'a feature at a bank',
      (s) => setOn(first(s, 'features'), { x: 660 }),
      'features.seawall.x',
      /at the right bank/,
      { x: 660 },
    ],
    [
      'a feature outside',
      (s) => setOn(first(s, 'features'), { x: 661 }),
      'features.seawall.x',
      /outside the strip/,
      { x: 661 },
    ],
    [
      'two features at one x',
      (s) => setOn(first(s, 'features'), { x: 360 }),
      'features.ditch.x',
      /at one x with the cut-off wall “seawall”/,
      { x: 360, z: 1.35 },
    ],
    [
      'a wall of no thickness',
      (s) => setOn(first(s, 'features'), { thickness: 0 }),
      'features.seawall.thickness',
      /more than 0 m/,
    ],
    ['an observation outside', (s) => setOn(first(s, 'observations'), { x: -1 }), 'observations.w4.x', /outside/],
    ['a limit the wrong way round', (s) => setOn(first(s, 'limits'), { from: 395 }), 'limits.hut.to', /left to right/],
    [
      'something switched off that is not there',
      (s) => setOn(first(s, 'cases'), { off: ['nobody'] }),
      'cases.surge.off.0',
      /nothing with the id “nobody”/,
    ],
    [
      'a value set nowhere',
      (s) => setOn(first(s, 'cases'), { set: { 'left.level': 3 } }),
      'cases.surge.set.left.level',
      /no “left\.level”/,
    ],
    [
      'a shape set in a case',
      (s) => setOn(first(s, 'cases'), { set: { 'left.x': 3 } }),
      'cases.surge.set.left.x',
      /common to all cases/,
      { x: 0, z: 1.85 },
    ],
    [
      'a case that contradicts the drawing',
      (s) => setOn(first(s, 'cases'), { set: { 'left.stage': 4 } }),
      'cases.surge.set.left.stage',
      /In the case “After a surge”: The stage/,
      { x: 0, z: 4 },
    ],
    [
      'a case that puts two features at one x',
      (s) => setOn(first(s, 'cases'), { set: { 'features.ditch.x': 612 } }),
      'cases.surge.set.features.ditch.x',
      /at one x/,
    ],
    [
      'a source for nothing',
      (s) => setOn(s, { sources: { 'materials.mud.k': 'x' } }),
      'sources.materials.mud.k',
      /no “materials\.mud\.k”/,
    ],
    [
      'too many of a list',
      (s) =>
        setOn(s, {
          recharge: Array.from({ length: LIMITS.list + 1 }, (_, i) => ({ id: `r${i}`, from: 0, to: 1, rate: 0 })),
        }),
      'recharge',
      /at most 2000|at most 2,000/,
    ],
  ]
  it.each(cases)('names the path, the mend and the place: %s', (_, spoil, path, message, place) => {
    const errors = errorsOf(spoilt(spoil))
    const error = errors.find((one) => one.path === path)
    expect(errors.map((one) => one.path)).toContain(path)
    expect(error?.message).toMatch(message)
    if (place) expect(error?.place).toEqual(place)
  })

  it('comes for whatever is no section at all', () => {
    const loop: Record<string, unknown> = { ...startingDrawing('empty') }
    loop.cases = [loop]
    const trap = new Proxy(
      {},
      {
        get() {
          throw new Error('trap')
        },
        ownKeys() {
          throw new Error('trap')
        },
      },
    )
    for (const input of [null, undefined, 3, 'x', [], {}, loop, trap, new Map(), () => 1]) {
      const errors = errorsOf(input)
      expect(errors.length).toBeGreaterThan(0)
      expect(errors[0]?.message.length).toBeGreaterThan(10)
    }
  })

  it('comes for fields named like an object’s own', () => {
    const hidden: unknown = JSON.parse(
      JSON.stringify(startingDrawing('empty')).replace('{', '{"__proto__":{"admin":true},'),
    )
    expect(errorsOf(hidden)).toMatchObject([{ path: '__proto__' }])
    expect(errorsOf(spoilt((s) => setOn(s, { constructor: 1 })))).toMatchObject([{ path: 'constructor' }])
    expect(errorsOf(spoilt((s) => setOn(first(s, 'materials'), { id: 'constructor' })))).toMatchObject([
      { message: expect.stringContaining('id') },
    ])
    expect(errorsOf(spoilt((s) => setOn(s, { sources: { constructor: 'x', 'left.toString': 'y' } })))).toHaveLength(2)
    expect(({} as Record<string, unknown>).admin).toBeUndefined()
  })

  it('always has a path and a sentence: 2,000 sections spoilt at random', () => {
    type Step = { at: number; junk: unknown; how: number }
    const junk = fc.oneof(
      fc.jsonValue({ maxDepth: 2 }),
      fc.constantFrom<unknown>(Number.NaN, Infinity, -0, undefined, 1e300, 'sand', '__proto__', []),
      fc.double(),
    )
    const step: fc.Arbitrary<Step> = fc.record({ at: fc.nat(), junk, how: fc.nat({ max: 4 }) })
    let refused = 0
    fc.assert(
      fc.property(
        fc.constantFrom(...STARTING_DRAWINGS.map(({ name }) => name)),
        fc.array(step, { minLength: 1, maxLength: 4 }),
        (name, steps) => {
          const section: unknown = startingDrawing(name)
          for (const one of steps) mutate(section, one.at, one.junk, one.how)
          const result = parseSection(section)
          if (result.ok) {
            expect(parseSection(JSON.parse(JSON.stringify(result.section)))).toEqual(result)
            return
          }
          refused++
          expect(result.errors.length).toBeGreaterThan(0)
          for (const { path, message, place } of result.errors) {
            expect(typeof path).toBe('string')
            expect(path.length).toBeGreaterThan(0)
            expect(message).toMatch(/^.{12,}[.!?]$/s)
            expect(message).not.toMatch(/undefined|NaN|\[object|Invalid input|expected/)
            if (place) expect(Number.isFinite(place.x)).toBe(true)
          }
        },
      ),
      { numRuns: 2000 },
    )
    expect(refused).toBeGreaterThan(1000)
  }, 60_000)
})

/** Changes one value somewhere in a JSON tree: replaced, removed, a field added, an entry doubled. */
function mutate(root: unknown, at: number, junk: unknown, how: number) {
  const spots: [holder: Record<string, unknown> | unknown[], key: string][] = []
  const walk = (value: unknown) => {
    if (typeof value !== 'object' || value === null) return
    for (const [key, inner] of Object.entries(value)) {
      spots.push([value as Record<string, unknown>, key])
      walk(inner)
    }
  }
  walk(root)
  const spot = spots[at % spots.length]
  if (!spot) return
  const [holder, key] = spot
  if (Array.isArray(holder)) {
    if (how === 1) holder.splice(Number(key), 1)
    else if (how === 2) holder.push(structuredClone(holder[Number(key)]))
    else holder[Number(key)] = junk
  } else if (how === 1) delete holder[key]
  else if (how === 2) holder[`${key}x`] = junk
  else if (how === 3 && typeof holder[key] === 'number') holder[key] = -holder[key] * 3
  else holder[key] = junk
}

describe('a case', () => {
  const section: Section = startingDrawing('two-ditches')

  it('changes values and leaves objects out, and nothing else', () => {
    const before = JSON.stringify(section)
    const undrained = applyCase(section, 'undrained')
    expect(undrained.features).toEqual([])
    expect(undrained.cases).toBe(section.cases)
    expect(undrained.ground).toBe(section.ground)
    expect(JSON.stringify(section)).toBe(before)
    expect(applyCase(section, null)).toBe(section)
    expect(applyCase(section, 'gone')).toBe(section)
    const surge = applyCase(startingDrawing('lake-and-sea'), 'surge')
    expect(surge.right).toMatchObject({ stage: 0.8, name: 'Sea, mean level' })
  })

  it('never reaches beyond the fields it may set', () => {
    const odd: Section = {
      ...section,
      cases: [
        {
          id: 'odd',
          off: [],
          set: { '__proto__.x': 1, 'left.x': 5, 'left.kind': 'inflow', 'ground.0': 3, constructor: 3 },
        },
      ],
    }
    expect(applyCase(odd, 'odd')).toEqual(odd)
  })

  it('knows what it may set, with names and kinds', () => {
    const paths = casePaths(section)
    expect(paths).toContainEqual({
      path: 'left.stage',
      label: 'left bank “North ditch” · stage',
      kind: 'elevation',
      value: 2.35,
    })
    expect(paths).toContainEqual({
      path: 'materials.sand.k',
      label: 'material “Fine sand” · conductivity',
      kind: 'conductivity',
      value: 2.2,
    })
    expect(paths.map(({ path }) => path)).not.toContain('left.x')
    expect(describePath(section, 'features.tile.level')).toBe('drain “Tile drain” · level')
    expect(describePath(section, 'bodies.topsoil')).toBe('body “Silt under the plough layer” · Sandy silt')
    expect(describePath(section, 'nowhere.at.all')).toBe('nowhere.at.all')
  })
})
