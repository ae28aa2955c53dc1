import { useMemo } from 'react'
import { type Overlay, overlayPaths } from './overlayPaths'
import type { PlaneInput } from './planePicture'

/** Readings as dots and the fit as a line, on the plane as the capacitor sees it. */
export function ReadingsDrawing({ input, overlay }: { input: PlaneInput; overlay: Overlay }) {
  const { dots, fit } = useMemo(() => overlayPaths(input, overlay), [input, overlay])
  return (
    <g clipPath="url(#plane-clip)" className="readings">
      <path className="reading-dots" d={dots} />
      <path className="fitted" d={fit} />
    </g>
  )
}
