/** Origin of transactions that write this person's own edits; undo listens to it and to nothing else. */
export const LOCAL = Symbol('own edit')
/** Origin of the first state, written once by the server. */
export const SEED = Symbol('first state')
/** Client id under which the server writes a first state, the same for every section. */
export const SEED_CLIENT = 1
