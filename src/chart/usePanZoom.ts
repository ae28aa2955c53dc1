import { type PointerEvent as ReactPointerEvent, type RefObject, useEffect, useRef } from 'react'
import { type Point, pointOn } from './useGrab'

/** What moving and pinching a background means. Points and distances in px. */
export type PanZoom = {
  readonly onPan: (by: Point) => void
  readonly onZoom: (factor: number, about: Point) => void
  /** A click or tap that did not move. */
  readonly onTap: (at: Point) => void
}

const slop = 4

/**
 * Pans a background by one pointer, zooms it by two, or by the wheel with Ctrl held (a bare wheel scrolls the
 * page), and reports taps.
 */
export function usePanZoom(
  svg: RefObject<SVGSVGElement | null>,
  background: RefObject<SVGRectElement | null>,
  handlers: PanZoom,
): {
  onPointerDown: (event: ReactPointerEvent<SVGRectElement>) => void
  onPointerMove: (event: ReactPointerEvent<SVGRectElement>) => void
  onPointerUp: (event: ReactPointerEvent<SVGRectElement>) => void
  onPointerCancel: (event: ReactPointerEvent<SVGRectElement>) => void
} {
  const latest = useRef(handlers)
  latest.current = handlers
  const pointers = useRef(new Map<number, Point>())
  const travelled = useRef(0)

  useEffect(() => {
    const rect = background.current
    if (rect === null) return
    const wheel = (event: WheelEvent) => {
      if (!(event.ctrlKey || event.metaKey) || svg.current === null) return
      event.preventDefault()
      const factor = Math.exp(-Math.max(-60, Math.min(60, event.deltaY)) * 0.006)
      latest.current.onZoom(factor, pointOn(svg.current, event))
    }
    rect.addEventListener('wheel', wheel, { passive: false })
    return () => rect.removeEventListener('wheel', wheel)
  }, [svg, background])

  const forget = (event: ReactPointerEvent<SVGRectElement>) => {
    pointers.current.delete(event.pointerId)
  }
  return {
    onPointerDown: (event) => {
      if (svg.current === null || event.button !== 0) return
      if (pointers.current.size === 0) travelled.current = 0
      pointers.current.set(event.pointerId, pointOn(svg.current, event))
      event.currentTarget.setPointerCapture(event.pointerId)
    },
    onPointerMove: (event) => {
      const before = pointers.current.get(event.pointerId)
      if (before === undefined || svg.current === null) return
      const now = pointOn(svg.current, event)
      const moved = { x: now.x - before.x, y: now.y - before.y }
      travelled.current += Math.hypot(moved.x, moved.y)
      const other = [...pointers.current].find(([id]) => id !== event.pointerId)?.[1]
      pointers.current.set(event.pointerId, now)
      if (other !== undefined) {
        const ratio =
          Math.hypot(now.x - other.x, now.y - other.y) /
          Math.max(1, Math.hypot(before.x - other.x, before.y - other.y))
        latest.current.onZoom(ratio, { x: (now.x + other.x) / 2, y: (now.y + other.y) / 2 })
      } else if (travelled.current > slop) {
        latest.current.onPan(moved)
      }
    },
    onPointerUp: (event) => {
      const known = pointers.current.has(event.pointerId)
      forget(event)
      if (known && travelled.current <= slop && svg.current !== null) {
        latest.current.onTap(pointOn(svg.current, event))
      }
    },
    onPointerCancel: forget,
  }
}
