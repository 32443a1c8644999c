/** Version of the solver's numbers: raised whenever an answer may change. Issued revisions keep it beside the solution. */
export const SOLVER_VERSION = '1.0.0'
