import { customAlphabet } from 'nanoid'

const letters = customAlphabet('0123456789abcdefghjkmnpqrstuvwxyz', 7)

/** An id nobody else makes at the same time; its first letters tell what it is. No dots, for ids stand in paths. */
export const freshId = (prefix: string): string => `${prefix}${letters()}`
