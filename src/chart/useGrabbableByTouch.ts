import { type RefObject, useEffect } from 'react'

/**
 * Keeps the browser from scrolling with a finger that has a handle: `touch-action` on the handle alone is not
 * heeded everywhere, and a listener that may prevent must not be passive.
 */
export function useGrabbableByTouch(svg: RefObject<SVGSVGElement | null>): void {
  useEffect(() => {
    const drawing = svg.current
    if (drawing === null) return
    const touch = (event: TouchEvent) => {
      if (event.target instanceof Element && event.target.closest('[data-grab]') !== null) {
        event.preventDefault()
      }
    }
    drawing.addEventListener('touchstart', touch, { passive: false })
    return () => drawing.removeEventListener('touchstart', touch)
  }, [svg])
}
