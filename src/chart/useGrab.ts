import { type PointerEvent as ReactPointerEvent, useCallback, useEffect, useRef } from 'react'

/** What a drag reports. Points are px in the coordinates of the drawing. */
export type Grab = {
  readonly onStart: (at: Point) => void
  readonly onMove: (at: Point) => void
  readonly onEnd: () => void
  /** Escape, lost capture, or the drawing going away: all as it was. */
  readonly onCancel: () => void
}

/** A place on the drawing, px. */
export type Point = { readonly x: number; readonly y: number }

/** Place of a pointer on the SVG drawing it is over, px. */
export function pointOn(svg: SVGSVGElement, event: { clientX: number; clientY: number }): Point {
  const box = svg.getBoundingClientRect()
  return { x: event.clientX - box.left, y: event.clientY - box.top }
}

/**
 * Dragging by mouse, pen or finger with one teardown for every way it can end. Moves are coalesced to one a
 * frame.
 */
export function useGrab(): (
  event: ReactPointerEvent<SVGElement>,
  svg: SVGSVGElement | null,
  grab: Grab,
) => void {
  const finish = useRef<((cancelled: boolean) => void) | null>(null)
  useEffect(() => () => finish.current?.(true), [])

  return useCallback((event, svg, grab) => {
    if (svg === null || event.button !== 0 || finish.current !== null) return
    const target = event.currentTarget
    const pointer = event.pointerId
    let frame = 0
    let waiting: Point | null = null
    const flush = () => {
      frame = 0
      if (waiting !== null) grab.onMove(waiting)
      waiting = null
    }
    const move = (moved: PointerEvent) => {
      if (moved.pointerId !== pointer) return
      waiting = pointOn(svg, moved)
      if (frame === 0) frame = requestAnimationFrame(flush)
    }
    const end = (cancelled: boolean) => {
      if (finish.current === null) return
      finish.current = null
      cancelAnimationFrame(frame)
      if (!cancelled && waiting !== null) grab.onMove(waiting)
      target.removeEventListener('pointermove', move)
      target.removeEventListener('pointerup', up)
      target.removeEventListener('pointercancel', cancel)
      target.removeEventListener('lostpointercapture', cancel)
      window.removeEventListener('keydown', leave, true)
      if (target.hasPointerCapture(pointer)) target.releasePointerCapture(pointer)
      if (cancelled) grab.onCancel()
      else grab.onEnd()
    }
    const up = (released: PointerEvent) => {
      if (released.pointerId === pointer) end(false)
    }
    const cancel = () => end(true)
    const leave = (key: KeyboardEvent) => {
      if (key.key !== 'Escape') return
      key.stopPropagation()
      end(true)
    }
    finish.current = end
    target.setPointerCapture(pointer)
    target.addEventListener('pointermove', move)
    target.addEventListener('pointerup', up)
    target.addEventListener('pointercancel', cancel)
    target.addEventListener('lostpointercapture', cancel)
    window.addEventListener('keydown', leave, true)
    grab.onStart(pointOn(svg, event))
  }, [])
}
