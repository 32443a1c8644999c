import { type Browser, type BrowserContext, expect, type Page, test } from '@playwright/test'
import { parseSection } from '../../app/section'
import { readAt, solveSteady } from '../../app/solver'
import { people, signIn } from './people'

// The four stories of the sheet, each in real browsers side by side.

type Spot = { x: number; z: number }
const canvasOf = (page: Page) => page.locator('.sheet-canvas')
const answerOf = (page: Page) => canvasOf(page).getAttribute('data-answer')

async function opened(browser: Browser, email: string | undefined): Promise<{ context: BrowserContext; page: Page }> {
  const context = await browser.newContext()
  const page = await context.newPage()
  if (email) await signIn(page, email)
  return { context, page }
}

/** Makes a site and a section from a starting drawing by the forms; gives the section's address. */
async function newSection(page: Page, title: string, start = 'River and canal'): Promise<string> {
  await page.goto('/sites/new')
  await page.getByLabel('Name').fill(`Story ${title}`)
  await page.getByRole('button', { name: 'Make the site' }).click()
  await page.getByRole('link', { name: 'New section' }).click()
  await page.getByRole('textbox', { name: 'Title' }).fill(title)
  await page.getByRole('radio', { name: start, exact: false }).first().check({ force: true })
  await page.getByRole('button', { name: 'Make the section' }).click()
  await expect(page).toHaveURL(/:\d+\/sections\/[\w-]+$/)
  return new URL(page.url()).pathname
}

async function ready(page: Page, path: string) {
  if (new URL(page.url()).pathname !== path) await page.goto(path)
  await expect(canvasOf(page)).toHaveAttribute('data-ready', 'true')
  await expect(page.locator('.stored-light')).toContainText(/stored|live/)
}

async function pixels(page: Page, { x, z }: Spot) {
  const [ax = 0, bx = 1, ay = 0, by = 1] = ((await canvasOf(page).getAttribute('data-scales')) ?? '')
    .split(' ')
    .map(Number)
  const box = await canvasOf(page).boundingBox()
  if (!box) throw new Error('no canvas')
  return { x: box.x + ax + bx * x, y: box.y + ay + by * z }
}
async function drag(page: Page, from: Spot, dx: number, dy: number) {
  const at = await pixels(page, from)
  await page.mouse.move(at.x, at.y)
  await page.mouse.down()
  await page.mouse.move(at.x + dx / 2, at.y + dy / 2, { steps: 4 })
  await page.mouse.move(at.x + dx, at.y + dy, { steps: 4 })
  await page.mouse.up()
}
const sectionOf = async (page: Page, path: string) => {
  const reply = await page.request.get(`/api${path}/section.json`)
  expect(reply.status()).toBe(200)
  const read = parseSection(await reply.json())
  if (!read.ok) throw new Error(JSON.stringify(read.errors))
  return read.section
}
const stages = async (page: Page, path: string) => {
  const { left, right } = await sectionOf(page, path)
  return { left: left.kind === 'water' ? left.stage : null, right: right.kind === 'water' ? right.stage : null }
}

test('two engineers draw one strip: the same water table on both sheets, each undoes their own', async ({
  browser,
}) => {
  const ines = await opened(browser, people.principal?.email)
  const path = await newSection(ines.page, 'Two hands')
  const tom = await opened(browser, people.engineer?.email)
  await ready(ines.page, path)
  await ready(tom.page, path)
  const section = await sectionOf(ines.page, path)
  const before = await stages(ines.page, path)
  const length = section.right.x - section.left.x
  const first = await answerOf(ines.page)

  await drag(ines.page, { x: section.right.x + length * 0.03, z: before.right ?? 0 }, 0, 18)
  await expect.poll(() => answerOf(ines.page)).not.toBe(first)
  const lowered = await answerOf(ines.page)
  await expect.poll(() => answerOf(tom.page)).toBe(lowered)

  await drag(tom.page, { x: section.left.x - length * 0.03, z: before.left ?? 0 }, 0, 12)
  await expect.poll(() => answerOf(tom.page)).not.toBe(lowered)
  const both = await answerOf(tom.page)
  await expect.poll(() => answerOf(ines.page)).toBe(both)
  await expect.poll(async () => (await stages(ines.page, path)).left).not.toBe(before.left)
  const drawn = await stages(ines.page, path)
  expect(drawn.right).not.toBe(before.right)

  await canvasOf(ines.page).focus()
  await ines.page.keyboard.press('Control+z')
  await expect.poll(() => stages(ines.page, path)).toEqual({ left: drawn.left, right: before.right })
  await canvasOf(tom.page).focus()
  await tom.page.keyboard.press('Control+z')
  await expect.poll(() => stages(ines.page, path)).toEqual(before)
  await expect.poll(() => answerOf(tom.page)).toBe(first)
  await ines.context.close()
  await tom.context.close()
})

