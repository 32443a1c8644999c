import { customAlphabet } from 'nanoid'

const tail = customAlphabet('abcdefghijkmnpqrstuvwxyz23456789', 6)

/**
 * A short id for a new object. Two people may add at the same moment, so it carries a random tail besides what it stands for;
 * it is a valid path segment (letters, digits, hyphen).
 */
export function freshId(stem: string, taken: readonly { id: string }[]): string {
  const used = new Set(taken.map(({ id }) => id))
  for (;;) {
    const id = `${stem}-${tail()}`
    if (!used.has(id)) return id
  }
}

/** A key for a new vertex. */
export const freshKey = (): string => `v${tail()}${tail()}`
