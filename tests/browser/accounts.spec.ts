import AxeBuilder from '@axe-core/playwright'
import { expect, test } from '@playwright/test'

const PASSWORD = 'seven herons standing'
const address = (name: string) => `${name}-${crypto.randomUUID().slice(0, 8)}@reed.example`

test.describe('accounts without JavaScript', () => {
  test.use({ javaScriptEnabled: false })

  test('a wrong form keeps what was typed and says what is wrong beside the field', async ({ page }) => {
    await page.goto('/sign-up')
    await page.getByLabel('Practice').fill('Reed & Sedge')
    await page.getByLabel('Your name').fill('Ada Reed')
    await page.getByLabel('E-mail').fill('ada at reed')
    await page.getByLabel('Password').fill('short')
    await page.getByRole('button', { name: 'Found the practice' }).click()
    await expect(page.getByLabel('Practice')).toHaveValue('Reed & Sedge')
    await expect(page.getByLabel('E-mail')).toHaveValue('ada at reed')
    await expect(page.getByLabel('E-mail')).toHaveAccessibleDescription(/name@office\.example/)
    await expect(page.getByLabel('E-mail')).toBeFocused()
    await expect(page.getByLabel('Password')).toHaveAccessibleDescription(/at least 10 characters/i)
    await expect(page.getByLabel('Password')).toHaveValue('')
  })

  test('somebody founds a practice, forgets the password and comes back by the letter', async ({ page }) => {
    const email = address('ada')
    await page.goto('/sign-up')
    await page.getByLabel('Practice').fill('Reed & Sedge')
    await page.getByLabel('Your name').fill('Ada Reed')
    await page.getByLabel('E-mail').fill(email)
    await page.getByLabel('Password').fill(PASSWORD)
    await page.getByRole('button', { name: 'Found the practice' }).click()
    await expect(page).toHaveURL('/home')

    await page.goto('/sign-out')
    await page.getByRole('button', { name: 'Sign out' }).click()
    await expect(page).toHaveURL('/sign-in')

    await page.getByRole('link', { name: /Forgotten/ }).click()
    await page.getByLabel('E-mail').fill(email)
    await page.getByRole('button', { name: 'Send the link' }).click()
    await expect(page.getByRole('heading', { name: 'Look in your mail' })).toBeVisible()

    await page.goto('/mailbox')
    await page
      .getByRole('link', { name: new RegExp(email) })
      .first()
      .click()
    const letter = (await page.getByTestId('letter-text').textContent()) ?? ''
    await page.goto(/\S+\/reset\?token=\S+/.exec(letter)?.[0] ?? 'no link in the letter')
    await page.getByLabel('New password').fill('an entirely new one')
    await page.getByRole('button', { name: 'Set the password' }).click()
    await expect(page.getByRole('status')).toContainText('new password is set')
    await page.getByLabel('E-mail').fill(email)
    await page.getByLabel('Password').fill('an entirely new one')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page).toHaveURL('/home')
  })
})

test('a wrong password gives one neutral message, keeps the e-mail and moves on to where one wanted', async ({
  page,
}) => {
  const email = address('bo')
  await page.goto('/sign-up')
  await page.getByLabel('Practice').fill('Sedge')
  await page.getByLabel('Your name').fill('Bo Sedge')
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password').fill(PASSWORD)
  await page.getByRole('button', { name: 'Found the practice' }).click()
  await expect(page).toHaveURL('/home')
  await page.context().clearCookies()

  await page.goto('/sites?q=weir')
  await expect(page).toHaveURL(/\/sign-in\?redirectTo=/)
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password').fill('not the password')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page.getByRole('alert')).toHaveText('E-mail and password do not match an account.')
  await expect(page.getByLabel('E-mail')).toHaveValue(email)
  await page.getByLabel('Password').fill(PASSWORD)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page).toHaveURL(/\/sites\?q=weir$/)
})

test('pages run under the content security policy without a complaint', async ({ page }) => {
  const complaints: string[] = []
  page.on('console', (message) => {
    if (message.type() === 'error') complaints.push(message.text())
  })
  page.on('pageerror', (error) => complaints.push(error.message))
  for (const path of ['/', '/sign-in', '/sign-up', '/forgot']) {
    const answer = await page.goto(path, { waitUntil: 'networkidle' })
    expect(answer?.headers()['content-security-policy']).toContain("frame-ancestors 'none'")
  }
  expect(complaints).toEqual([])
})

for (const colorScheme of ['light', 'dark'] as const)
  test(`pages for people who are not signed in are accessible and fit every width (${colorScheme})`, async ({
    browser,
  }) => {
    const context = await browser.newContext({ colorScheme })
    const page = await context.newPage()
    for (const path of ['/', '/sign-in', '/sign-up', '/forgot', '/reset', '/mailbox', '/nothing-here']) {
      await page.goto(path)
      const { violations } = await new AxeBuilder({ page }).analyze()
      expect(
        violations.map(({ id, nodes }) => `${path} ${id}: ${nodes.map((node) => node.target).join(', ')}`),
      ).toEqual([])
      for (const width of [1440, 1024, 390]) {
        await page.setViewportSize({ width, height: 844 })
        const over = await page.evaluate(
          () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
        )
        expect(over, `${path} at ${width}`).toBeLessThanOrEqual(0)
      }
    }
    await context.close()
  })
