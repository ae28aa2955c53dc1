import type { Design } from '../stage/design'
import type { Stage } from '../stage/stage'
import { lampUnder } from './conditions'
import { type LampDetails, typedDetails } from './lampDetails'
import type { LampRecord } from './lampRecord'

/** What is known of a design's lamp; `typedDetails` where nothing was said. */
export function detailsOf(design: { readonly lampDetails?: LampDetails | undefined }): LampDetails {
  return design.lampDetails ?? typedDetails
}

/** The stage as it works: what is to be solved and drawn. */
export type WorkingStage = {
  readonly stage: Stage
  /** What the conditions do to the lamp, for the verdict; empty where they are off. */
  readonly sentences: readonly string[]
  /** Why the conditions could not be applied; then the lamp is taken without them. */
  readonly fault: string | null
  /** Whether the characteristic is another than the one that was entered. */
  readonly shifted: boolean
}

/** The stage of a design with the lamp's base resistor in its lead and its conditions applied. */
export function workingStage(design: {
  readonly stage: Stage
  readonly lampDetails?: LampDetails | undefined
}): WorkingStage {
  const { stage } = design
  const { baseResistance, conditions } = detailsOf(design)
  const leadResistance = stage.leadResistance + baseResistance
  const based = baseResistance === 0 ? stage : { ...stage, leadResistance }
  if (!conditions.on) return { stage: based, sentences: [], fault: null, shifted: false }
  const under = lampUnder(stage.lamp, conditions)
  if (!under.ok) return { stage: based, sentences: [], fault: under.reason, shifted: false }
  return {
    stage: under.lamp === stage.lamp ? based : { ...based, lamp: under.lamp },
    sentences: under.sentences,
    fault: null,
    shifted: under.lamp.knots !== stage.lamp.knots,
  }
}

/** The lamp of a design as a record, to keep it apart from the design. */
export function recordOfDesign(design: Design): LampRecord {
  const details = detailsOf(design)
  const { knots, recoveryTime, strikeDelay } = design.stage.lamp
  return {
    name: design.lampName,
    note: details.note,
    origin: details.origin,
    knots,
    reverseKnots: details.otherWay,
    baseResistance: details.baseResistance,
    recoveryTime,
    strikeDelay,
    spread: details.spread,
    facts: details.facts,
    measured: details.measured,
  }
}

/** A design with another lamp in it; the conditions, which are not the lamp's, stay. */
export function designWithLamp(design: Design, record: LampRecord): Design {
  const { knots, recoveryTime, strikeDelay } = record
  return {
    ...design,
    lampName: record.name,
    stage: { ...design.stage, lamp: { knots, recoveryTime, strikeDelay } },
    lampDetails: {
      origin: record.origin,
      note: record.note,
      baseResistance: record.baseResistance,
      otherWay: record.reverseKnots,
      spread: record.spread,
      facts: record.facts,
      measured: record.measured,
      conditions: detailsOf(design).conditions,
    },
  }
}

/** The lamp turned round in its holder; the same design where it does not differ by polarity. */
export function lampTurned(design: Design): Design {
  const details = detailsOf(design)
  if (details.otherWay === null) return design
  const { stage } = design
  return {
    ...design,
    stage: { ...stage, lamp: { ...stage.lamp, knots: details.otherWay } },
    lampDetails: { ...details, otherWay: stage.lamp.knots },
  }
}
