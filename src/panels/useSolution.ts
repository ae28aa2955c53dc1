import { useMemo } from 'react'
import { type Solution, solveStage, type WorkingStage, workingStage } from '../core'
import { useDesign } from '../state/useDesign'

/** The stage on the page as it works, base resistor and conditions included, and its solution. */
export function useSolution(): WorkingStage & { readonly solution: Solution } {
  const stage = useDesign((state) => state.design.stage)
  const lampDetails = useDesign((state) => state.design.lampDetails)
  const working = useMemo(() => workingStage({ stage, lampDetails }), [stage, lampDetails])
  const solution = useMemo(() => solveStage(working.stage), [working.stage])
  return { ...working, solution }
}
