import { z } from 'zod'

const line = (max: number) => z.string().trim().max(max, `Use at most ${max} characters.`).optional()

export const siteForm = z.object({
  name: z
    .string({ error: 'Give the site a name.' })
    .trim()
    .min(1, 'Give the site a name.')
    .max(200, 'Use at most 200 characters.'),
  number: line(60),
  place: line(200),
  client: line(200),
  note: line(5000),
})
export const sectionForm = z.object({
  title: z.string().trim().max(200, 'Use at most 200 characters.').optional(),
  start: z.string({ error: 'Choose what to start from.' }),
  json: z.string().max(4_000_000, 'The file is too large.').optional(),
})
export const linkForm = z.object({
  label: z
    .string({ error: 'Say whom the link is for.' })
    .trim()
    .min(1, 'Say whom the link is for.')
    .max(200, 'Use at most 200 characters.'),
  expires: z
    .string()
    .trim()
    .pipe(z.iso.date('Write the last day as a day of the calendar, such as 2027-03-31.'))
    .optional(),
})
export const shareForm = z.object({
  email: z
    .string({ error: 'Enter an e-mail address.' })
    .trim()
    .pipe(z.email({ error: 'An e-mail address looks like name@office.example.' })),
  role: z.enum(['editor', 'reader'], { error: 'Choose editor or reader.' }),
})
