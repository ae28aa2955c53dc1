import { useRef } from 'react'

/** A button that lets a person choose a file. */
export function FileButton(props: {
  /** Words on the button. */
  words: string
  /** What is chosen, for screen readers. */
  label: string
  accept: string
  onFile: (file: File) => void
}) {
  const input = useRef<HTMLInputElement>(null)
  return (
    <>
      <button type="button" className="button" onClick={() => input.current?.click()}>
        {props.words}
      </button>
      <input
        ref={input}
        className="unseen"
        type="file"
        tabIndex={-1}
        aria-label={props.label}
        accept={props.accept}
        onChange={(event) => {
          const chosen = event.currentTarget.files?.[0]
          // Emptied, so that the same file can be chosen again.
          event.currentTarget.value = ''
          if (chosen !== undefined) props.onFile(chosen)
        }}
      />
    </>
  )
}
