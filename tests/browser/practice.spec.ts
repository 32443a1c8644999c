import { expect, test } from '@playwright/test'
import { people, signIn } from './people'

test.describe('the practice’s pages without JavaScript', () => {
  test.use({ javaScriptEnabled: false })

  test('a refused title stays as typed, with what is wrong beside it; so does the role of a share', async ({
    page,
  }) => {
    await signIn(page, people.principal?.email ?? '')
    await page.goto('/sites')
    await page.getByRole('link', { name: 'Amble water meadows' }).click()
    const long = 'a'.repeat(201)
    await page.locator('tbody summary').first().click()
    const field = page.locator('tbody input[name="title"]').first()
    await field.fill(long)
    await page.locator('button[value="rename"]').first().click()
    await expect(field).toHaveValue(long)
    await expect(field).toHaveAccessibleDescription(/200/)

    await page.getByRole('link', { name: 'Details and sharing' }).click()
    await page.getByRole('radio', { name: 'editor' }).check()
    await page.getByLabel('E-mail').fill('nobody here')
    await page.getByRole('button', { name: 'Share the site' }).click()
    await expect(page.getByRole('radio', { name: 'editor' })).toBeChecked()
    await expect(page.getByLabel('E-mail')).toHaveValue('nobody here')
  })
})

test('a reader is offered no new site', async ({ page }) => {
  await signIn(page, people.reader?.email ?? '')
  await expect(page.getByRole('link', { name: 'All sites' })).toBeVisible()
  await expect(page.getByRole('link', { name: 'New site' })).toHaveCount(0)
})
