export { type CatalogueEntry, catalogue, catalogueEntry } from './lamp/catalogue'
export { factsOf, recordOf } from './lamp/catalogueRecord'
export { type LampUnder, lampUnder } from './lamp/conditions'
export {
  type ConditionEffects,
  conditionSources,
  defaultEffects,
  faultInConditions,
  type LampConditions,
  noConditions,
} from './lamp/conditionsDefaults'
export {
  currentsFromSweep,
  type LeftOutRow,
  type SweepCurrents,
  type SweepReading,
} from './lamp/currentsFromSweep'
export { extendGlow } from './lamp/extendGlow'
export {
  type CharacteristicFit,
  type FitOptions,
  fitCharacteristic,
} from './lamp/fitCharacteristic'
export {
  fittingSweep,
  type KnotLimits,
  type SweepFit,
  type SweepProgress,
} from './lamp/fitSweep'
export { type LampDetails, typedDetails } from './lamp/lampDetails'
export {
  designWithLamp,
  detailsOf,
  lampTurned,
  recordOfDesign,
  type WorkingStage,
  workingStage,
} from './lamp/lampInDesign'
export {
  faultInLampRecord,
  knotsWithoutBase,
  type LampFact,
  type LampOrigin,
  type LampRecord,
  type LampSpread,
  lampOrigins,
  type PlainData,
  type Span,
} from './lamp/lampRecord'
export { lifeAtCurrent, peakOfAcRating } from './lamp/ratings'
export { recordWithFit } from './lamp/recordWithFit'
export { recordWithThresholds } from './lamp/recordWithThresholds'
export { type RecoveryFromRate, recoveryFromRate } from './lamp/recoveryFromRate'
export { type ReducedSweep, reduceSweep } from './lamp/reduceSweep'
export {
  type StrikeReading,
  type StrikeTests,
  type Surroundings,
  strikeTests,
} from './lamp/strikeTests'
export { delaySource } from './lamp/strikeTestsDelay'
export { type Sample, sampleSource } from './lamp/strikeTestsSample'
export type { CommonError, Direction, SweepPoint } from './lamp/sweepPoint'
export type { MeterPlace, SweepSetup } from './lamp/sweepSetup'
export { type RateThresholds, thresholdsFromRates } from './lamp/thresholdsFromRates'
export type { RateObservation, RateParts } from './lamp/thresholdsFromRatesModel'
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
