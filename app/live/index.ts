export { LOCAL, SEED } from './origins'
export { applyEdits, liveOf, readLive } from './read'
export * from './types'
export { createLive, writeEdits, writeSection } from './write'
