type Json = Record<string, unknown>
const isJson = (value: unknown): value is Json => typeof value === 'object' && value !== null && !Array.isArray(value)

/**
 * `fresh`, with every part that equals its counterpart in `old` replaced by that counterpart: what has not changed keeps its
 * identity, so that whatever is drawn or solved from it need not be made again. Neither is changed.
 */
export function share<T>(old: unknown, fresh: T): T {
  return shared(old, fresh) as T
}

function shared(old: unknown, fresh: unknown): unknown {
  if (Object.is(old, fresh)) return fresh
  if (Array.isArray(old) && Array.isArray(fresh)) return sharedList(old, fresh)
  return isJson(old) && isJson(fresh) ? sharedObject(old, fresh) : fresh
}

function sharedList(old: unknown[], fresh: unknown[]): unknown[] {
  let equal = old.length === fresh.length
  let copy: unknown[] | null = null
  for (let i = 0; i < fresh.length; i++) {
    const part = shared(old[i], fresh[i])
    if (!Object.is(part, old[i]) || i >= old.length) equal = false
    if (!Object.is(part, fresh[i])) {
      copy ??= fresh.slice()
      copy[i] = part
    }
  }
  return equal ? old : (copy ?? fresh)
}

function sharedObject(old: Json, fresh: Json): Json {
  const keys = Object.keys(fresh)
  // Keys in another order are another object: what is read must be the same to the letter on every replica.
  const before = Object.keys(old)
  let equal = keys.length === before.length && keys.every((key, i) => key === before[i])
  let copy: Json | null = null
  for (const key of keys) {
    const known = Object.hasOwn(old, key)
    const part = shared(known ? old[key] : undefined, fresh[key])
    if (!known || !Object.is(part, old[key])) equal = false
    if (!Object.is(part, fresh[key])) {
      copy ??= { ...fresh }
      copy[key] = part
    }
  }
  return equal ? old : (copy ?? fresh)
}
