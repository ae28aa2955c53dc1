import { type Design, genericSmallLamp, type Stage } from '../../src/core'
import { linkFragment } from '../../src/io/link'

/** A stage that flashes two and a half times a second, changed in the parts given. */
export function stageWith(change: Partial<Stage>): Stage {
  return {
    supplyVoltage: 120,
    sourceResistance: 1600,
    seriesResistance: 2.2e6,
    capacitance: 0.47e-6,
    leakageResistance: Number.POSITIVE_INFINITY,
    leadResistance: 0,
    lamp: { knots: genericSmallLamp, recoveryTime: 0, strikeDelay: 0 },
    ...change,
  }
}

/** A design of that stage. */
export function designWith(change: Partial<Stage>, title = 'Porch blinker'): Design {
  return { title, note: '', lampName: 'Small lamp', stage: stageWith(change) }
}

/** Everything in it is other than what the page starts with. */
export const fullDesign: Design = {
  title: 'Weir gauge – north bank',
  note: 'Two stacks in the box; the spare lamp is taped to the lid.',
  lampName: 'Lamp no. 3 of the bag',
  stage: {
    supplyVoltage: 131.7,
    sourceResistance: 2350,
    seriesResistance: 3.3e6,
    capacitance: 6.8e-7,
    leakageResistance: 2.2e9,
    leadResistance: 1500,
    lamp: {
      knots: [
        { current: 0, voltage: 0 },
        { current: 3.1e-8, voltage: 61.3 },
        { current: 2.6e-7, voltage: 78.9 },
        { current: 7.7e-5, voltage: 54.2 },
        { current: 5.9e-4, voltage: 59.6 },
        { current: 0.0083, voltage: 81.4 },
      ],
      recoveryTime: 2.4e-4,
      strikeDelay: 0.0031,
    },
  },
}

/** What follows the page's address in a link to a design, "#" included. */
export function fragmentOf(design: Design): string {
  const link = linkFragment(design)
  if (!link.ok) throw new Error(link.message)
  return link.fragment
}
