/** Text with places it could stand, the best first. */
export type Label = {
  readonly id: string
  readonly text: string
  readonly places: readonly Place[]
  /** Left out where each of its places touches a curve; else only where each touches another name. */
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
 * and none of the `taken` rectangles; one that is not optional may touch the latter. Earlier labels matter more.
 */
export function placeLabels(
  labels: readonly Label[],
  bounds: Rectangle,
  taken: readonly Rectangle[] = [],
): PlacedLabel[] {
  const inside = (box: Rectangle) =>
    box.left >= bounds.left &&
    box.right <= bounds.right &&
    box.top >= bounds.top &&
    box.bottom <= bounds.bottom
  const names: Rectangle[] = []
  const placed: PlacedLabel[] = []
  for (const { id, text, places, optional } of labels) {
    const fitting = places.filter((place) => inside(labelBox(text, place)))
    const clearOf = (others: readonly Rectangle[]) => (place: Place) =>
      !others.some((other) => overlap(labelBox(text, place), other))
    const clear = fitting.filter(clearOf(names))
    // A name that must stand may cross a curve, never another name.
    const place = clear.find(clearOf(taken)) ?? (optional ? undefined : clear[0])
    if (place === undefined) continue
    names.push(labelBox(text, place))
    placed.push({ id, text, ...place })
  }
  return placed
}
