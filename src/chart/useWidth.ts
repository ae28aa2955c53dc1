import { type RefObject, useLayoutEffect, useState } from 'react'

/** Width of an element, px, kept up to date; `first` until it is known. */
export function useWidth(element: RefObject<HTMLElement | null>, first: number): number {
  const [width, setWidth] = useState(first)
  useLayoutEffect(() => {
    const watched = element.current
    if (watched === null) return
    setWidth(watched.clientWidth)
    const observer = new ResizeObserver(() => setWidth(watched.clientWidth))
    observer.observe(watched)
    return () => observer.disconnect()
  }, [element])
  return width
}
