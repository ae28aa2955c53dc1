import type { OperatingPoint } from './operatingPoints'
import { feedResistance, type Stage } from './stage'

/** Currents and powers while a stage rests at an operating point. */
export type RestFigures = {
  /** A */
  readonly lampCurrent: number
  readonly supplyCurrent: number
  /** V */
  readonly lampVoltage: number
  readonly capacitorVoltage: number
  /** W: in the lamp alone, in the series resistor alone, drawn from the supply. */
  readonly lampPower: number
  readonly seriesPower: number
  readonly supplyPower: number
}

/** What flows and what gets warm at a rest. */
export function restFigures(stage: Stage, point: OperatingPoint): RestFigures {
  const supplyCurrent = (stage.supplyVoltage - point.capacitorVoltage) / feedResistance(stage)
  return {
    lampCurrent: point.current,
    supplyCurrent,
    lampVoltage: point.voltage,
    capacitorVoltage: point.capacitorVoltage,
    lampPower: point.current * point.voltage,
    seriesPower: supplyCurrent * supplyCurrent * stage.seriesResistance,
    supplyPower: supplyCurrent * stage.supplyVoltage,
  }
}
