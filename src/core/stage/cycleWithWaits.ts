import { branchesOf } from './branches'
import { type Cycle, cycleFrom } from './cycle'
import { noJitter } from './jitter'
import { follow, type Trail } from './motion'
import { paceOf } from './solveStage'
import { faultInStage, type Stage } from './stage'

/**
 * The cycle as it runs when the wait before each strike is what `wait` gives, s, asked once a strike, the
 * very first included. Null where the stage does not flash with these waits.
 *
 * @throws RangeError for a stage that `faultInStage` finds fault with.
 */
export function cycleWithWaits(stage: Stage, wait: () => number): Cycle | null {
  const fault = faultInStage(stage)
  if (fault !== null) throw new RangeError(fault)
  const path = branchesOf(stage.lamp.knots, stage.leadResistance)
  const trail: Trail = { phases: [], firstStrike: -1, cycleStart: -1 }
  const fate = follow(path, paceOf(stage, wait), trail)
  if (fate.kind !== 'cycle') return null
  return cycleFrom(stage, trail, (_, period) => noJitter(period))
}
