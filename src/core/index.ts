export { type FormatOptions, formatParts, formatQuantity } from './quantity/formatQuantity'
export { type ParseOptions, parseQuantity } from './quantity/parseQuantity'
export {
  isPreferred,
  nearestPreferred,
  nextPreferred,
  preferredValues,
  type Series,
  tolerance,
} from './quantity/preferred'
export type { ParsedQuantity } from './quantity/readSize'
export { spokenQuantity } from './quantity/spokenQuantity'
export type { Unit } from './quantity/units'
export { type Branches, branchesOf } from './stage/branches'
export { type Caution, cautionsFor, touchChargeLimit, touchVoltageLimit } from './stage/cautions'
export type { Cycle } from './stage/cycle'
export { cycleWithWaits } from './stage/cycleWithWaits'
export type { Design } from './stage/design'
export { genericSmallLamp } from './stage/genericLamp'
export type { Jitter } from './stage/jitter'
export { faultInKnots, type Knot, kneeIndexOf, type Lamp, lampVoltageAt } from './stage/lamp'
export {
  equivalentSource,
  type LoadLine,
  loadCurrent,
  loadLineOf,
  resistanceThrough,
} from './stage/loadLine'
export type { OperatingPoint } from './stage/operatingPoints'
export type { Phase } from './stage/phase'
export type { Change, Reason, ReasonCode, Remedy } from './stage/reason'
export { type RestFigures, restFigures } from './stage/restFigures'
export { type Feed, type Moment, momentAt, sampleCycle, tracePhases } from './stage/sample'
export {
  type Solution,
  seriesResistanceThrough,
  solveStage,
  type Verdict,
} from './stage/solveStage'
export {
  defaultStrayCapacitance,
  effectiveCapacitance,
  faultInStage,
  feedResistance,
  type Stage,
} from './stage/stage'
export type { Window } from './stage/windows'
