import * as v from 'valibot'
import { faultInConditions } from '../../core'
import { lampSchema1 } from './lampFormat1Schema'

const finite = v.pipe(v.number(), v.finite())

const surrounding = v.object({ strikeRise: finite, delayGrowth: finite })

const conditions = v.pipe(
  v.object({
    on: v.boolean(),
    surroundings: v.picklist(['lit', 'dim', 'dark']),
    temperature: finite,
    timeOfUse: finite,
    effects: v.object({
      dim: surrounding,
      dark: surrounding,
      perKelvin: finite,
      referenceTemperature: finite,
      strikeAtEnd: finite,
      extinctionAtEnd: finite,
      life: finite,
    }),
  }),
  v.check((given) => faultInConditions(given) === null),
)

const { origin, note, baseResistance, reverseKnots, spread, facts, measured } = lampSchema1.entries

/** What format 2 knows of a lamp besides its characteristic; every field may be absent. Never changes. */
export const detailsFormat2 = v.partial(
  v.object({
    origin,
    note,
    baseResistance,
    otherWay: reverseKnots,
    spread,
    facts,
    measured,
    conditions,
  }),
)
