import { equivalentSource, formatQuantity, loadCurrent, loadLineOf } from '../core'
import { characteristicPoints, loadLinePoints } from './curves'
import { type Label, type PlacedLabel, placeLabels } from './labels'
import { edgeLines, type PlaneInput, type PlanePicture, slopeHandle } from './planePicture'

/** A label with what it belongs to, for its colour and weight. */
export type PlaneLabel = PlacedLabel & {
  readonly tone: 'lamp' | 'circuit' | 'plain' | 'edge'
}

const toneOf = (id: string): PlaneLabel['tone'] => {
  if (id.startsWith('edge')) return 'edge'
  if (id.startsWith('load')) return 'circuit'
  return id.startsWith('lamp') ? 'lamp' : 'plain'
}

/** Names for what is drawn on the plane, each beside its curve, none over another. */
export function planeLabels(input: PlaneInput, picture: PlanePicture): PlaneLabel[] {
  const { stage, solution, path, x, y } = input
  const [left, right] = x.range
  const [floor, top] = y.range
  const labels: Label[] = []
  const own = loadLineOf(stage)
  const source = equivalentSource(own)
  const visible = (at: number) => at >= left - 1 && at <= right + 1

  picture.marks.forEach((mark, index) => {
    if (!visible(mark.x)) return
    const current = formatQuantity(mark.current, 'A', 2)
    const what = mark.stable
      ? mark.lit
        ? `rests lit, ${current}`
        : `rests dark, ${current}`
      : 'no rest here'
    labels.push({
      id: `plain-mark-${index}`,
      text: what,
      places: around(mark.x, mark.y, 12),
      optional: !mark.stable,
    })
  })

  const knee = path.top[0]
  const valley = path.bottom[1]
  if (knee !== undefined && valley !== undefined) {
    const at = (knot: number) =>
      [x.place(path.current[knot] ?? 0), y.place(path.level[knot] ?? 0)] as const
    const [kneeX, kneeY] = at(knee)
    const [valleyX, valleyY] = at(valley)
    if (visible(kneeX)) {
      labels.push({
        id: 'lamp-knee',
        text: 'knee',
        places: around(kneeX, kneeY, 14),
        optional: true,
      })
    }
    if (visible(valleyX)) {
      labels.push({
        id: 'lamp-valley',
        text: 'valley',
        places: below(valleyX, valleyY),
        optional: true,
      })
    }
  }

  const handle = slopeHandle(own, x, y)
  labels.push({
    id: 'load-line',
    text: `load line, ${formatQuantity(stage.seriesResistance, 'Ω')}`,
    places: beside(handle.x, handle.y, 18, top, floor),
  })
  const openY = y.place(source.voltage)
  labels.push({
    id: 'load-supply',
    text: `supply ${formatQuantity(stage.supplyVoltage, 'V')}`,
    places: [
      { x: left + 18, y: openY - 9, anchor: 'start' },
      { x: left + 18, y: openY + 18, anchor: 'start' },
      ...[-26, -44, 36, 54].map((lift) => ({
        x: left + 18,
        y: openY + lift,
        anchor: 'start' as const,
      })),
    ],
  })

  const edges = edgeLines(stage, solution, own)
  const nearFloor = y.value(floor - 0.08 * (floor - top))
  const window = solution.window
  if (edges.dark !== null && window !== null) {
    const at = x.place(Math.max(0, loadCurrent(edges.dark, nearFloor)))
    labels.push({
      id: 'edge-dark',
      text: `dark above ${formatQuantity(window.max, 'Ω')}`,
      places: [28, 46, 64, 82, 100].flatMap((lift) => [
        { x: at - 8, y: floor - lift, anchor: 'end' as const },
        { x: at + 8, y: floor - lift, anchor: 'start' as const },
      ]),
      optional: true,
    })
  }
  if (edges.lit !== null && window !== null) {
    const at = x.place(Math.max(0, loadCurrent(edges.lit, nearFloor)))
    labels.push({
      id: 'edge-lit',
      text: `lit below ${formatQuantity(window.min, 'Ω')}`,
      places: [28, 46, 64, 82, 100].flatMap((lift) => [
        { x: at + 8, y: floor - lift, anchor: 'start' as const },
        { x: at - 8, y: floor - lift, anchor: 'end' as const },
      ]),
      optional: true,
    })
  }
  const region = regionLabel(input, edges)
  if (region !== null) labels.push(region)
  labels.push(lampLabel(input))

  const taken = [
    ...picture.marks.map((mark) => spot(mark.x, mark.y, 7)),
    spot(handle.x, handle.y, 12),
    spot(left, openY, 12),
    ...picture.jumps.map((jump) => ({
      left: Math.min(jump.from, jump.to),
      right: Math.max(jump.from, jump.to),
      top: jump.y - 5,
      bottom: jump.y + 5,
    })),
    ...alongCurves(input),
  ]
  const bounds = { left: left + 2, right: right - 2, top: top + 2, bottom: floor - 3 }
  return placeLabels(labels, bounds, taken).map((label) => ({ ...label, tone: toneOf(label.id) }))
}

