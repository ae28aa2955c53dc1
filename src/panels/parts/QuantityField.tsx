import { type KeyboardEvent, type ReactNode, useEffect, useId, useRef, useState } from 'react'
import { formatQuantity, parseQuantity, type Unit } from '../../core'
import { designStore } from '../../state/useDesign'

/** A number with a unit to type, echoed as understood, stepped by keys and buttons. */
export function QuantityField(props: {
  label: string
  unit: Unit
  value: number
  onValue: (value: number) => void
  /** What an empty field and "none" mean, and the word shown for it. */
  none?: { readonly value: number; readonly word: string } | undefined
  min?: number | undefined
  max?: number | undefined
  /** One line that says what it is. */
  hint?: ReactNode
  /** The value one step on; without it there are no step buttons. */
  step?: ((direction: 'up' | 'down', coarse: boolean) => number) | undefined
  part?: string | undefined
  /** The label is there for screen readers only. */
  quiet?: boolean | undefined
  /** Not part of the design: nothing to undo. */
  apart?: boolean | undefined
}) {
  const { label, unit, value, onValue, none, min, max, hint, step, part, quiet } = props
  const id = useId()
  const [draft, setDraft] = useState<string | null>(null)
  const focused = useRef(false)
  const shown =
    none !== undefined && value === none.value ? none.word : formatQuantity(value, unit, 6)
  const options = {
    ...(min === undefined ? {} : { min }),
    ...(max === undefined ? {} : { max }),
    ...(none === undefined ? {} : { none: none.value }),
  }
  const read = draft === null ? null : parseQuantity(draft, unit, options)

  // A design opened or undone elsewhere replaces what was being typed, unless it is being typed now.
  // biome-ignore lint/correctness/useExhaustiveDependencies: only a new value matters
  useEffect(() => {
    if (!focused.current) setDraft(null)
  }, [value])

  const type = (text: string) => {
    setDraft(text)
    const typed = parseQuantity(text, unit, options)
    const { dragging, beginDrag, cancelDrag } = designStore.getState()
    if (!typed.ok) {
      // What was read of it so far was never meant: back to what was there before.
      if (!props.apart && dragging) cancelDrag()
      return
    }
    if (!props.apart && !dragging) beginDrag()
    onValue(typed.value)
  }
  const settle = () => {
    if (draft === null) return
    if (!props.apart) designStore.getState().endDrag()
    // What could not be read stays on screen, with the reason.
    if (read?.ok) setDraft(null)
  }
  const press = (event: KeyboardEvent<HTMLInputElement>) => {
    if (event.key === 'Enter') settle()
    if (event.key === 'Escape' && draft !== null) {
      event.stopPropagation()
      if (!props.apart) designStore.getState().cancelDrag()
      setDraft(null)
    }
    const up = event.key === 'ArrowUp' || event.key === 'PageUp'
    const down = event.key === 'ArrowDown' || event.key === 'PageDown'
    if (step !== undefined && (up || down)) {
      event.preventDefault()
      settle()
      setDraft(null)
      onValue(step(up ? 'up' : 'down', event.key.startsWith('Page') || event.shiftKey))
    }
  }
  const echo =
    read === null
      ? null
      : read.ok
        ? `= ${none !== undefined && read.value === none.value ? none.word : formatQuantity(read.value, unit, 6)}${read.note ? `. ${read.note}` : ''}`
        : read.message
  const wrong = read !== null && !read.ok

  return (
    <div className={`field ${wrong ? 'wrong' : ''} ${quiet ? 'quiet' : ''}`}>
      <label htmlFor={id}>{label}</label>
      <div className="field-row">
        <input
          id={id}
          type="text"
          inputMode="decimal"
          autoComplete="off"
          spellCheck={false}
          data-part={part}
          data-typing={draft !== null || undefined}
          aria-invalid={wrong || undefined}
          aria-describedby={`${id}-hint`}
          value={draft ?? shown}
          onFocus={(event) => {
            focused.current = true
            event.currentTarget.select()
          }}
          onBlur={() => {
            focused.current = false
            settle()
          }}
          onChange={(event) => type(event.currentTarget.value)}
          onKeyDown={press}
        />
        {step !== undefined && (
          <span className="steps">
            <button
              type="button"
              aria-label={`${label}: step up`}
              onClick={() => onValue(step('up', false))}
            >
              <Chevron up />
            </button>
            <button
              type="button"
              aria-label={`${label}: step down`}
              onClick={() => onValue(step('down', false))}
            >
              <Chevron />
            </button>
          </span>
        )}
      </div>
      <p className="hint" id={`${id}-hint`} aria-live={echo === null ? undefined : 'polite'}>
        {echo ?? hint}
      </p>
    </div>
  )
}

function Chevron({ up }: { up?: boolean }) {
  return (
    <svg width="10" height="6" viewBox="0 0 10 6" aria-hidden="true">
      <path
        d={up ? 'M1 5 5 1 9 5' : 'M1 1 5 5 9 1'}
        fill="none"
        stroke="currentColor"
        strokeWidth="1.5"
      />
    </svg>
  )
}