test('a consultant switches cases and pens a note while a colleague watches', async ({ browser }) => {
  const ines = await opened(browser, people.principal?.email)
  const path = await newSection(ines.page, 'Client meeting')
  const jon = await opened(browser, people.reader?.email)
  await ready(ines.page, path)
  await ready(jon.page, path)
  const drawn = await answerOf(jon.page)
  await ines.page
    .getByRole('tab', { name: 'Wet spring' })
    .or(ines.page.getByRole('button', { name: 'Wet spring' }))
    .first()
    .click()
  await expect.poll(() => answerOf(ines.page)).not.toBe(drawn)
  // The one who watches keeps their own case, and sees the pen.
  expect(await answerOf(jon.page)).toBe(drawn)
  await ines.page.locator('button[data-tool="pen"]').click()
  const section = await sectionOf(ines.page, path)
  await drag(ines.page, { x: section.left.x + (section.right.x - section.left.x) * 0.4, z: 6 }, 120, 30)
  await expect.poll(() => canvasOf(ines.page).getAttribute('data-marks')).toBe('1')
  await expect.poll(() => canvasOf(jon.page).getAttribute('data-marks')).toBe('1')
  // A reader has no tool that draws on the model.
  await expect(jon.page.locator('button[data-tool="ground"]')).toHaveCount(0)
  await ines.context.close()
  await jon.context.close()
})

test('a client reads by a link: live, true to scale, nothing to change; the owner revokes it while it is open', async ({
  browser,
}) => {
  const ines = await opened(browser, people.principal?.email)
  const path = await newSection(ines.page, 'For the client')
  await ines.page.goto(`${path}/links`)
  await ines.page.getByLabel('For whom').fill('Client')
  await ines.page.getByRole('button', { name: 'Make the link' }).click()
  const address = await ines.page.getByLabel('New link').inputValue()
  const shared = new URL(address).pathname
  const token = shared.split('/').pop() ?? ''

  const client = await opened(browser, undefined)
  await client.page.goto(shared)
  await expect(canvasOf(client.page)).toHaveAttribute('data-ready', 'true')
  await expect(client.page.locator('.stored-light')).toContainText('live')

  // The sheet as SVG: its water table against the solver, to the rounding of the file.
  const reply = await client.page.request.get(`/api${path}/sheet.svg?link=${token}`)
  expect(reply.status()).toBe(200)
  expect(reply.headers()['content-type']).toContain('image/svg+xml')
  const svg = await reply.text()
  expect(svg).not.toMatch(/<script|href="http/)
  const section = await sectionOf(ines.page, path)
  const solution = solveSteady(section)
  const d =
    /data-of="result\.water-table"[^>]* d="([^"]+)"/.exec(svg)?.[1] ??
    /d="([^"]+)"[^>]*data-of="result\.water-table"/.exec(svg)?.[1] ??
    ''
  const points = [...d.matchAll(/[ML](-?[\d.]+)[ ,](-?[\d.]+)/g)].map(([, x, y]) => [Number(x), Number(y)] as const)
  expect(points.length).toBeGreaterThan(50)
  const scale = Number(/1:(\d+)/.exec(svg)?.[1])
  const exaggeration = Number(/VE ([\d.]+)/.exec(svg)?.[1])
  const [x0, y0] = points[0] ?? [0, 0]
  const start = readAt(solution, section.left.x).head
  for (const [x, y] of points) {
    const at = section.left.x + ((x - x0) * scale) / 1000
    const head = start - ((y - y0) * scale) / 1000 / exaggeration
    expect(Math.abs(head - readAt(solution, at).head)).toBeLessThan(((0.02 * scale) / 1000 / exaggeration) * 2 + 1e-6)
  }

  // Every door: no tools, a ticket that only reads, no page of the office, no file without the link.
  await expect(client.page.locator('button[data-tool="ground"]')).toHaveCount(0)
  const ticket = await client.page.request.post('/api/live-ticket', {
    data: { token },
    headers: { origin: new URL(address).origin },
  })
  expect(await ticket.json()).toMatchObject({ may: 'read' })
  expect(
    (await client.page.request.post('/api/live-ticket', { data: { sectionId: path.split('/').pop() } })).status(),
  ).not.toBe(200)
  expect((await client.page.request.get(`/api${path}/section.json`)).status()).toBe(401)
  expect(
    (await client.page.request.post(`/api${path}/section.json?link=${token}`, { data: {} })).status(),
  ).toBeGreaterThanOrEqual(400)
  await client.page.goto(`${path}/links`)
  await expect(client.page).toHaveURL(/sign-in/)
  await client.page.goto(shared)
  await expect(client.page.locator('.stored-light')).toContainText('live')

  await ines.page.goto(`${path}/links`)
  await ines.page.locator('summary', { hasText: 'Revoke …' }).click()
  await ines.page.locator('button[value="revoke"]').click()
  await expect(client.page.locator('.sheet-canvas')).toHaveCount(0, { timeout: 4000 })
  expect((await client.page.request.get(`/api${path}/sheet.svg?link=${token}`)).status()).toBeGreaterThanOrEqual(400)
  expect((await client.page.goto(shared))?.status()).toBeGreaterThanOrEqual(400)
  await ines.context.close()
  await client.context.close()
})
