import { expect, type Page } from '@playwright/test'
import demo from '../../drizzle/seed/people.json' with { type: 'json' }

/** The demo's people, by what they are in their practice. */
export const people = Object.fromEntries(demo.people.map((person) => [person.role, person]))

/** Signs in by the form, as anybody would, and waits for the first page. */
export async function signIn(page: Page, email: string, password = demo.password) {
  await page.goto('/sign-in')
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password').fill(password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page).toHaveURL(/\/home$/)
}
