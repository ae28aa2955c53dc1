/** A rectangle on the plate, px. */
export type Box = {
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
}

/** Where the drawings stand on the plate. */
export type PlateLayout = {
  readonly width: number
  readonly height: number
  /** Plane above trace, for narrow screens, where they cannot stand on one axis side by side. */
  readonly stacked: boolean
  readonly plane: Box
  readonly trace: Box
  /** Lamp current and light, on the trace's time axis. */
  readonly current: Box
}

const leftMargin = 54
const rightMargin = 20
const topMargin = 26

/** Lays the plate out for a width in px; below 680 px plane and trace are stacked. */
export function plateLayout(width: number): PlateLayout {
  const whole = Math.max(280, Math.floor(width))
  if (whole < 680) {
    const inner = whole - leftMargin - 10
    return {
      width: whole,
      height: 720,
      stacked: true,
      plane: { x: leftMargin, y: topMargin, width: inner, height: 290 },
      trace: { x: leftMargin, y: 392, width: inner, height: 180 },
      current: { x: leftMargin, y: 602, width: inner, height: 70 },
    }
  }
  const gap = 86
  const inner = whole - leftMargin - gap - rightMargin
  const planeWidth = Math.round(inner * 0.54)
  const height = whole < 900 ? 330 : 372
  const traceX = leftMargin + planeWidth + gap
  const trace = { x: traceX, y: topMargin, width: inner - planeWidth, height }
  return {
    width: whole,
    height: topMargin + height + (whole < 900 ? 196 : 164),
    stacked: false,
    plane: { x: leftMargin, y: topMargin, width: planeWidth, height },
    trace,
    current: {
      x: traceX,
      y: topMargin + height + 32,
      width: trace.width,
      height: whole < 900 ? 116 : 84,
    },
  }
}

/** Right edge of a box, px. */
export const rightOf = (box: Box): number => box.x + box.width

/** Lower edge of a box, px. */
export const bottomOf = (box: Box): number => box.y + box.height
