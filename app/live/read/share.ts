type Json = Record<string, unknown>
const isJson = (value: unknown): value is Json => typeof value === 'object' && value !== null && !Array.isArray(value)

/**
 * `fresh`, with every part that equals its counterpart in `old` replaced by that counterpart: what has not changed keeps its
 * identity, so that whatever is drawn or solved from it need not be made again. May change `fresh`, which must be nobody else's.
 */
export function share<T>(old: unknown, fresh: T): T {
  return shared(old, fresh) as T
}

function shared(old: unknown, fresh: unknown): unknown {
  if (Object.is(old, fresh)) return fresh
  if (Array.isArray(old) && Array.isArray(fresh)) {
    let equal = old.length === fresh.length
    for (let i = 0; i < fresh.length; i++) {
      fresh[i] = shared(old[i], fresh[i])
      if (!Object.is(fresh[i], old[i])) equal = false
    }
    return equal ? old : fresh
  }
  if (isJson(old) && isJson(fresh)) {
    const keys = Object.keys(fresh)
    let equal = keys.length === Object.keys(old).length
    for (const key of keys) {
      const before = Object.hasOwn(old, key) ? old[key] : undefined
      const value = shared(before, fresh[key])
      if (!Object.is(value, fresh[key])) fresh[key] = value
      if (!Object.hasOwn(old, key) || !Object.is(value, before)) equal = false
    }
    return equal ? old : fresh
  }
  return fresh
}
