import { z } from 'zod'

// Shapes of the account forms, for the server and, with JavaScript, already in the browser.

export const PASSWORD_MIN = 10
export const PASSWORD_MAX = 128

const email = z
  .string({ error: 'Enter your e-mail address.' })
  .trim()
  .max(200, 'That is too long for an e-mail address.')
  .pipe(z.email({ error: 'An e-mail address looks like name@office.example.' }))

const newPassword = z
  .string({ error: `Choose a password of at least ${PASSWORD_MIN} characters.` })
  .min(PASSWORD_MIN, `Use at least ${PASSWORD_MIN} characters; a few words in a row are easy to keep.`)
  .max(PASSWORD_MAX, `Use at most ${PASSWORD_MAX} characters.`)

export const signInForm = z.object({
  email,
  password: z.string({ error: 'Enter your password.' }).max(1000, 'That is too long for a password.'),
  redirectTo: z.string().optional(),
})

export const signUpForm = z.object({
  practice: z
    .string({ error: 'Name your practice, as it should stand on a drawing.' })
    .trim()
    .min(1, 'Name your practice, as it should stand on a drawing.')
    .max(120, 'Use at most 120 characters.'),
  name: z
    .string({ error: 'Enter your name, as it should stand in a title block.' })
    .trim()
    .min(1, 'Enter your name, as it should stand in a title block.')
    .max(120, 'Use at most 120 characters.'),
  email,
  password: newPassword,
  redirectTo: z.string().optional(),
})

export const forgotForm = z.object({ email })

export const resetForm = z.object({
  token: z.string({ error: 'This link is not whole. Open it again from the letter.' }),
  password: newPassword,
})
