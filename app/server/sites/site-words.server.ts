import { z } from 'zod'
import { AppError } from '../errors.server'

const line = (label: string, max: number) =>
  z.string().trim().max(max, `${label} can be at most ${max} characters long.`).default('')

const words = z.object({
  name: z.string().trim().min(1, 'Give the site a name.').max(200, 'The name can be at most 200 characters long.'),
  number: line('The number', 60),
  place: line('The place', 200),
  client: line('The client', 200),
  note: line('The note', 5000),
})

/** What can be typed about a site. */
export type SiteWords = { name: string; number?: string; place?: string; client?: string; note?: string }

/** The words trimmed and within bounds. @throws AppError invalid, naming what is wrong. */
export function readSiteWords(given: SiteWords): z.infer<typeof words> {
  const read = words.safeParse(given)
  if (!read.success) throw new AppError('invalid', read.error.issues.map((issue) => issue.message).join(' '))
  return read.data
}
