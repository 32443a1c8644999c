export const PER_PAGE = 20

/** A page that does not exist becomes the nearest that does. */
export function paged(total: number, page = 1): { total: number; pages: number; offset: number } {
  const pages = Math.max(1, Math.ceil(total / PER_PAGE))
  const wanted = Number.isFinite(page) ? Math.trunc(page) : 1
  return { total, pages, offset: (Math.min(Math.max(1, wanted), pages) - 1) * PER_PAGE }
}

/** A LIKE pattern that finds the words anywhere; what has a meaning in patterns is taken as it is written. */
export const pattern = (search: string) => `%${search.trim().replace(/[\\%_]/g, '\\$&')}%`
