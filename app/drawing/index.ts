export * from './plot'
export * from './scene'
