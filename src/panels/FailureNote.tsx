import { look, useView } from '../state/viewStore'

/** Says what could not be opened and why, and keeps its text for copying. */
export function FailureNote() {
  const failure = useView((view) => view.failure)
  if (failure === null) return null
  return (
    <section className="failure" role="alert">
      <div>
        <p>
          <strong>{failure.message}</strong> The design on the page is the one you had; nothing of
          it changed.
        </p>
        {failure.detail !== null && <p className="detail">{failure.detail}</p>}
        {failure.text !== '' && (
          <label>
            What was to be opened, for copying:
            <textarea
              readOnly
              rows={2}
              value={failure.text}
              onFocus={(event) => event.currentTarget.select()}
            />
          </label>
        )}
      </div>
      <button type="button" className="button" onClick={() => look({ failure: null })}>
        Close
      </button>
    </section>
  )
}
