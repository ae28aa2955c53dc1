import type { Ref } from 'react'

/** A small glow lamp: envelope, two wires, and the glow about the cathode, whose opacity the caller sets. */
export function LampGlyph({ glow, size }: { glow: Ref<SVGGElement>; size: number }) {
  return (
    <svg
      className="lamp-glyph"
      width={size}
      height={size}
      viewBox="-24 -24 48 48"
      aria-hidden="true"
    >
      <g ref={glow} className="lamp-glow" style={{ opacity: 0 }}>
        <circle r="23" fill="url(#lamp-halo)" />
        <rect x="-8.5" y="-11" width="9" height="19" rx="4.5" className="lamp-cathode-glow" />
      </g>
      <path
        className="lamp-envelope"
        d="M-10 9V-6.5C-10-12-5-15.5-1.6-16.6L0-19.5 1.6-16.6C5-15.5 10-12 10-6.5V9C10 12.500 7 13.500 5.500 13.500H-5.500C-7 13.500-10 12.500-10 9Z"
      />
      <path className="lamp-wire" d="M-4-8V22M4-8V22" />
      <defs>
        <radialGradient id="lamp-halo">
          <stop offset="0.2" className="halo-inner" />
          <stop offset="1" className="halo-outer" />
        </radialGradient>
      </defs>
    </svg>
  )
}
