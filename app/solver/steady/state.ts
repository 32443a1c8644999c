/** How a node stands: free, held down at `upper`, or dry on the base with more asked of it than comes. */
export const STATE = { free: 0, upper: 1, dry: 2, held: 3 } as const

export type NetAnswer = {
  h: Float64Array
  /** Flow through each link at mid length, m²/d. */
  q: Float64Array
  state: Uint8Array
  /**
   * What a node's own balance leaves over, m²/d: at `upper` minus this is the seepage, at `dry` this is what is asked and does
   * not come, at `held` minus this is what the water takes.
   */
  rest: Float64Array
  converged: boolean
  iterations: number
  /** Pools that nothing holds, emptied: first and last node. */
  pools: { first: number; last: number }[]
}
