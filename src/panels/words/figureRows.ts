import { formatQuantity, restFigures, type Solution, type Stage } from '../../core'

/** One figure: what it is called, its value, and what it means in a line. */
export type FigureRow = {
  readonly name: string
  readonly value: string
  readonly meaning: string
}

/** Figures that belong together. */
export type FigureGroup = { readonly title: string; readonly rows: readonly FigureRow[] }

const row = (name: string, value: string, meaning: string): FigureRow => ({ name, value, meaning })

/** The figures of a stage: of its cycle where it flashes, else of each rest it has. */
export function figureGroups(stage: Stage, solution: Solution): FigureGroup[] {
  return solution.cycle === null ? restGroups(stage, solution) : cycleGroups(stage, solution)
}

function cycleGroups(stage: Stage, solution: Solution): FigureGroup[] {
  const { cycle } = solution
  if (cycle === null) return []
  const q = formatQuantity
  const time = [
    row('Rate', q(cycle.frequency, 'Hz'), 'Flashes in a second: one over the period.'),
    row('Period', q(cycle.period, 's'), 'From one flash to the next: charging and flash together.'),
    row('Flash lasts', q(cycle.glowTime, 's'), 'Time in each cycle on the glow branch.'),
    row(
      'First flash after',
      q(cycle.firstStrike, 's'),
      'From switching on with the capacitor empty, the mean strike delay included.',
    ),
  ]
  if (stage.lamp.strikeDelay > 0) {
    time.push(
      row(
        'Jitter',
        q(cycle.periodDeviation, 's'),
        'Standard deviation of the period, from the random wait before each strike.',
      ),
      row(
        'Mean period',
        q(cycle.meanPeriod, 's'),
        'Mean over many random waits; the period above is the one at the mean wait.',
      ),
    )
  }
  const groups: FigureGroup[] = [
    { title: 'Time', rows: time },
    {
      title: 'Capacitor',
      rows: [
        row(
          'Highest',
          q(cycle.highVoltage, 'V'),
          'Voltage at which the lamp strikes, across the capacitor.',
        ),
        row(
          'Lowest',
          q(cycle.lowVoltage, 'V'),
          'Voltage at which it goes out, across the capacitor.',
        ),
        row(
          'Mean',
          q(cycle.meanVoltage, 'V'),
          'Mean over the cycle: what a slow meter that draws nothing would read.',
        ),
        row(
          'Least to recover',
          capacitanceText(solution.leastCapacitance),
          'Capacitance below which the lamp cannot recover between flashes and stays lit.',
        ),
      ],
    },
    {
      title: 'Lamp',
      rows: [
        row(
          'Peak current',
          q(cycle.peakLampCurrent, 'A'),
          'At the instant of strike: on the glow branch at strike voltage.',
        ),
        row(
          'Mean current',
          q(cycle.meanLampCurrent, 'A'),
          'Charge through the lamp in a cycle over its period.',
        ),
        row(
          'Rms current',
          q(cycle.rmsLampCurrent, 'A'),
          'Root mean square over the cycle: what heats a lead resistor.',
        ),
        row(
          'Charge a flash',
          q(cycle.flashCharge, 'C'),
          'Light is about proportional to it: compare flashes with each other.',
        ),
        row(
          'Energy a flash',
          q(cycle.flashEnergy, 'J'),
          'Taken by the lamp alone during the flash.',
        ),
        row('Mean power', q(cycle.meanLampPower, 'W'), 'In the lamp alone, over the whole cycle.'),
      ],
    },
    {
      title: 'Supply and resistors',
      rows: [
        row(
          'Mean supply current',
          q(cycle.meanSupplyCurrent, 'A'),
          'Drawn from the supply, mean over the cycle: what empties a battery.',
        ),
        row(
          'Supply power',
          q(cycle.meanSupplyPower, 'W'),
          'Supply voltage times mean supply current.',
        ),
        row(
          'Series resistor',
          q(cycle.meanSeriesPower, 'W'),
          'Mean power in the series resistor alone.',
        ),
        ...(stage.sourceResistance > 0
          ? [
              row(
                'In the supply',
                q(cycle.meanSourcePower, 'W'),
                'Mean power lost in the source resistance.',
              ),
            ]
          : []),
        ...(stage.leadResistance > 0
          ? [row('Lead resistor', q(cycle.meanLeadPower, 'W'), 'Mean power in the lead resistor.')]
          : []),
        ...(Number.isFinite(stage.leakageResistance)
          ? [row('Leakage', q(cycle.meanLeakagePower, 'W'), 'Mean power lost in the leakage.')]
          : []),
      ],
    },
  ]
  return groups
}

function capacitanceText(least: number | null): string {
  if (least === null) return '–'
  return least > 0 ? formatQuantity(least, 'F') : 'any'
}

function restGroups(stage: Stage, solution: Solution): FigureGroup[] {
  return solution.operatingPoints
    .filter((point) => point.stable)
    .map((point) => {
      const rest = restFigures(stage, point)
      const q = formatQuantity
      return {
        title: point.lit ? 'Resting lit' : 'Resting dark',
        rows: [
          row(
            'Lamp current',
            q(rest.lampCurrent, 'A'),
            'Where load line and characteristic cross.',
          ),
          row('Lamp voltage', q(rest.lampVoltage, 'V'), 'Across the lamp alone.'),
          row(
            'Capacitor voltage',
            q(rest.capacitorVoltage, 'V'),
            'Across lamp and lead resistor together.',
          ),
          row(
            'Supply current',
            q(rest.supplyCurrent, 'A'),
            'Drawn from the supply, leakage included.',
          ),
          row('Lamp power', q(rest.lampPower, 'W'), 'In the lamp alone.'),
          row('Series resistor', q(rest.seriesPower, 'W'), 'Power in the series resistor alone.'),
          row('Supply power', q(rest.supplyPower, 'W'), 'Supply voltage times supply current.'),
        ],
      }
    })
}
