import type { RefObject } from 'react'
import { look, useView } from '../state/viewStore'
import { speeds, speedWords } from './speeds'

/** Runs, stops and steps the marker, and says what time it is. */
export function PlayBar(props: {
  speed: number
  onStep: (way: 1 | -1) => void
  clock: RefObject<HTMLOutputElement | null>
}) {
  const running = useView((view) => view.running)
  const chosen = useView((view) => view.speed)
  return (
    <fieldset className="play-bar">
      <legend className="unseen">Marker</legend>
      <button
        type="button"
        className="button icon"
        aria-label="Step back to the corner before"
        onClick={() => props.onStep(-1)}
      >
        <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true">
          <path d="M10 2 4 7l6 5zM3 2v10" />
        </svg>
      </button>
      <button
        type="button"
        className="button icon"
        aria-label={running ? 'Stop the marker' : 'Run the marker'}
        onClick={() => look({ running: !running })}
      >
        <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true">
          <path d={running ? 'M4 2v10M10 2v10' : 'M4 2 11 7 4 12z'} />
        </svg>
      </button>
      <button
        type="button"
        className="button icon"
        aria-label="Step on to the next corner"
        onClick={() => props.onStep(1)}
      >
        <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true">
          <path d="M4 2l6 5-6 5zM11 2v10" />
        </svg>
      </button>
      <label>
        <span className="unseen">Speed of the marker</span>
        <select
          value={chosen === null ? 'auto' : String(chosen)}
          onChange={(event) => {
            const { value } = event.currentTarget
            look({ speed: value === 'auto' ? null : Number(value) })
          }}
        >
          <option value="auto">
            {chosen === null ? `auto: ${speedWords(props.speed)}` : 'auto'}
          </option>
          {speeds.map((speed) => (
            <option key={speed} value={String(speed)}>
              {speedWords(speed)}
            </option>
          ))}
        </select>
      </label>
      <output ref={props.clock} className="clock" aria-live="off" />
    </fieldset>
  )
}