const spot = (x: number, y: number, radius: number) => ({
  left: x - radius,
  right: x + radius,
  top: y - radius,
  bottom: y + radius,
})

/** Small spots along load line and characteristic, so that no name stands across them. */
function alongCurves({ path, kind, x, y, stage }: PlaneInput) {
  const spots: ReturnType<typeof spot>[] = []
  const step = 7
  for (const points of [
    characteristicPoints(path, kind, x.domain),
    loadLinePoints(loadLineOf(stage), kind, x.domain),
  ]) {
    const places = points.map(([current, voltage]) => [x.place(current), y.place(voltage)] as const)
    for (let k = 0; k + 1 < places.length; k++) {
      const [fromX, fromY] = places[k] ?? [0, 0]
      const [toX, toY] = places[k + 1] ?? [0, 0]
      const count = Math.min(200, Math.ceil(Math.hypot(toX - fromX, toY - fromY) / step))
      for (let n = 0; n < count; n++) {
        const part = n / count
        spots.push(spot(fromX + part * (toX - fromX), fromY + part * (toY - fromY), 3))
      }
    }
  }
  return spots
}

const around = (x: number, y: number, gap: number): Label['places'] => [
  { x: x + gap, y: y - gap + 4, anchor: 'start' },
  { x: x - gap, y: y - gap + 4, anchor: 'end' },
  { x, y: y - gap - 2, anchor: 'middle' },
  { x: x + gap, y: y + gap + 8, anchor: 'start' },
  { x: x - gap, y: y + gap + 8, anchor: 'end' },
  { x, y: y + gap + 12, anchor: 'middle' },
]

const below = (x: number, y: number): Label['places'] => [
  { x, y: y + 22, anchor: 'middle' },
  { x: x + 12, y: y + 18, anchor: 'start' },
  { x: x - 12, y: y + 18, anchor: 'end' },
  { x, y: y + 38, anchor: 'middle' },
]

const beside = (x: number, y: number, gap: number, top: number, floor: number): Label['places'] =>
  [4, -14, 22, -32, 40, -50, 58].flatMap((lift) => {
    const base = Math.max(top + 14, Math.min(floor - 6, y + lift))
    return [
      { x: x + gap, y: base, anchor: 'start' as const },
      { x: x - gap, y: base, anchor: 'end' as const },
    ]
  })

/** Named where the band between the edges is wide enough, a little above the floor. */
function regionLabel(
  { x, y }: PlaneInput,
  { lit, dark }: ReturnType<typeof edgeLines>,
): Label | null {
  if (dark === null) return null
  const [floor, top] = y.range
  const places: Label['places'][number][] = []
  for (const lift of [0.035, 0.1, 0.17, 0.24, 0.31]) {
    const at = floor - lift * (floor - top)
    const level = y.value(at)
    const from = Math.max(x.range[0], x.place(Math.max(0, loadCurrent(dark, level))))
    const to = lit === null ? x.range[1] : x.place(Math.max(0, loadCurrent(lit, level)))
    if (to - from > 110) places.push({ x: (from + to) / 2, y: at, anchor: 'middle' })
  }
  return { id: 'edge-region', text: 'flashes within', places, optional: true }
}

/** The characteristic's own name, on the glow branch; on a linear axis, where it goes instead. */
function lampLabel({ path, x, y, kind }: PlaneInput): Label {
  const last = path.current.length - 1
  const end = path.current[last] ?? 0
  const [left, right] = x.range
  const endX = x.place(end)
  if (endX > right) {
    const bottom = path.bottom.at(-1) ?? 0
    const levelAtEdge = y.place(path.level[bottom] ?? 0)
    const text = `glow branch, on to ${formatQuantity(end, 'A')} at ${formatQuantity(path.level[last] ?? 0, 'V')} →`
    return {
      id: 'lamp-name',
      text,
      places: Array.from({ length: 26 }, (_, k) => (k % 2 ? 16 + 9 * k : -10 - 9 * k)).map(
        (lift) => ({
          x: right - 6,
          y: levelAtEdge + lift,
          anchor: 'end' as const,
        }),
      ),
    }
  }
  const from = path.bottom.at(-1) ?? 0
  const middle = kind === 'linear' ? end / 2 : Math.sqrt((path.current[from] ?? 1e-9) * end)
  const at = Math.max(left, x.place(middle))
  return {
    id: 'lamp-name',
    text: 'lamp’s characteristic',
    places: [
      { x: Math.max(at, endX) - 8, y: y.place(path.level[last] ?? 0) - 12, anchor: 'end' },
      { x: endX + 10, y: y.place(path.level[last] ?? 0) + 4, anchor: 'start' },
      { x: endX, y: y.place(path.level[from] ?? 0) + 24, anchor: 'end' },
      { x: endX, y: y.place(path.level[from] ?? 0) + 44, anchor: 'end' },
    ],
    optional: true,
  }
}
