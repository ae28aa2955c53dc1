import { useMemo } from 'react'
import { type Solution, type Stage, solveStage } from '../core'
import { useDesign } from '../state/useDesign'

/** The stage on the page and its solution. */
export function useSolution(): { stage: Stage; solution: Solution } {
  const stage = useDesign((state) => state.design.stage)
  const solution = useMemo(() => solveStage(stage), [stage])
  return { stage, solution }
}
