/**
 * What the tests use of odex. The package ships its TypeScript beside its JavaScript, and the
 * compiler would check that source by our rules if it were not told to read this instead.
 */

/** The derivatives y′ at x. */
export type Derivative = (x: number, y: readonly number[]) => number[]

/**
 * Called after every step from `from` to `to`. `at(component, x)` interpolates between them, and is
 * given only if `denseOutput` is on. Returning false ends the integration.
 */
export type Output = (
  step: number,
  from: number,
  to: number,
  y: readonly number[],
  at?: (component: number, x: number) => number,
) => boolean | undefined

export enum Outcome {
  Converged,
  MaxStepsExceeded,
  EarlyReturn,
}

export class Solver {
  constructor(dimension: number)
  absoluteTolerance: number | number[]
  relativeTolerance: number | number[]
  /** 0 = the length of the whole interval. */
  maxStepSize: number
  initialStepSize: number
  /** 10 000 unless set. */
  maxSteps: number
  denseOutput: boolean
  solve(
    derivative: Derivative,
    start: number,
    y: readonly number[],
    end: number,
    output?: Output,
  ): {
    readonly y: number[]
    readonly outcome: Outcome
    readonly nStep: number
    readonly xEnd: number
    readonly nAccept: number
    readonly nReject: number
    readonly nEval: number
  }
}
