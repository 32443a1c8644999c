/** The parts of odex (Hairer and Wanner's extrapolation code) that the reference uses; the package ships its source only. */
declare module 'odex' {
  export class Solver {
    constructor(n: number)
    absoluteTolerance: number
    relativeTolerance: number
    maxSteps: number
    initialStepSize: number
    denseOutput: boolean
    solve(
      f: (x: number, y: number[]) => number[],
      x: number,
      y: number[],
      xEnd: number,
    ): { y: number[]; outcome: number }
  }
}
