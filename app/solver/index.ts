export { readAt } from './steady/read'
export { type SolveOptions, solveSteady } from './steady/solve'
export * from './types'
export { SOLVER_VERSION } from './version'
