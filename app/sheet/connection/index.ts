export { connect } from './connect'
export { clearLocal, waitingLocally } from './local-store'
export * from './types'
