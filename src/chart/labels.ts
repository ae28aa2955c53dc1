/** Text with places it could stand, the best first. */
export type Label = {
  readonly id: string
  readonly text: string
  readonly places: readonly Place[]
  /** Left out when none of its places is free; else it takes the first regardless. */
  readonly optional?: boolean
}

/** Where text begins, ends or is centred, px; `y` is its base line. */
export type Place = {
  readonly x: number
  readonly y: number
  readonly anchor: 'start' | 'middle' | 'end'
}

/** A label that has found its place. */
export type PlacedLabel = { readonly id: string; readonly text: string } & Place

type Rectangle = {
  readonly left: number
  readonly right: number
  readonly top: number
  readonly bottom: number
}

const characterWidth = 6.1
const lineHeight = 15

/** Room a text of the chart's label size takes, px. */
export function labelBox(text: string, place: Place): Rectangle {
  const width = text.length * characterWidth
  const left =
    place.anchor === 'start'
      ? place.x
      : place.anchor === 'end'
        ? place.x - width
        : place.x - width / 2
  return { left, right: left + width, top: place.y - lineHeight + 3, bottom: place.y + 3 }
}

const overlap = (a: Rectangle, b: Rectangle) =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom

/**
 * Gives each label the first of its places that lies within `bounds` and touches no label placed before it
 * and none of the `taken` rectangles. Earlier labels matter more.
 */
export function placeLabels(
  labels: readonly Label[],
  bounds: Rectangle,
  taken: readonly Rectangle[] = [],
): PlacedLabel[] {
  const used: Rectangle[] = [...taken]
  const placed: PlacedLabel[] = []
  for (const { id, text, places, optional } of labels) {
    const inside = (box: Rectangle) =>
      box.left >= bounds.left &&
      box.right <= bounds.right &&
      box.top >= bounds.top &&
      box.bottom <= bounds.bottom
    const free = places.find((place) => {
      const box = labelBox(text, place)
      return inside(box) && !used.some((other) => overlap(box, other))
    })
    const place = free ?? (optional ? undefined : places.find((p) => inside(labelBox(text, p))))
    if (place === undefined) continue
    used.push(labelBox(text, place))
    placed.push({ id, text, ...place })
  }
  return placed
}
