import { AppError } from '../errors.server'

/** A title as it may stand on a drawing. @throws AppError invalid. */
export function readTitle(given: string): string {
  const title = given.trim()
  if (!title) throw new AppError('invalid', 'Give the section a title.')
  if (title.length > 200) throw new AppError('invalid', 'The title can be at most 200 characters long.')
  return title
}
