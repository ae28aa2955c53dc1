import { equivalentSource, loadLineOf } from './loadLine'
import { effectiveCapacitance, type Stage } from './stage'

/**
 * Voltage above which a part that can be touched counts as hazardous live, V dc
 * [IEC 61010-1, 6.3.1; IEC 60598-1, 8.2.3, as quoted in secondary sources].
 */
export const touchVoltageLimit = 60

/** Stored charge above which touching a capacitor counts as hazardous, C [IEC 61010-1, 6.3.1; IEC 60335-1, 8.1.4]. */
export const touchChargeLimit = 45e-6

/** What a person must know before touching a stage. */
export type Caution =
  /** Some point carries `voltage` V, more than the limit. */
  | { readonly kind: 'voltage'; readonly voltage: number }
  /** The capacitor can hold `charge` C at `voltage` V, more than the limit. */
  | { readonly kind: 'charge'; readonly charge: number; readonly voltage: number }
  /** A dark lamp leaves up to `voltage` V on the capacitor. */
  | { readonly kind: 'dark is not discharged'; readonly voltage: number }

/**
 * The cautions a stage calls for. The capacitor is taken as charged to all that supply and leakage allow, as
 * it is once the lamp is out of its holder or fails to strike: the cautious side.
 */
export function cautionsFor(stage: Stage): Caution[] {
  const cautions: Caution[] = []
  const open = equivalentSource(loadLineOf(stage)).voltage
  const charge = effectiveCapacitance(stage) * open
  if (stage.supplyVoltage > touchVoltageLimit) {
    cautions.push({ kind: 'voltage', voltage: stage.supplyVoltage })
  }
  if (charge > touchChargeLimit) cautions.push({ kind: 'charge', charge, voltage: open })
  if (stage.capacitance > 0 && open > touchVoltageLimit) {
    cautions.push({ kind: 'dark is not discharged', voltage: open })
  }
  return cautions
}
